import { Client as PgClient } from 'pg'
import { afterAll, beforeAll, expect, test } from 'vitest'
import { createLog } from '@server/middleware/logging'
import { PASSWORD, startServer } from '../support/server'
import type { TestServer } from '../support/server'

let office: TestServer
const lines: string[] = []

beforeAll(async () => {
  office = await startServer({ config: { logLevel: 'debug' }, log: (line) => void lines.push(line) })
})
afterAll(() => office?.close())

test('every request stands in the log with its reference, and none of its secrets does', async () => {
  const administrator = await office.signIn('administrator')
  const cookie = await office.cookieOf('engineer')
  const added = await administrator
    .post('/api/people')
    .send({ name: 'x', email: 'log@first.test', role: 'engineer' })
    .expect(201)
  const address = new URL(String(added.body.link.path), office.url)
  const token = address.hash.slice(1)
  expect(token).toHaveLength(43)
  await office.anonymous().get(`${address.pathname}${address.search}`)
  await office.anonymous().post('/api/links/look-up').send({ token }).expect(200)
  await office
    .anonymous()
    .post('/api/links/password')
    .send({ token, password: 'nine grey boats' })
    .expect(204)
  await office.anonymous().get('/api/calculations?search=secret-word').set('Cookie', cookie).expect(200)
  const missing = await office
    .anonymous()
    .get('/api/missing')
    .set('Authorization', 'Bearer abc123')
    .expect(404)
  const log = lines.join('')
  expect(log).toContain('"path":"/api/session"')
  expect(log).toContain(String(missing.body.error.reference))
  const secrets = [
    PASSWORD,
    'nine grey boats',
    token,
    decodeURIComponent(cookie).slice(-20),
    'abc123',
    'secret-word',
    'argon2',
  ]
  for (const secret of secrets) expect(log).not.toContain(secret)
})

test('a failure of the database is logged without the parameters of its query, and answered with its reference', async () => {
  const owner = new PgClient({ connectionString: office.database.ownerUrl })
  await owner.connect()
  const engineer = await office.signIn('engineer')
  await owner.query('ALTER TABLE project ADD CONSTRAINT broken CHECK (false) NOT VALID')
  lines.length = 0
  try {
    const answer = await engineer.post('/api/projects').send({ number: 'P-SECRET', name: 'x' }).expect(500)
    expect(answer.body.error).toMatchObject({
      code: 'internal',
      message: expect.not.stringMatching(/broken|SQL|relation/) as unknown,
    })
    const failure = lines.find((line) => line.includes('request failed'))
    expect(failure).toContain(String(answer.body.error.reference))
    expect(failure).toContain('broken')
    expect(lines.join('')).not.toContain('P-SECRET')
  } finally {
    await owner.query('ALTER TABLE project DROP CONSTRAINT broken')
    await owner.end()
  }
  await engineer.post('/api/projects').send({ number: 'P-SECRET', name: 'x' }).expect(201)
})

test('what lies behind an error stands in the log, too: why a print could not be set', () => {
  const written: string[] = []
  const log = createLog({ logLevel: 'error' }, { write: (line) => void written.push(line) })
  const cause = Object.assign(new Error('main.typ: unknown variable'), { parameters: ['a-secret'] })
  log.error({ err: Object.assign(new Error('The pages could not be set.'), { cause }) }, 'request failed')
  expect(written.join('')).toContain('main.typ: unknown variable')
  expect(written.join('')).not.toContain('a-secret')
})

test('connections that the database ends are made again, and the server lives', async () => {
  const engineer = await office.signIn('engineer')
  const { super: address } = JSON.parse(process.env['TORFOLIO_TEST_CLUSTER'] ?? '{}') as { super: string }
  const asSuper = new PgClient({ connectionString: address.replace('{database}', 'postgres') })
  await asSuper.connect()
  const name = new URL(office.database.appUrl).pathname.slice(1)
  await asSuper.query(`SELECT pg_terminate_backend(pid) FROM pg_stat_activity WHERE datname = $1`, [name])
  await asSuper.end()
  // The pools notice within a moment; a request in between may be told to try again.
  const deadline = Date.now() + 10_000
  let status = 0
  while (status !== 200 && Date.now() < deadline) {
    const answer = await engineer.get('/api/in-tray')
    status = answer.status
    if (status !== 200) expect(answer.body.error.code).toBe('unavailable')
  }
  expect(status).toBe(200)
})
