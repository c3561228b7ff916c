import { createDecoder, readVarUint } from 'lib0/decoding'
import { afterAll, beforeAll, describe, expect, test } from 'vitest'
import { WebSocket } from 'ws'
import type { Calculation } from '@shared/api/calculations'
import { revision } from '@shared/api/revisions'
import { messages, ownHandshake, readJson, rightsSchema, welcomeSchema } from '@shared/protocol'
import { PASSWORD, startServer } from '../support/server'
import type { Client, PersonName, TestServer } from '../support/server'

let office: TestServer
let engineer: Client
let administrator: Client
let made: Calculation
let documentId: string
const sockets: WebSocket[] = []

beforeAll(async () => {
  office = await startServer()
  engineer = await office.signIn('engineer')
  administrator = await office.signIn('administrator')
  made = await office.addCalculation(engineer)
  const opened = await engineer.get(`/api/revisions/${made.revisions[0]?.id}`).expect(200)
  documentId = revision.parse(opened.body).document.documentId
})
afterAll(async () => {
  for (const socket of sockets) socket.terminate()
  await office?.close()
})

interface Opened {
  closed: Promise<number>
  isOpen: () => boolean
  /** Whether it may be written in, as the server says first and again with each change. */
  told: boolean[]
  refused: Promise<number | undefined>
}

const open = (cookie: string | undefined, origin = office.url): Opened => {
  const address = `${office.url.replace('http', 'ws')}/collaboration/${documentId}?${new URLSearchParams(ownHandshake(7))}`
  const socket = new WebSocket(address, { origin, headers: cookie ? { Cookie: cookie } : {} })
  sockets.push(socket)
  const told: boolean[] = []
  socket.on('message', (bytes: Buffer) => {
    const decoder = createDecoder(new Uint8Array(bytes))
    const kind = readVarUint(decoder)
    if (kind === messages.welcome) told.push(readJson(decoder, welcomeSchema).mayWrite)
    if (kind === messages.rights) told.push(readJson(decoder, rightsSchema).mayWrite)
  })
  return {
    told,
    isOpen: () => socket.readyState === WebSocket.OPEN,
    closed: new Promise((resolve) => socket.once('close', resolve)),
    refused: new Promise((resolve) => {
      socket.once('unexpected-response', (_request, response) => resolve(response.statusCode))
      socket.once('error', () => resolve(undefined))
    }),
  }
}

const as = async (person: PersonName): Promise<Opened> => open(await office.cookieOf(person))
const until = async (done: () => boolean): Promise<void> => {
  const deadline = Date.now() + 15_000
  while (!done()) {
    if (Date.now() > deadline) throw new Error('It did not happen in time.')
    await new Promise((resolve) => setTimeout(resolve, 20))
  }
}

describe('the socket of a sheet', () => {
  test('opens with the session of the page: a preparer writes, a colleague reads', async () => {
    const [own, other] = [await as('engineer'), await as('colleague')]
    await until(() => own.told.length > 0 && other.told.length > 0)
    expect([own.told, other.told]).toEqual([[true], [false]])
  })

  test('is closed to nobody, to strangers and to observers who were not invited', async () => {
    expect(await open(undefined).closed).toBe(4401)
    expect(await open('torfolio.session=s%3Amade.up').closed).toBe(4401)
    expect(await (await as('stranger')).closed).toBe(4403)
    expect(await (await as('observer')).closed).toBe(4403)
  })

  test('is not upgraded for a page of another site', async () => {
    const cookie = await office.cookieOf('engineer')
    expect(await open(cookie, 'https://elsewhere.test').refused).toBe(403)
  })

  test('learns at once that its person was given a part, and that it was taken away', async () => {
    const reader = await as('checker')
    await until(() => reader.told.length > 0)
    const path = `/api/calculations/${made.id}/participations`
    const { id: accountId } = office.people.checker
    const given = await engineer.post(path).send({ accountId, part: 'preparer' }).expect(201)
    await until(() => reader.told.length > 1)
    const part = (given.body as Calculation).participations.find((one) => one.person.id === accountId)
    await engineer.delete(`${path}/${part?.id}`).expect(200)
    await until(() => reader.told.length > 2)
    expect(reader.told).toEqual([false, true, false])
  })

  test('closes when its person signs out; the sheet on another device of the same person stays open', async () => {
    const cookie = await office.cookieOf('steward')
    const [opened, elsewhere] = [open(cookie), await as('steward')]
    await until(() => opened.told.length > 0 && elsewhere.told.length > 0)
    await office.anonymous().delete('/api/session').set('Cookie', cookie).expect(204)
    expect(await opened.closed).toBe(4401)
    expect(elsewhere.isOpen()).toBe(true)
  })

  test('closes when the person changes the password elsewhere: whoever had the old one is out', async () => {
    const [own, other] = [await office.cookieOf('approver'), await office.cookieOf('approver')]
    const [kept, ended] = [open(own), open(other)]
    await until(() => kept.told.length > 0 && ended.told.length > 0)
    await office
      .anonymous()
      .put('/api/session/password')
      .set('Cookie', own)
      .send({ current: PASSWORD, next: 'another long password' })
      .expect(204)
    expect(await ended.closed).toBe(4401)
    expect(kept.isOpen()).toBe(true)
  })

  test('goes on when a firm that the person also belongs to ends its access there', async () => {
    const stranger = await office.signIn('stranger')
    const { id, email } = office.people.engineer
    await stranger.post('/api/people').send({ name: 'x', email, role: 'engineer' }).expect(201)
    const cookie = await office.cookieOf('engineer')
    const opened = open(cookie)
    await until(() => opened.told.length > 0)
    await stranger.patch(`/api/people/${id}`).send({ isActive: false }).expect(200)
    const status = await office.anonymous().get('/api/session').set('Cookie', cookie).expect(200)
    expect(status.body.me).toMatchObject({ firm: { id: office.people.engineer.firmId } })
    await office.anonymous().get('/api/in-tray').set('Cookie', cookie).expect(200)
    expect(opened.isOpen()).toBe(true)
  })

  test('closes when its person’s access ends', async () => {
    const opened = await as('colleague')
    await until(() => opened.told.length > 0)
    const path = `/api/people/${office.people.colleague.id}`
    await administrator.patch(path).send({ isActive: false }).expect(200)
    expect(await opened.closed).toBe(4403)
  })
})
