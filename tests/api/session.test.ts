import { Client as PgClient } from 'pg'
import { afterAll, beforeAll, describe, expect, test } from 'vitest'
import { errorBody } from '@shared/api/problems'
import { me, sessionStatus } from '@shared/api/session'
import { PASSWORD, startServer } from '../support/server'
import type { TestServer } from '../support/server'

let office: TestServer
let sql: PgClient

beforeAll(async () => {
  office = await startServer()
  sql = new PgClient({ connectionString: office.database.appUrl })
  await sql.connect()
})
afterAll(async () => {
  await sql?.end()
  await office?.close()
})

const credentials = (person: 'engineer' | 'colleague' | 'observer') => ({
  email: office.people[person].email,
  password: PASSWORD,
})

describe('signing in', () => {
  test('address and password open a session that says who one is', async () => {
    const client = office.anonymous()
    const answer = await client.post('/api/session').send(credentials('engineer')).expect(200)
    const person = me.parse(answer.body)
    expect(person).toMatchObject({
      account: { name: 'Edda Brandt', initials: 'EB' },
      role: 'engineer',
      parts: [],
    })
    expect(person.firm?.name).toBe('The first firm')
    const status = await client.get('/api/session').expect(200)
    expect(sessionStatus.parse(status.body).me?.account.id).toBe(office.people.engineer.id)
  })

  test('the address may be written in capitals and with spaces around it', async () => {
    const { email, password } = credentials('engineer')
    await office
      .anonymous()
      .post('/api/session')
      .send({ email: ` ${email.toUpperCase()} `, password })
      .expect(200)
  })

  test('a wrong password and an unknown address get the very same answer', async () => {
    const wrong = await office
      .anonymous()
      .post('/api/session')
      .send({ ...credentials('engineer'), password: 'not this one' })
      .expect(401)
    const unknown = await office
      .anonymous()
      .post('/api/session')
      .send({ email: 'nobody@first.test', password: PASSWORD })
      .expect(401)
    const [one, other] = [errorBody.parse(wrong.body).error, errorBody.parse(unknown.body).error]
    expect(one.code).toBe('sign-in-refused')
    expect({ ...one, reference: '' }).toEqual({ ...other, reference: '' })
  })

  test('nothing of an account is told: no hash, no other field', async () => {
    const client = await office.signIn('engineer')
    const text = (await client.get('/api/session').expect(200)).text
    expect(text).not.toMatch(/argon2|passwordHash|password_hash/)
  })

  test('fields that are missing are named', async () => {
    const answer = await office.anonymous().post('/api/session').send({ email: '' }).expect(400)
    expect(errorBody.parse(answer.body).error.fields?.map((field) => field.path)).toEqual([
      'email',
      'password',
    ])
  })

  test('what is not text is refused as bad input', async () => {
    await office
      .anonymous()
      .post('/api/session')
      .send({ email: { $ne: '' }, password: ['x'] })
      .expect(400)
  })

  test('a session that was planted before signing in is worth nothing afterwards', async () => {
    const first = await office.anonymous().post('/api/session').send(credentials('engineer')).expect(200)
    const planted = String(first.get('Set-Cookie')?.[0]).split(';')[0] ?? ''
    const second = await office
      .anonymous()
      .post('/api/session')
      .set('Cookie', planted)
      .send(credentials('colleague'))
      .expect(200)
    const fresh = String(second.get('Set-Cookie')?.[0]).split(';')[0] ?? ''
    expect(fresh).not.toBe(planted)
    const old = await office.anonymous().get('/api/session').set('Cookie', planted).expect(200)
    expect(old.body.me).toBeNull()
  })

  test('the cookie is out of reach of scripts and of other sites', async () => {
    const answer = await office.anonymous().post('/api/session').send(credentials('engineer')).expect(200)
    expect(answer.get('Set-Cookie')?.[0]).toMatch(/HttpOnly.*SameSite=Lax|SameSite=Lax.*HttpOnly/)
  })

  test('signing in and failing to both stand in the audit trail', async () => {
    const { id } = office.people.observer
    await office.signIn('observer')
    await office
      .anonymous()
      .post('/api/session')
      .send({ ...credentials('observer'), password: 'wrong' })
      .expect(401)
    const owner = new PgClient({ connectionString: office.database.ownerUrl })
    await owner.connect()
    try {
      await owner.query('BEGIN')
      await owner.query('ALTER TABLE audit_event NO FORCE ROW LEVEL SECURITY')
      const events = await owner.query('SELECT action FROM audit_event WHERE account_id = $1 ORDER BY at', [
        id,
      ])
      expect(events.rows.map((row: { action: string }) => row.action)).toEqual([
        'session.begin',
        'session.refuse',
      ])
      await owner.query('ROLLBACK')
    } finally {
      await owner.end()
    }
  })
})

describe('signing out', () => {
  test('ends the session in the database, not only in the browser', async () => {
    const cookie = await office.cookieOf('colleague')
    const sid = decodeURIComponent(cookie)
      .replace(/^.*=s:/, '')
      .split('.')[0]
    expect((await sql.query('SELECT 1 FROM session WHERE sid = $1', [sid])).rowCount).toBe(1)
    await office.anonymous().delete('/api/session').set('Cookie', cookie).expect(204)
    expect((await sql.query('SELECT 1 FROM session WHERE sid = $1', [sid])).rowCount).toBe(0)
    const status = await office.anonymous().get('/api/session').set('Cookie', cookie)
    expect(status.body.me).toBeNull()
  })

  test('is harmless where nobody is signed in', async () => {
    await office.anonymous().delete('/api/session').expect(204)
  })
})

