import { Client as PgClient } from 'pg'
import { afterAll, beforeAll, describe, expect, test } from 'vitest'
import type { Calculation } from '@shared/api/calculations'
import { inTray } from '@shared/api/inTray'
import { startServer } from '../support/server'
import type { Client, PersonName, TestServer } from '../support/server'

let office: TestServer
let sql: PgClient
let engineer: Client
let checker: Client

beforeAll(async () => {
  office = await startServer()
  sql = new PgClient({ connectionString: office.database.appUrl })
  await sql.connect()
  await sql.query(`SELECT set_config('torfolio.firm', $1, false)`, [office.people.engineer.firmId])
  engineer = await office.signIn('engineer')
  checker = await office.signIn('checker')
})
afterAll(async () => {
  await sql?.end()
  await office?.close()
})

const appoint = (made: Calculation, person: PersonName, part: string, note = '') =>
  engineer
    .post(`/api/calculations/${made.id}/participations`)
    .send({ accountId: office.people[person].id, part, note })
    .expect(201)
const trayOf = async (client: Client) => inTray.parse((await client.get('/api/in-tray').expect(200)).body)
const moveTo = (made: Calculation, state: string) =>
  sql.query('UPDATE revision SET state = $1 WHERE calculation_id = $2', [state, made.id])

describe('the in-tray', () => {
  test('is empty for whom nothing waits', async () => {
    const colleague = await office.signIn('colleague')
    expect(await trayOf(colleague)).toEqual({ waitsForMe: [], iWaitFor: [], changed: [] })
  })

  test('begins each entry with what to do, by part and state', async () => {
    const made = await office.addCalculation(engineer, { title: 'Propeller shaft' })
    await appoint(made, 'checker', 'checker', 'Please look at the fillet first.')
    await appoint(made, 'approver', 'approver')
    const entry = { calculationId: made.id, number: made.number, letter: 'A', title: 'Propeller shaft' }
    const approver = await office.signIn('approver')

    expect((await trayOf(engineer)).waitsForMe[0]).toMatchObject({
      ...entry,
      verb: 'Prepare',
      part: 'preparer',
    })
    expect((await trayOf(checker)).iWaitFor).toMatchObject([
      { ...entry, detail: 'is being prepared by Edda Brandt', note: 'Please look at the fillet first.' },
    ])
    await moveTo(made, 'checking')
    expect((await trayOf(checker)).waitsForMe).toMatchObject([{ ...entry, verb: 'Check' }])
    expect((await trayOf(engineer)).iWaitFor).toMatchObject([
      { ...entry, detail: 'is being checked by Chiara Moretti' },
    ])
    expect((await trayOf(approver)).iWaitFor).toMatchObject([{ ...entry }])
    await moveTo(made, 'returned')
    expect((await trayOf(engineer)).waitsForMe).toContainEqual(
      expect.objectContaining({ ...entry, verb: 'Revise' }),
    )
    await moveTo(made, 'checked')
    expect((await trayOf(approver)).waitsForMe).toMatchObject([{ ...entry, verb: 'Approve' }])
    await moveTo(made, 'issued')
    expect((await trayOf(approver)).waitsForMe).toEqual([])
  })

  test('says where nobody is appointed to do what is waited for', async () => {
    const made = await office.addCalculation(engineer)
    await moveTo(made, 'checking')
    const entry = (await trayOf(engineer)).iWaitFor.find((one) => one.calculationId === made.id)
    expect(entry?.detail).toBe('is being checked; nobody is appointed yet')
  })

  test('has first what is due first', async () => {
    const later = await office.addCalculation(engineer, { dueOn: '2030-05-01' })
    const sooner = await office.addCalculation(engineer, { dueOn: '2030-01-01' })
    const order = (await trayOf(engineer)).waitsForMe.map((one) => one.calculationId)
    expect(order.slice(0, 2)).toEqual([sooner.id, later.id])
  })

  test('tells what colleagues changed, not what one changed oneself', async () => {
    const made = await office.addCalculation(engineer, { title: 'Stub axle' })
    await appoint(made, 'colleague', 'preparer')
    const documents = await sql.query(
      'SELECT document.id FROM document JOIN revision ON revision.id = revision_id WHERE calculation_id = $1',
      [made.id],
    )
    const { id } = documents.rows[0] as { id: string }
    for (const [position, line] of ['d_o', 'tau', 'd_o'].entries())
      await sql.query(
        `INSERT INTO contribution (document_id, firm_id, head, position, account_id, subject, subject_id)
         VALUES ($1, $2, 2, $3, $4, 'line', $5)`,
        [id, office.people.engineer.firmId, position, office.people.colleague.id, line],
      )
    expect((await trayOf(engineer)).changed).toMatchObject([
      { verb: 'See', title: 'Stub axle', detail: 'Cosmin Albu changed 2 lines' },
    ])
    expect((await trayOf(await office.signIn('colleague'))).changed).toEqual([])
  })

  test('shows an observer what they were invited to read', async () => {
    const made = await office.addCalculation(engineer, { title: 'For the client' })
    await appoint(made, 'observer', 'observer', 'As agreed on the phone.')
    const observer = await office.signIn('observer')
    expect((await trayOf(observer)).changed).toMatchObject([
      { verb: 'Read', title: 'For the client', note: 'As agreed on the phone.' },
    ])
  })
})
