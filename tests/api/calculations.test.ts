import { Client as PgClient } from 'pg'
import { afterAll, beforeAll, describe, expect, test } from 'vitest'
import { calculation, calculationList } from '@shared/api/calculations'
import type { Calculation } from '@shared/api/calculations'
import { history, revision } from '@shared/api/revisions'
import { startServer } from '../support/server'
import type { Client, PersonName, TestServer } from '../support/server'

let office: TestServer
let sql: PgClient
let engineer: Client
let colleague: Client
let administrator: Client
let observer: Client
let stranger: Client

beforeAll(async () => {
  office = await startServer()
  sql = new PgClient({ connectionString: office.database.appUrl })
  await sql.connect()
  await sql.query(`SELECT set_config('torfolio.firm', $1, false)`, [office.people.engineer.firmId])
  engineer = await office.signIn('engineer')
  colleague = await office.signIn('colleague')
  administrator = await office.signIn('administrator')
  observer = await office.signIn('observer')
  stranger = await office.signIn('stranger')
})
afterAll(async () => {
  await sql?.end()
  await office?.close()
})

const appoint = (client: Client, { id }: Calculation, person: PersonName, part: string) =>
  client.post(`/api/calculations/${id}/participations`).send({ accountId: office.people[person].id, part })

describe('beginning a calculation', () => {
  test('numbers it, makes revision A, and its maker the preparer', async () => {
    const made = calculation.parse(
      await office.addCalculation(engineer, { title: 'Input shaft', dueOn: '2027-01-31' }),
    )
    expect(made).toMatchObject({
      number: expect.stringMatching(/^TF-\d{4}$/) as unknown,
      title: 'Input shaft',
      dueOn: '2027-01-31',
      myParts: ['preparer'],
    })
    expect(made.revisions).toMatchObject([{ letter: 'A', state: 'preparing' }])
    expect(made.participations).toMatchObject([{ person: { name: 'Edda Brandt' }, part: 'preparer' }])
  })

  test('writes the first content once, as one update of the server’s own', async () => {
    const made = await office.addCalculation(engineer)
    const opened = revision.parse(
      (await engineer.get(`/api/revisions/${made.revisions[0]?.id}`).expect(200)).body,
    )
    expect(opened.document).toMatchObject({ head: 1, epoch: 1, mayWrite: true, reason: '' })
    const updates = await sql.query(
      'SELECT head, account_id, length(bytes) > 0 AS filled FROM document_update WHERE document_id = $1',
      [opened.document.documentId],
    )
    expect(updates.rows).toEqual([{ head: 1, account_id: null, filled: true }])
  })

  test('many at once get numbers without a gap and without a double', async () => {
    const project = await office.addProject(engineer)
    const before = await sql.query('SELECT last_number FROM firm')
    const first = Number((before.rows[0] as { last_number: number }).last_number)
    const made = await Promise.all(
      Array.from({ length: 12 }, (_, index) =>
        office.addCalculation(index % 2 ? engineer : colleague, { projectId: project.id }),
      ),
    )
    const numbers = made.map((one) => Number(one.number.slice(3))).sort((left, right) => left - right)
    expect(numbers).toEqual(Array.from({ length: 12 }, (_, index) => first + 1 + index))
  })

  test('one that is refused leaves no gap', async () => {
    const before = await office.addCalculation(engineer)
    const project = await office.addProject(engineer)
    await engineer
      .post('/api/calculations')
      .send({ projectId: project.id, title: 'x', beginning: { kind: 'template', template: 'not-there' } })
      .expect(404)
    const after = await office.addCalculation(engineer)
    expect(Number(after.number.slice(3))).toBe(Number(before.number.slice(3)) + 1)
  })

  test('is not for observers', async () => {
    const project = await office.addProject(engineer)
    await observer.post('/api/calculations').send({ projectId: project.id, title: 'x' }).expect(403)
  })

  test.each([
    [{ title: '' }, 'title'],
    [{ title: 'x', dueOn: '31.01.2027' }, 'dueOn'],
    [{ title: 'x', dueOn: '2027-02-30' }, 'dueOn'],
    [{ title: 'x', projectId: 'P-1' }, 'projectId'],
    [{ title: 'x', beginning: { kind: 'copy', revisionId: 'A' } }, 'beginning.revisionId'],
    [{ title: 'x', beginning: { kind: 'dream' } }, 'beginning.kind'],
  ])('bad input %# is refused at its field', async (wanted, field) => {
    const project = await office.addProject(engineer)
    const answer = await engineer
      .post('/api/calculations')
      .send({ projectId: project.id, ...wanted })
      .expect(400)
    expect(answer.body.error.fields[0].path).toBe(field)
  })
})

