import { afterAll, beforeAll, describe, expect, test } from 'vitest'
import { me, sessionStatus } from '@shared/api/session'
import { startServer } from '../support/server'
import type { TestServer } from '../support/server'

const token = 'the-word-of-this-test-installation'
const wanted = {
  token,
  firm: { name: 'Nordvik Drives', timeZone: 'Europe/Oslo', numberPrefix: 'ND' },
  person: { name: 'Ada Nordvik', email: 'ada@nordvik.test', password: 'eleven quiet gears' },
}

describe('an installation without a firm', () => {
  let bare: TestServer
  beforeAll(async () => {
    bare = await startServer({ empty: true })
  })
  afterAll(() => bare?.close())
  const setUp = (change: object = {}) =>
    bare
      .anonymous()
      .post('/api/setup')
      .send({ ...wanted, ...change })

  test('says so to whoever comes', async () => {
    const status = await bare.anonymous().get('/api/session').expect(200)
    expect(sessionStatus.parse(status.body)).toEqual({ me: null, demo: false, needsSetup: true })
  })

  test('is set up only with the word that the server printed', async () => {
    await setUp({ token: 'guess' }).expect(403)
    await setUp({ token: token.replace('t', 'T') }).expect(403)
    await setUp({ token: undefined }).expect(400)
  })

  test.each([
    [{ firm: { name: '', numberPrefix: 'TF' } }, 'firm.name'],
    [{ firm: { name: 'x', timeZone: 'Mars/Olympus' } }, 'firm.timeZone'],
    [{ firm: { name: 'x', numberPrefix: 'tf-' } }, 'firm.numberPrefix'],
    [{ person: { ...wanted.person, email: 'ada' } }, 'person.email'],
    [{ person: { ...wanted.person, password: 'short' } }, 'person.password'],
    [{ person: { ...wanted.person, password: 'administrator' } }, 'person.password'],
  ])('bad input %# is refused at its field', async (change, field) => {
    const answer = await setUp(change).expect(400)
    expect(answer.body.error.fields[0].path).toBe(field)
  })

  test('of two who set it up at once one is the administrator, and signed in', async () => {
    const others = { ...wanted.person, email: 'eve@nordvik.test' }
    const answers = await Promise.all([setUp(), setUp({ person: others })])
    expect(answers.map((answer) => answer.status).sort()).toEqual([201, 409])
    const won = answers.find((answer) => answer.status === 201)
    const person = me.parse(won?.body)
    expect(person).toMatchObject({
      role: 'administrator',
      firm: { name: 'Nordvik Drives', numberPrefix: 'ND' },
    })
    const status = await bare.anonymous().get('/api/session').expect(200)
    expect(status.body.needsSetup).toBe(false)
    await setUp({ person: { ...wanted.person, email: 'late@nordvik.test' } }).expect(409)
  })

  test('then numbers its calculations with the prefix it chose', async () => {
    const client = bare.anonymous()
    const signIn = (email: string) =>
      client.post('/api/session').send({ email, password: wanted.person.password })
    if ((await signIn('ada@nordvik.test')).status !== 200) await signIn('eve@nordvik.test').expect(200)
    expect((await bare.addCalculation(client)).number).toBe('ND-0001')
  })
})

describe('the demo', () => {
  let demo: TestServer
  beforeAll(async () => {
    demo = await startServer({ config: { demo: true } })
  })
  afterAll(() => demo?.close())

  const markDemo = async (person: 'engineer' | 'checker') => {
    const { Client } = await import('pg')
    const sql = new Client({ connectionString: demo.database.appUrl })
    await sql.connect()
    await sql.query('UPDATE account SET is_demo = true WHERE id = $1', [demo.people[person].id])
    await sql.end()
  }

  test('offers its people, each with what waits for them, and signs in with one press', async () => {
    await markDemo('engineer')
    const engineer = await demo.signIn('engineer')
    const made = await demo.addCalculation(engineer)
    const list = await demo.anonymous().get('/api/demo/people').expect(200)
    expect(list.body.people).toEqual([
      {
        id: demo.people.engineer.id,
        name: 'Edda Brandt',
        initials: 'EB',
        role: 'engineer',
        firm: 'The first firm',
        waiting: `Prepare ${made.number} A`,
      },
    ])
    const client = demo.anonymous()
    const answer = await client
      .post('/api/demo/session')
      .send({ accountId: demo.people.engineer.id })
      .expect(200)
    expect(me.parse(answer.body).account.isDemo).toBe(true)
    await client.get('/api/in-tray').expect(200)
  })

  test('signs in nobody but its own people', async () => {
    const client = demo.anonymous()
    await client.post('/api/demo/session').send({ accountId: demo.people.administrator.id }).expect(403)
    await client.post('/api/demo/session').send({ accountId: 'x' }).expect(400)
  })

  test('is not there for a request that came through a proxy', async () => {
    const accountId = demo.people.engineer.id
    await demo
      .anonymous()
      .post('/api/demo/session')
      .set('X-Forwarded-For', '203.0.113.7')
      .send({ accountId })
      .expect(404)
    await demo.anonymous().get('/api/demo/people').set('X-Forwarded-For', '203.0.113.7').expect(404)
  })

  test.each([
    ['without the demo', { demo: false }],
    ['on an address that others reach', { demo: true, host: '0.0.0.0' }],
  ])('is not there %s', async (_, config) => {
    const plain = await startServer({ config, database: demo.database, empty: true })
    try {
      await markDemo('checker')
      const accountId = demo.people.checker.id
      await plain.anonymous().post('/api/demo/session').send({ accountId }).expect(404)
      await plain.anonymous().get('/api/demo/people').expect(404)
      expect((await plain.anonymous().get('/api/session')).body.demo).toBe(false)
    } finally {
      await plain.close()
    }
  })
})