describe('the session', () => {
  test('a cookie that was tampered with is nobody', async () => {
    const cookie = await office.cookieOf('engineer')
    const status = await office
      .anonymous()
      .get('/api/session')
      .set('Cookie', `${cookie.slice(0, -4)}aaaa`)
    expect(status.body.me).toBeNull()
  })

  test('ends a week after signing in, however much it is used', async () => {
    const cookie = await office.cookieOf('engineer')
    const sid = decodeURIComponent(cookie)
      .replace(/^.*=s:/, '')
      .split('.')[0]
    await sql.query(
      `UPDATE session SET sess = jsonb_set(sess::jsonb, '{startedAt}', to_jsonb($2::bigint))::json WHERE sid = $1`,
      [sid, Date.now() - 8 * 24 * 3_600_000],
    )
    const status = await office.anonymous().get('/api/session').set('Cookie', cookie)
    expect(status.body.me).toBeNull()
  })

  test('every route but the open ones asks for a person', async () => {
    for (const path of ['in-tray', 'people', 'projects', 'calculations', 'templates', 'templates/x']) {
      const answer = await office.anonymous().get(`/api/${path}`).expect(401)
      expect(errorBody.parse(answer.body).error.code).toBe('not-signed-in')
    }
    await office
      .anonymous()
      .put('/api/session/firm')
      .send({ firmId: office.people.engineer.firmId })
      .expect(401)
    await office
      .anonymous()
      .put('/api/session/password')
      .send({ current: 'x', next: 'yyyyyyyyyy' })
      .expect(401)
  })
})

describe('several firms', () => {
  test('whoever belongs to two chooses, and works in none before', async () => {
    const administrator = await office.signIn('administrator')
    const stranger = await office.signIn('stranger')
    const added = await administrator
      .post('/api/people')
      .send({ name: 'Other name', email: office.people.stranger.email, role: 'engineer' })
      .expect(201)
    // Already has a password elsewhere: no link, and the name stays the person's own.
    expect(added.body).toMatchObject({ link: null, person: { name: 'Stefan Gruber', role: 'engineer' } })
    const status = await stranger.get('/api/session').expect(200)
    expect(status.body.me).toMatchObject({ firm: null, role: null })
    expect(status.body.me.firms).toHaveLength(2)
    const none = await stranger.get('/api/projects').expect(403)
    expect(none.body.error.code).toBe('no-firm')
    const firstFirm = office.people.engineer.firmId
    const chosen = await stranger.put('/api/session/firm').send({ firmId: firstFirm }).expect(200)
    expect(chosen.body).toMatchObject({ firm: { id: firstFirm }, role: 'engineer' })
    await stranger.get('/api/projects').expect(200)
  })

  test("a firm that is not one's own cannot be chosen", async () => {
    const engineer = await office.signIn('engineer')
    await engineer.put('/api/session/firm').send({ firmId: office.people.stranger.firmId }).expect(404)
    await engineer.put('/api/session/firm').send({ firmId: 'x' }).expect(400)
  })
})

describe("one's own password", () => {
  test('is changed with the present one, and every other session ends', async () => {
    const kept = await office.signIn('colleague')
    const other = await office.signIn('colleague')
    await kept.put('/api/session/password').send({ current: 'wrong', next: 'a longer new one' }).expect(401)
    await kept.put('/api/session/password').send({ current: PASSWORD, next: 'short' }).expect(400)
    await kept.put('/api/session/password').send({ current: PASSWORD, next: 'password123' }).expect(400)
    await kept.put('/api/session/password').send({ current: PASSWORD, next: 'a longer new one' }).expect(204)
    expect((await kept.get('/api/session')).body.me).not.toBeNull()
    expect((await other.get('/api/session')).body.me).toBeNull()
    await office.anonymous().post('/api/session').send(credentials('colleague')).expect(401)
    await office
      .anonymous()
      .post('/api/session')
      .send({ email: office.people.colleague.email, password: 'a longer new one' })
      .expect(200)
  })
})

describe('too many tries', () => {
  test('counts that have lapsed are not kept', async () => {
    await sql.query(
      `INSERT INTO rate_window SELECT 'sign-in:account:' || n, 1, now() - interval '1 hour' FROM generate_series(1, 150) n`,
    )
    const nobody = (name: string) =>
      office
        .anonymous()
        .post('/api/session')
        .send({ email: `${name}@first.test`, password: 'x' })
        .expect(401)
    await nobody('no-one')
    await nobody('no-one-else')
    const left = await sql.query('SELECT 1 FROM rate_window WHERE resets_at < now()')
    expect(left.rowCount).toBe(0)
  })

  test('for one account end in a wait, also with the right password', async () => {
    const { email } = office.people.checker
    for (let count = 0; count < 10; count++)
      await office
        .anonymous()
        .post('/api/session')
        .send({ email, password: `guess ${count}` })
        .expect(401)
    const answer = await office
      .anonymous()
      .post('/api/session')
      .send({ email, password: PASSWORD })
      .expect(429)
    expect(errorBody.parse(answer.body).error).toMatchObject({
      code: 'too-many',
      message: 'Too many tries. Wait a quarter of an hour, then try again.',
    })
    // Others sign in as before.
    await office.signIn('approver')
  })

  test('from one network address end in a wait for every account', async () => {
    for (let count = 0; count < 50; count++)
      await office
        .anonymous()
        .post('/api/session')
        .send({ email: `nobody${count}@first.test`, password: 'x' })
    await office.anonymous().post('/api/session').send(credentials('engineer')).expect(429)
    await sql.query('DELETE FROM rate_window')
    await office.anonymous().post('/api/session').send(credentials('engineer')).expect(200)
  })
})