describe('a copy', () => {
  test('has the lines of its model, and their authors are authors there too', async () => {
    const model = await office.addCalculation(engineer)
    const opened = revision.parse((await engineer.get(`/api/revisions/${model.revisions[0]?.id}`)).body)
    await sql.query(
      `INSERT INTO contribution (document_id, firm_id, head, position, account_id, subject, subject_id, field, after)
       VALUES ($1, $2, 1, 0, $3, 'line', 'd1', 'value', '"60"')`,
      [opened.document.documentId, office.people.engineer.firmId, office.people.engineer.id],
    )
    const copy = await office.addCalculation(colleague, {
      title: 'Copied shaft',
      beginning: { kind: 'copy', revisionId: opened.id },
    })
    const read = await colleague.get(`/api/revisions/${copy.revisions[0]?.id}/history`).expect(200)
    expect(history.parse(read.body).entries).toMatchObject([
      { person: { name: 'Edda Brandt' }, subject: 'line', subjectId: 'd1' },
    ])
    const refused = await appoint(colleague, copy, 'engineer', 'checker').expect(409)
    expect(refused.body.error.message).toBe(
      'Edda Brandt has written in this sheet: at DSL2 another person must check and approve it.',
    )
  })
})

describe('the list', () => {
  test('finds by project, state, words and own part', async () => {
    const project = await office.addProject(engineer)
    const made = await office.addCalculation(engineer, {
      projectId: project.id,
      title: 'Torsion bar, rear axle',
    })
    const list = async (client: Client, query: Record<string, string>) =>
      calculationList
        .parse((await client.get('/api/calculations').query(query).expect(200)).body)
        .calculations.map((one) => one.id)
    expect(await list(engineer, { project: project.id })).toEqual([made.id])
    expect(await list(engineer, { project: project.id, state: 'preparing' })).toEqual([made.id])
    expect(await list(engineer, { project: project.id, state: 'issued' })).toEqual([])
    expect(await list(engineer, { search: 'REAR axle' })).toEqual([made.id])
    expect(await list(engineer, { search: made.number })).toEqual([made.id])
    expect(await list(engineer, { mine: 'true', search: 'rear axle' })).toEqual([made.id])
    expect(await list(colleague, { mine: 'true', search: 'rear axle' })).toEqual([])
    expect(await list(colleague, { search: 'rear axle' })).toEqual([made.id])
    expect(await list(stranger, {})).toEqual([])
    await engineer.get('/api/calculations').query({ state: 'lost' }).expect(400)
  })

  test('shows an observer only what they are invited to', async () => {
    const made = await office.addCalculation(engineer, { title: 'Invited sheet' })
    const other = await office.addCalculation(engineer, { title: 'Another sheet' })
    await observer.get(`/api/calculations/${made.id}`).expect(404)
    await appoint(engineer, made, 'observer', 'observer').expect(201)
    await observer.get(`/api/calculations/${made.id}`).expect(200)
    await observer.get(`/api/calculations/${other.id}`).expect(404)
    const answer = await observer.get('/api/calculations').expect(200)
    expect(calculationList.parse(answer.body).calculations.map((one) => one.id)).toEqual([made.id])
  })
})

