import { Client as PgClient } from 'pg'
import { afterAll, beforeAll, describe, expect, test } from 'vitest'
import { invited, peopleList } from '@shared/api/people'
import type { Invited } from '@shared/api/people'
import { startServer } from '../support/server'
import type { Client, TestServer } from '../support/server'

let office: TestServer
let sql: PgClient
let administrator: Client
let engineer: Client

beforeAll(async () => {
  office = await startServer()
  sql = new PgClient({ connectionString: office.database.appUrl })
  await sql.connect()
  administrator = await office.signIn('administrator')
  engineer = await office.signIn('engineer')
})
afterAll(async () => {
  await sql?.end()
  await office?.close()
})

const invite = async (name: string, role = 'engineer'): Promise<Invited> => {
  const email = `${name.toLowerCase().replace(/\W+/g, '.')}@first.test`
  const answer = await administrator.post('/api/people').send({ name, email, role }).expect(201)
  return invited.parse(answer.body)
}
const tokenOf = ({ link }: Invited): string => link?.path.split('#').pop() ?? ''

describe('the list of people', () => {
  test('shows everybody of the firm with role and address, and nobody of another', async () => {
    const { people } = peopleList.parse((await engineer.get('/api/people').expect(200)).body)
    expect(people.map((person) => person.name)).toContain('Chiara Moretti')
    expect(people.map((person) => person.name)).not.toContain('Stefan Gruber')
    expect(people.every((person) => person.hasPassword && person.isActive)).toBe(true)
  })

  test('is not for observers', async () => {
    const observer = await office.signIn('observer')
    const answer = await observer.get('/api/people').expect(403)
    expect(answer.body.error.message).toBe('Observers do not see the list of people.')
  })
})

describe('adding somebody', () => {
  test('gives a one-time link by which the person sets a password and signs in', async () => {
    const added = await invite('Nils Berg')
    expect(added.person).toMatchObject({ name: 'Nils Berg', role: 'engineer', hasPassword: false })
    const token = tokenOf(added)
    const anonymous = office.anonymous()
    const link = await anonymous.post('/api/links/look-up').send({ token }).expect(200)
    expect(link.body).toMatchObject({
      name: 'Nils Berg',
      email: 'nils.berg@first.test',
      firm: 'The first firm',
    })
    await anonymous.post('/api/links/password').send({ token, password: 'nine grey boats' }).expect(204)
    const credentials = { email: 'nils.berg@first.test', password: 'nine grey boats' }
    const me = await anonymous.post('/api/session').send(credentials).expect(200)
    expect(me.body.role).toBe('engineer')
  })

  test('a link works once', async () => {
    const token = tokenOf(await invite('Once Only'))
    const send = (password: string) =>
      office.anonymous().post('/api/links/password').send({ token, password })
    await send('nine grey boats').expect(204)
    const again = await send('other grey boats').expect(410)
    expect(again.body.error.code).toBe('link-expired')
    await office.anonymous().post('/api/links/look-up').send({ token }).expect(410)
  })

  test('a link that was made while its person set a password is worth nothing', async () => {
    const added = await invite('Just Intime')
    const { token, id } = { token: tokenOf(added), id: added.person.id }
    await sql.query(`UPDATE account SET password_hash = 'set meanwhile' WHERE id = $1`, [id])
    await office
      .anonymous()
      .post('/api/links/password')
      .send({ token, password: 'nine grey boats' })
      .expect(410)
  })

  test('of two who use a link at once one is too late', async () => {
    const token = tokenOf(await invite('Two Atonce'))
    const answers = await Promise.all(
      ['first of the two', 'second of the two'].map((password) =>
        office.anonymous().post('/api/links/password').send({ token, password }),
      ),
    )
    expect(answers.map((answer) => answer.status).sort()).toEqual([204, 410])
  })

  test('a weak password is refused and the link stays good', async () => {
    const token = tokenOf(await invite('Weak Start'))
    for (const password of ['short', 'password1', 'aaaaaaaaaaaa', 'weak.start@first.test']) {
      const answer = await office
        .anonymous()
        .post('/api/links/password')
        .send({ token, password })
        .expect(400)
      expect(answer.body.error.fields[0].path).toBe('password')
    }
    await office
      .anonymous()
      .post('/api/links/password')
      .send({ token, password: 'x'.repeat(60) + 'yz' })
      .expect(204)
  })

  test('an invented link is nobody’s', async () => {
    const token = 'A'.repeat(43)
    await office.anonymous().post('/api/links/look-up').send({ token }).expect(410)
    await office.anonymous().post('/api/links/look-up').send({ token: '' }).expect(400)
  })

  test('twice is a conflict, in whatever capitals', async () => {
    await invite('Twice Added')
    const answer = await administrator
      .post('/api/people')
      .send({ name: 'x', email: 'TWICE.added@first.test', role: 'engineer' })
      .expect(409)
    expect(answer.body.error.message).toBe('Twice Added is a person of this firm already.')
  })

  test('is for administrators only', async () => {
    const person = { name: 'x', email: 'x@first.test', role: 'administrator' }
    for (const name of ['steward', 'engineer', 'observer'] as const) {
      const client = await office.signIn(name)
      const answer = await client.post('/api/people').send(person).expect(403)
      expect(answer.body.error.message).toBe('Only an administrator adds and changes people.')
    }
  })

  test.each([
    [{ name: '', email: 'x@first.test', role: 'engineer' }, 'name'],
    [{ name: 'x', email: 'no address', role: 'engineer' }, 'email'],
    [{ name: 'x', email: 'x@first.test', role: 'owner' }, 'role'],
    [{ name: 'a\u0000b', email: 'x@first.test', role: 'engineer' }, 'name'],
    [{ name: 'x'.repeat(121), email: 'x@first.test', role: 'engineer' }, 'name'],
  ])('bad input %# is refused at its field', async (person, field) => {
    const answer = await administrator.post('/api/people').send(person).expect(400)
    expect(answer.body.error.fields.map((one: { path: string }) => one.path)).toEqual([field])
  })
})

