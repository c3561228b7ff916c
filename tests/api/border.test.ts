import { mkdtemp, mkdir, rm, writeFile } from 'node:fs/promises'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import request from 'supertest'
import { afterAll, beforeAll, describe, expect, test } from 'vitest'
import { errorBody } from '@shared/api/problems'
import { health } from '@shared/api/health'
import { startServer } from '../support/server'
import type { Client, TestServer } from '../support/server'

let office: TestServer
let engineer: Client
let clientFolder: string

beforeAll(async () => {
  clientFolder = await mkdtemp(join(tmpdir(), 'torfolio-client-'))
  await mkdir(join(clientFolder, 'assets'))
  await writeFile(
    join(clientFolder, 'index.html'),
    '<!doctype html><html><head><title>Torfolio</title></head></html>',
  )
  await writeFile(join(clientFolder, 'assets', 'main-1.js'), 'export {}')
  office = await startServer({ config: { clientFolder } })
  engineer = await office.signIn('engineer')
})
afterAll(async () => {
  await office?.close()
  await rm(clientFolder, { recursive: true, force: true })
})

const project = (number: string) => ({ number, name: 'Mill drive' })

describe('health', () => {
  test('says that everything answers, and at which state the tables are', async () => {
    const answer = await request(office.url).get('/api/health').expect(200)
    expect(health.parse(answer.body)).toEqual({
      status: 'ok',
      version: '0.0.0-test',
      schema: expect.stringMatching(/^\w+\d{13}$/) as unknown,
    })
  })
})

describe('where a request comes from', () => {
  test.each([
    ['another site', 'https://elsewhere.test'],
    ['another port of this machine', 'http://127.0.0.1:1'],
    ['an opaque place', 'null'],
    ['what is no address', 'not an origin'],
  ])('a change from %s is refused', async (_, origin) => {
    const answer = await engineer
      .post('/api/projects')
      .set('Origin', origin)
      .send(project('P-no'))
      .expect(403)
    expect(errorBody.parse(answer.body).error.code).toBe('wrong-origin')
  })

  test('a change that does not say is refused, also signing in', async () => {
    await request(office.url).post('/api/session').send({ email: 'a@b.test', password: 'x' }).expect(403)
    const cookie = await office.cookieOf('engineer')
    await request(office.url).post('/api/projects').set('Cookie', cookie).send(project('P-no')).expect(403)
    await request(office.url).delete('/api/session').set('Cookie', cookie).expect(403)
  })

  test('by the other loopback name it is this machine all the same', async () => {
    const origin = office.url.replace('127.0.0.1', 'localhost')
    await engineer.post('/api/projects').set('Origin', origin).send(project('P-localhost')).expect(201)
  })

  test('with origins set exactly those may', async () => {
    const strict = await startServer({ config: { origins: ['https://torfolio.example'] } })
    try {
      const signIn = (origin: string) =>
        request(strict.url)
          .post('/api/session')
          .set('Origin', origin)
          .send({ email: 'a@b.test', password: 'x' })
      await signIn(strict.url).expect(403)
      await signIn('https://torfolio.example').expect(401)
    } finally {
      await strict.close()
    }
  })
})

describe('what a request carries', () => {
  test('text that is no JSON is bad input', async () => {
    const answer = await engineer
      .post('/api/projects')
      .set('Content-Type', 'application/json')
      .send('{"number": ')
      .expect(400)
    expect(errorBody.parse(answer.body).error.message).toBe('The request is not readable JSON.')
  })

  test('too much is refused before it is read', async () => {
    const answer = await engineer
      .post('/api/projects')
      .send({ ...project('P'), name: 'x'.repeat(300_000) })
      .expect(413)
    expect(errorBody.parse(answer.body).error.code).toBe('too-large')
  })

  test('no body at all is bad input that names its fields', async () => {
    const answer = await engineer.post('/api/projects').expect(400)
    expect(errorBody.parse(answer.body).error.fields?.map((field) => field.path)).toEqual(['number', 'name'])
  })

  test('an address that cannot be decoded is answered, and the server lives', async () => {
    const answer = await engineer.get('/api/templates/%E0%A4%A').expect(400)
    errorBody.parse(answer.body)
    await request(office.url).get('/api/health').expect(200)
  })

  test('identifiers that are none are not found', async () => {
    for (const path of ['projects', 'calculations', 'revisions'])
      await engineer.get(`/api/${path}/1%20OR%201=1`).expect(404)
  })

  test('a search with the signs of a pattern finds them as typed', async () => {
    const answer = await engineer.get('/api/calculations').query({ search: '%_\\' }).expect(200)
    expect(answer.body.calculations).toEqual([])
  })

  test('keys that JavaScript gives a meaning do no harm', async () => {
    await engineer
      .post('/api/projects')
      .set('Content-Type', 'application/json')
      .send('{"__proto__": {"role": "administrator"}, "number": "P-proto", "name": "x"}')
      .expect(201)
    await engineer
      .post('/api/people')
      .send({ name: 'x', email: 'x@first.test', role: 'engineer' })
      .expect(403)
  })
})

describe('what an answer carries', () => {
  test('an unknown address of the API is not found, in its own shape, with a reference', async () => {
    const answer = await engineer.get('/api/nothing-here').expect(404)
    const { error } = errorBody.parse(answer.body)
    expect(error.code).toBe('not-found')
    expect(error.reference).toMatch(/^[0-9a-f]{10}$/)
  })

  test('answers of the API are kept nowhere', async () => {
    const answer = await engineer.get('/api/session').expect(200)
    expect(answer.headers['cache-control']).toBe('no-store')
  })

  test('every address of a page is the one page, with a nonce of its own in page and policy', async () => {
    const [one, other] = [
      await engineer.get('/calculations/x').expect(200),
      await engineer.get('/').expect(200),
    ]
    const nonceIn = (html: string) => /<meta property="csp-nonce" nonce="([^"]+)"/.exec(html)?.[1]
    const nonce = nonceIn(one.text)
    expect(nonce).toBeTruthy()
    expect(nonceIn(other.text)).not.toBe(nonce)
    const policy = String(one.headers['content-security-policy'])
    expect(policy).toContain(`style-src 'self' 'nonce-${nonce}'`)
    expect(policy).toContain(`script-src 'self';`)
    expect(policy).toContain(`frame-ancestors 'none'`)
    expect(policy).not.toMatch(/unsafe-eval|upgrade-insecure-requests|script-src[^;]*unsafe-inline|https:/)
    expect(one.headers).toMatchObject({
      'x-content-type-options': 'nosniff',
      'referrer-policy': 'no-referrer',
    })
    expect(one.headers).not.toHaveProperty('x-powered-by')
  })

  test('files with a name of their content are kept, and one that is missing is no page', async () => {
    const file = await engineer.get('/assets/main-1.js').expect(200)
    expect(file.headers['cache-control']).toContain('immutable')
    const missing = await engineer.get('/assets/main-2.js').expect(404)
    expect(missing.text).not.toContain('<!doctype')
  })

  test('no file outside of the client is served', async () => {
    for (const path of ['/assets/..%2f..%2fpackage.json', '/..%2f..%2fetc%2fpasswd']) {
      const answer = await engineer.get(path)
      expect(answer.text).not.toMatch(/"torfolio"|root:/)
    }
  })

  test('without a built client the page says what to do', async () => {
    const bare = await startServer({ config: { clientFolder: join(tmpdir(), 'not-there') } })
    try {
      const answer = await request(bare.url).get('/').expect(503)
      expect(answer.text).toContain('npm run build')
    } finally {
      await bare.close()
    }
  })
})