describe('the title block', () => {
  test('is changed by a preparer, not by others', async () => {
    const made = await office.addCalculation(engineer)
    const path = `/api/calculations/${made.id}`
    const project = await office.addProject(engineer)
    const change = { title: 'Output shaft', dueOn: null, projectId: project.id }
    const answer = await engineer.patch(path).send(change).expect(200)
    expect(answer.body).toMatchObject({
      title: 'Output shaft',
      number: made.number,
      project: { id: project.id },
    })
    const refused = await colleague.patch(path).send({ title: 'x' }).expect(403)
    expect(refused.body.error.message).toBe('Only a preparer changes the title block.')
    await engineer.patch(path).send({ title: '  ' }).expect(400)
  })

  test('is not a way to a lower level of supervision: only an administrator moves the work there', async () => {
    const made = await office.addCalculation(engineer)
    const lower = await office.addProject(engineer, 'DSL1')
    const higher = await office.addProject(engineer, 'DSL3')
    const path = `/api/calculations/${made.id}`
    const refused = await engineer.patch(path).send({ projectId: lower.id }).expect(403)
    expect(refused.body.error.message).toContain('DSL1')
    await appoint(engineer, made, 'administrator', 'preparer').expect(201)
    await administrator.patch(path).send({ projectId: lower.id }).expect(200)
    await engineer.patch(path).send({ projectId: higher.id }).expect(200)
  })

  test('names who prepared, checks and approves', async () => {
    const made = await office.addCalculation(engineer)
    await appoint(engineer, made, 'checker', 'checker').expect(201)
    await appoint(engineer, made, 'approver', 'approver').expect(201)
    const opened = revision.parse((await engineer.get(`/api/revisions/${made.revisions[0]?.id}`)).body)
    expect(opened.titleBlock).toMatchObject({
      firm: 'The first firm',
      number: made.number,
      revision: 'A',
      prepared: [{ name: 'Edda Brandt' }],
      checked: [{ name: 'Chiara Moretti' }],
      approved: [{ name: 'Arvid Nyman' }],
    })
  })
})

describe('who may write in the sheet', () => {
  test('a preparer; everybody else of the firm reads and is told why', async () => {
    const made = await office.addCalculation(engineer)
    const opening = async (client: Client) =>
      revision.parse((await client.get(`/api/revisions/${made.revisions[0]?.id}`).expect(200)).body).document
    expect(await opening(engineer)).toMatchObject({ mayWrite: true })
    expect(await opening(colleague)).toMatchObject({
      mayWrite: false,
      reason: 'Only a preparer writes in this sheet. A preparer or an administrator can appoint you.',
    })
    await appoint(engineer, made, 'colleague', 'preparer').expect(201)
    expect(await opening(colleague)).toMatchObject({ mayWrite: true })
  })

  test('a checker reads, and writes only after giving up that part', async () => {
    const made = await office.addCalculation(engineer)
    const appointed = await appoint(engineer, made, 'colleague', 'checker').expect(201)
    const part = (appointed.body as Pick<Calculation, 'participations'>).participations.find(
      (one) => one.part === 'checker',
    )
    const opened = revision.parse((await colleague.get(`/api/revisions/${made.revisions[0]?.id}`)).body)
    expect(opened.document).toMatchObject({
      mayWrite: false,
      reason:
        'You are a checker of this calculation and open it for reading. To write in it, first give up that part.',
    })
    const refused = await appoint(engineer, made, 'colleague', 'preparer').expect(409)
    expect(refused.body.error.message).toBe(
      'Cosmin Albu is to check or approve this: at DSL2 that part must be given up first.',
    )
    await colleague.delete(`/api/calculations/${made.id}/participations/${part?.id}`).expect(200)
    await appoint(engineer, made, 'colleague', 'preparer').expect(201)
  })

  test('at DSL1 one person prepares, checks and approves', async () => {
    const project = await office.addProject(engineer, 'DSL1')
    const made = await office.addCalculation(engineer, { projectId: project.id })
    await appoint(engineer, made, 'engineer', 'checker').expect(201)
    await appoint(engineer, made, 'engineer', 'approver').expect(201)
    const opened = revision.parse((await engineer.get(`/api/revisions/${made.revisions[0]?.id}`)).body)
    expect(opened.document.mayWrite).toBe(true)
  })
})