describe('a new link', () => {
  test('takes the place of the earlier one', async () => {
    const added = await invite('Lost Link')
    const renewed = await administrator.post(`/api/people/${added.person.id}/link`).expect(200)
    await office
      .anonymous()
      .post('/api/links/look-up')
      .send({ token: tokenOf(added) })
      .expect(410)
    const token = tokenOf(invited.parse(renewed.body))
    await office.anonymous().post('/api/links/look-up').send({ token }).expect(200)
  })

  test('is refused for somebody with a password: no administrator replaces it', async () => {
    const answer = await administrator.post(`/api/people/${office.people.engineer.id}/link`).expect(409)
    expect(answer.body.error.message).toMatch(/has a password already/)
  })

  test('is refused for somebody whom another firm has invited', async () => {
    const added = await invite('Between Firms')
    const stranger = await office.signIn('stranger')
    const second = await stranger
      .post('/api/people')
      .send({ name: 'x', email: 'between.firms@first.test', role: 'observer' })
      .expect(201)
    expect(second.body.link).toBeNull()
    await stranger.post(`/api/people/${added.person.id}/link`).expect(409)
    // The first firm's link stays as good as it was.
    await office
      .anonymous()
      .post('/api/links/look-up')
      .send({ token: tokenOf(added) })
      .expect(200)
  })

  test('is for administrators, and only for people of the firm', async () => {
    await engineer.post(`/api/people/${office.people.engineer.id}/link`).expect(403)
    await administrator.post(`/api/people/${office.people.stranger.id}/link`).expect(404)
  })
})

describe('changing somebody', () => {
  test('a new role has its effect on the next request of a session that is open', async () => {
    const steward = await office.signIn('steward')
    await steward.post('/api/people').send({ name: 'x', email: 'y@first.test', role: 'engineer' }).expect(403)
    const path = `/api/people/${office.people.steward.id}`
    await administrator.patch(path).send({ role: 'administrator' }).expect(200)
    await steward.get('/api/people').expect(200)
    const me = await steward.get('/api/session')
    expect(me.body.me.role).toBe('administrator')
    await administrator.patch(path).send({ role: 'steward' }).expect(200)
    await steward.post('/api/people').send({ name: 'x', email: 'y@first.test', role: 'engineer' }).expect(403)
  })

  test('whose access ends is signed out at once, cannot sign in, and can be let in again', async () => {
    const client = await office.signIn('checker')
    const path = `/api/people/${office.people.checker.id}`
    const answer = await administrator.patch(path).send({ isActive: false }).expect(200)
    expect(answer.body.isActive).toBe(false)
    await client.get('/api/in-tray').expect(401)
    await administrator.patch(path).send({ isActive: true }).expect(200)
    await (await office.signIn('checker')).get('/api/in-tray').expect(200)
  })

  test('the last administrator stays one', async () => {
    const path = `/api/people/${office.people.administrator.id}`
    const answer = await administrator.patch(path).send({ role: 'engineer' }).expect(409)
    expect(answer.body.error.message).toMatch(/last administrator/)
    await administrator.patch(path).send({ isActive: false }).expect(409)
  })

  test('of two administrators who demote each other at once one remains', async () => {
    const steward = `/api/people/${office.people.steward.id}`
    const first = `/api/people/${office.people.administrator.id}`
    await administrator.patch(steward).send({ role: 'administrator' }).expect(200)
    const other = await office.signIn('steward')
    const answers = await Promise.all([
      administrator.patch(steward).send({ role: 'engineer' }),
      other.patch(first).send({ role: 'engineer' }),
    ])
    expect(answers.map((answer) => answer.status).filter((status) => status === 200)).toHaveLength(1)
    const { people } = peopleList.parse((await engineer.get('/api/people')).body)
    expect(people.filter((person) => person.role === 'administrator')).toHaveLength(1)
  })
})