describe('parts', () => {
  test('are given by a preparer or an administrator, to people of the firm with access', async () => {
    const made = await office.addCalculation(engineer)
    const refused = await appoint(colleague, made, 'colleague', 'preparer').expect(403)
    expect(refused.body.error.message).toBe(
      'Only a preparer or an administrator appoints people and hands parts over.',
    )
    await appoint(administrator, made, 'colleague', 'preparer').expect(201)
    await appoint(engineer, made, 'stranger', 'observer').expect(404)
    const twice = await appoint(engineer, made, 'colleague', 'preparer').expect(409)
    expect(twice.body.error.message).toBe('Cosmin Albu is a preparer of this already.')
    const outside = await appoint(engineer, made, 'observer', 'preparer').expect(409)
    expect(outside.body.error.message).toMatch(/is an observer of the firm/)
    await appoint(engineer, made, 'engineer', 'king').expect(400)
  })

  test('of two who give one part at once one is told that it is given', async () => {
    const made = await office.addCalculation(engineer)
    const answers = await Promise.all([
      appoint(engineer, made, 'checker', 'checker'),
      appoint(administrator, made, 'checker', 'checker'),
    ])
    expect(answers.map((answer) => answer.status).sort()).toEqual([201, 409])
  })

  test('a preparer is not appointed checker above DSL1', async () => {
    const made = await office.addCalculation(engineer)
    const answer = await appoint(administrator, made, 'engineer', 'checker').expect(409)
    expect(answer.body.error.message).toBe(
      'Edda Brandt prepares this calculation: at DSL2 another person must check and approve it.',
    )
  })

  test('a preparer is the same person by an identifier in capitals', async () => {
    const made = await office.addCalculation(engineer)
    await appoint(engineer, made, 'colleague', 'preparer').expect(201)
    const accountId = office.people.colleague.id.toUpperCase()
    for (const part of ['checker', 'approver'])
      await engineer.post(`/api/calculations/${made.id}/participations`).send({ accountId, part }).expect(409)
  })

  test('are handed over; the one who had it has it no longer', async () => {
    const made = await office.addCalculation(engineer)
    const own = made.participations[0]
    const path = `/api/calculations/${made.id}/participations/${own?.id}/hand-over`
    await colleague.post(path).send({ accountId: office.people.colleague.id }).expect(403)
    const answer = await administrator
      .post(path)
      .send({ accountId: office.people.colleague.id, note: 'Edda is on leave until May.' })
      .expect(200)
    expect((answer.body as Calculation).participations).toMatchObject([
      { person: { name: 'Cosmin Albu' }, part: 'preparer', note: 'Edda is on leave until May.' },
    ])
    await engineer.patch(`/api/calculations/${made.id}`).send({ title: 'x' }).expect(403)
    await colleague.patch(`/api/calculations/${made.id}`).send({ title: 'x' }).expect(200)
    // The row that ended stays, with its dates.
    await administrator.post(path).send({ accountId: office.people.colleague.id }).expect(404)
    const rows = await sql.query(
      'SELECT ended_at IS NULL AS holds FROM participation WHERE calculation_id = $1',
      [made.id],
    )
    expect(rows.rows).toEqual(expect.arrayContaining([{ holds: false }, { holds: true }]))
  })

  test('are given up, but not by the last preparer', async () => {
    const made = await office.addCalculation(engineer)
    const own = `/api/calculations/${made.id}/participations/${made.participations[0]?.id}`
    const last = await engineer.delete(own).expect(409)
    expect(last.body.error.message).toBe(
      'This is the last preparer. Hand the part over to a colleague instead.',
    )
    await appoint(engineer, made, 'colleague', 'preparer').expect(201)
    const left = await engineer.delete(own).expect(200)
    expect((left.body as Calculation).participations.map((one) => one.person.name)).toEqual(['Cosmin Albu'])
    await engineer.delete(own).expect(404)
  })

  test('an observer leaves and sees the calculation no more', async () => {
    const made = await office.addCalculation(engineer)
    const answer = await appoint(engineer, made, 'observer', 'observer').expect(201)
    const part = (answer.body as Calculation).participations.find((one) => one.part === 'observer')
    await observer.delete(`/api/calculations/${made.id}/participations/${part?.id}`).expect(200)
    await observer.get(`/api/calculations/${made.id}`).expect(404)
  })

  test("another's part is ended by a preparer or an administrator only", async () => {
    const made = await office.addCalculation(engineer)
    const answer = await appoint(engineer, made, 'checker', 'checker').expect(201)
    const part = (answer.body as Calculation).participations.find((one) => one.part === 'checker')
    const path = `/api/calculations/${made.id}/participations/${part?.id}`
    await colleague.delete(path).expect(403)
    await engineer.delete(path).expect(200)
  })
})

describe('a revision that has left the hands of its preparers', () => {
  test.each([
    ['checking', 'This revision is checking: its sheet is closed to changes.'],
    ['issued', 'This revision is issued: its sheet is closed to changes.'],
    ['void', 'This revision is void: its sheet is closed to changes.'],
  ])('is closed while %s', async (state, reason) => {
    const made = await office.addCalculation(engineer)
    await sql.query('UPDATE revision SET state = $1 WHERE calculation_id = $2', [state, made.id])
    const opened = revision.parse((await engineer.get(`/api/revisions/${made.revisions[0]?.id}`)).body)
    expect(opened.document).toMatchObject({ mayWrite: false, reason })
    await engineer.patch(`/api/calculations/${made.id}`).send({ title: 'x' }).expect(403)
    const given = await appoint(engineer, made, 'checker', 'checker')
    expect(given.status).toBe(state === 'void' ? 403 : 201)
  })
})

describe("another firm's ids", () => {
  test('are not found, whatever one does with them', async () => {
    const made = await office.addCalculation(engineer)
    const revisionId = made.revisions[0]?.id ?? ''
    const part = `/api/calculations/${made.id}/participations`
    const stranged = await office.addProject(stranger)
    const ownProject = await office.addProject(engineer)
    const { id: accountId } = office.people.stranger
    const attempts = [
      stranger.get(`/api/projects/${made.project.id}`),
      stranger.patch(`/api/projects/${made.project.id}`).send({ name: 'taken' }),
      stranger.get(`/api/calculations/${made.id}`),
      stranger.patch(`/api/calculations/${made.id}`).send({ title: 'taken' }),
      stranger.get(`/api/revisions/${revisionId}`),
      stranger.get(`/api/revisions/${revisionId}/history`),
      stranger.post(part).send({ accountId, part: 'preparer' }),
      stranger.post(`${part}/${made.participations[0]?.id}/hand-over`).send({ accountId }),
      stranger.delete(`${part}/${made.participations[0]?.id}`),
      stranger.patch(`/api/people/${office.people.engineer.id}`).send({ isActive: false }),
      stranger.post(`/api/people/${office.people.engineer.id}/link`),
      stranger.post('/api/calculations').send({ projectId: made.project.id, title: 'x' }),
      stranger
        .post('/api/calculations')
        .send({ projectId: stranged.id, title: 'x', beginning: { kind: 'copy', revisionId } }),
      engineer.patch(`/api/calculations/${made.id}`).send({ projectId: stranged.id }),
      engineer.post(`/api/calculations/${made.id}/participations`).send({ accountId, part: 'observer' }),
    ]
    for (const attempt of attempts) expect((await attempt).status).toBe(404)
    const unchanged = await engineer.get(`/api/calculations/${made.id}`).expect(200)
    expect(unchanged.body).toEqual(made)
    await engineer.get(`/api/projects/${ownProject.id}`).expect(200)
  })

  test('filter to nothing', async () => {
    const made = await office.addCalculation(engineer)
    const answer = await stranger.get('/api/calculations').query({ project: made.project.id }).expect(200)
    expect(answer.body.calculations).toEqual([])
  })
})

describe('the edit record', () => {
  test('is read by who may open the sheet, latest first, of one line where one is named', async () => {
    const made = await office.addCalculation(engineer)
    const id = made.revisions[0]?.id
    const { document } = revision.parse((await engineer.get(`/api/revisions/${id}`)).body)
    for (const [position, subject] of [
      [0, 'd_o'],
      [1, 'tau'],
      [2, 'd_o'],
    ] as const)
      await sql.query(
        `INSERT INTO contribution (document_id, firm_id, head, position, account_id, subject, subject_id, field, before, after)
         VALUES ($1, $2, 2, $3, $4, 'line', $5, 'value', '"60.0"', '"65.0"')`,
        [document.documentId, office.people.engineer.firmId, position, office.people.engineer.id, subject],
      )
    const whole = history.parse((await colleague.get(`/api/revisions/${id}/history`).expect(200)).body)
    expect(whole.entries.map((entry) => entry.subjectId)).toEqual(['d_o', 'tau', 'd_o'])
    expect(whole.entries[0]).toMatchObject({ person: { initials: 'EB' }, before: '60.0', after: '65.0' })
    const one = await colleague.get(`/api/revisions/${id}/history`).query({ subject: 'tau' }).expect(200)
    expect(history.parse(one.body).entries).toHaveLength(1)
    await observer.get(`/api/revisions/${id}/history`).expect(404)
  })
})
