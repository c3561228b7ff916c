import { createConnection } from 'node:net'
import * as decoding from 'lib0/decoding'
import { Awareness, encodeAwarenessUpdate } from 'y-protocols/awareness'
import { afterAll, afterEach, beforeAll, describe, expect, test } from 'vitest'
import * as Y from 'yjs'
import {
  awarenessFrame,
  changeFrame,
  closeCodes,
  jsonFrame,
  limits,
  messages,
  syncFrame,
  syncSteps,
} from '@shared/protocol'
import { readDocument } from '@server/repositories/documentUpdates'
import { inTransaction } from '@server/repositories/transaction'
import { openOffice, until, type Office } from './support/office'
import { rawSocket, type RawSocket } from './support/rawSocket'

let office: Office
const raws: RawSocket[] = []
beforeAll(async () => {
  office = await openOffice()
})
afterEach(() => {
  for (const raw of raws.splice(0)) raw.close()
})
afterAll(() => office.end())

const headNow = async () =>
  (await inTransaction(office.firm.scope, (tx) => readDocument(tx, office.firm.documentId)))?.head ?? -1

const connect = async (
  ...[worker, options]: [worker?: Office['firm']['ada'], options?: { parameters?: string; origin?: string }]
) => {
  const raw = await rawSocket(office.process, office.firm.documentId, worker, options)
  raws.push(raw)
  return raw
}

const closedWith = async (raw: RawSocket, code: number) => {
  await until(() => raw.closed !== undefined, `closed with ${code}`)
  expect(raw.closed?.code).toBe(code)
}

const typeParagraph = (words: string) => (doc: Y.Doc) =>
  doc.getXmlFragment('page').insert(0, [paragraph(words)])

const paragraph = (words: string) => {
  const element = new Y.XmlElement('paragraph')
  element.insert(0, [new Y.XmlText(words)])
  return element
}

/** A document of its own with about so many bytes in it. */
const bulky = (bytes: number): Y.Doc => {
  const doc = new Y.Doc()
  doc.getMap('front').set('purpose', 'x'.repeat(bytes))
  return doc
}

/** What comes back for an upgrade that asks for this address, as sent. */
const knock = (address: string): Promise<string> =>
  new Promise((resolve, reject) => {
    const { port } = new URL(office.process.address)
    const socket = createConnection(Number(port), '127.0.0.1', () =>
      socket.write(`GET ${address} HTTP/1.1\r\nHost: x\r\nConnection: Upgrade\r\nUpgrade: websocket\r\n\r\n`),
    )
    let answer = ''
    socket.on('data', (bytes: Buffer) => (answer += bytes.toString()))
    socket.on('end', () => resolve(answer))
    socket.on('error', reject)
  })

describe('at the door', () => {
  test.each(['//', 'http://%', '/', '/elsewhere', '/collaboration/none'])(
    'an upgrade at %s is answered, the connection ended, and the server lives',
    async (address) => {
      expect(await knock(address)).toMatch(/^HTTP\/1.1 404 /)
    },
  )

  test('more sockets of one person on one sheet than there can be tabs, opened at the same moment', async () => {
    const asked = Array.from({ length: limits.socketsPerAccount + 5 }, () => connect(office.firm.ben))
    const all = await Promise.all(asked)
    const refused = all.filter((raw) => raw.closed?.code === closeCodes.tooMany)
    expect(refused).toHaveLength(5)
    for (const raw of all) raw.close()
    await until(() => all.every((raw) => raw.closed !== undefined), 'all are gone')
  })

  test('nobody signed in: refused, and told why', async () => {
    const raw = await connect(undefined)
    await closedWith(raw, closeCodes.notSignedIn)
    expect(raw.closed?.reason).toContain('Sign in')
  })

  test('somebody of no firm learns nothing of the sheet', async () => {
    const raw = await connect(office.firm.stranger)
    await closedWith(raw, closeCodes.notAllowed)
    expect(raw.frames).toHaveLength(0)
  })

  test('a page of another origin gets no socket', async () => {
    const raw = await connect(office.firm.ada, { origin: 'http://elsewhere.test' })
    expect(raw.closed).toBeDefined()
    expect(raw.frames).toHaveLength(0)
  })

  test('an older program is told to reload, before any content', async () => {
    const raw = await connect(office.firm.ada, { parameters: 'protocol=1&format=0&client=5' })
    await until(() => raw.closed !== undefined, 'closed')
    const other = await connect(office.firm.ada, { parameters: 'protocol=99&format=1&client=5' })
    await closedWith(other, closeCodes.reload)
    expect([...raw.frames, ...other.frames]).toHaveLength(0)
  })
})

describe('a reader', () => {
  test('who is up to date may answer with what everybody has; a change is refused and nothing is stored', async () => {
    const before = await headNow()
    const cleo = await connect(office.firm.cleo)
    cleo.send(syncFrame(syncSteps.state, Y.encodeStateAsUpdate(cleo.doc)))
    cleo.send(changeFrame(1, Y.encodeStateAsUpdate(cleo.doc)))
    await until(() => cleo.stored.includes(1), 'acknowledged')
    expect(cleo.closed).toBeUndefined()
    cleo.change(2, typeParagraph('I only read.'))
    await closedWith(cleo, closeCodes.notAllowed)
    expect(await headNow()).toBe(before)
  })

  test('gets no pen', async () => {
    const cleo = await office.open(office.firm.cleo)
    expect(cleo.mayWrite.value).toBe(false)
    expect(await cleo.pens.take(['g1'])).toBe(false)
    await cleo.close()
  })
})

describe('frames that no page of ours sends', () => {
  const rubbish: [string, Uint8Array | string][] = [
    ['random bytes', new Uint8Array([255, 254, 1, 2, 3, 250, 4])],
    ['an empty frame', new Uint8Array(0)],
    ['text', 'hello'],
    ['an update that is none', changeFrame(1, new Uint8Array([9, 9, 9, 9, 9, 9, 9]))],
    ['a state vector that is none', syncFrame(syncSteps.stateVector, new Uint8Array([200, 255, 255, 255]))],
    ['pens asked for in no shape', jsonFrame(messages.askPens, { request: 'x', act: 'steal', keys: [] })],
    ['presence that is no JSON', awarenessFrame(new Uint8Array([1, 5, 1, 3, 123, 123, 123]))],
    ['an unknown message', new Uint8Array([77, 0])],
  ]
  test.each(rubbish)('%s: closed with a reason, the sheet untouched', async (_name, frame) => {
    const before = await headNow()
    const ben = await connect(office.firm.ben)
    const ada = await connect(office.firm.ada)
    ada.send(frame)
    await closedWith(ada, closeCodes.unreadable)
    expect(ada.closed?.reason).not.toBe('')
    expect(await headNow()).toBe(before)
    ben.change(1, typeParagraph('still here'))
    await until(() => ben.stored.includes(1), 'a colleague goes on')
  })

  test('another part of the document than page, lines and front is refused', async () => {
    const ada = await connect(office.firm.ada)
    ada.change(1, (doc) => doc.getMap('hidden').set('a', 1))
    await closedWith(ada, closeCodes.unreadable)
  })

  test('a frame larger than the limit closes the socket; the sheet goes on', async () => {
    const before = await headNow()
    const ada = await connect(office.firm.ada)
    ada.send(new Uint8Array(limits.frameBytes + 1))
    await until(() => ada.closed !== undefined, 'closed')
    const ben = await connect(office.firm.ben)
    expect(ben.closed).toBeUndefined()
    expect(await headNow()).toBe(before)
  })

  test('too many frames at once', async () => {
    const ada = await connect(office.firm.ada)
    for (let index = 0; index < limits.framesAtOnce + 200; index++)
      ada.send(new Uint8Array([messages.queryAwareness]))
    await closedWith(ada, closeCodes.tooMany)
  })

  test('few frames of many bytes: more than a server could keep are not taken, nor from a reader', async () => {
    const cleo = await connect(office.firm.cleo)
    const large = syncFrame(syncSteps.state, Y.encodeStateAsUpdate(bulky(limits.frameBytes - 1000)))
    for (let sent = 0; sent <= limits.bytesAtOnce; sent += large.length) cleo.send(large)
    await until(() => cleo.closed !== undefined, 'closed')
    expect([closeCodes.tooMany, closeCodes.notAllowed]).toContain(cleo.closed?.code)
    const ada = await connect(office.firm.ada)
    const ignored = new Uint8Array(limits.frameBytes - 1000)
    ignored[0] = messages.queryAwareness
    for (let sent = 0; sent <= limits.bytesAtOnce; sent += ignored.length) ada.send(ignored)
    await closedWith(ada, closeCodes.tooMany)
  })

  test('the whole document asked for again and again', async () => {
    const cleo = await connect(office.firm.cleo)
    for (let index = 0; index < limits.statesAtOnce + 5; index++)
      cleo.send(syncFrame(syncSteps.stateVector, new Uint8Array([0])))
    await closedWith(cleo, closeCodes.tooMany)
    const answers = cleo.frames.filter((frame) => frame[0] === messages.sync && frame[1] === syncSteps.state)
    expect(answers.length).toBeLessThanOrEqual(limits.statesAtOnce + 1)
  })

  test.each([
    ['a zero character', 'line\u0000id'],
    ['more letters than an index takes', 'x'.repeat(5_000)],
  ])('a line under a name with %s: only its sender is closed, colleagues go on', async (_name, id) => {
    const ben = await connect(office.firm.ben)
    const ada = await connect(office.firm.ada)
    const before = await headNow()
    ada.change(1, (doc) => doc.getMap('lines').set(id, new Y.Map([['kind', 'given']])))
    await closedWith(ada, closeCodes.unreadable)
    expect(await headNow()).toBe(before)
    ben.change(1, typeParagraph('undisturbed'))
    await until(() => ben.stored.includes(1), 'a colleague goes on')
    expect(ben.closed).toBeUndefined()
  })

  test('an update that lacks what it builds on is not stored; the server asks for the whole', async () => {
    const ada = await connect(office.firm.ada)
    const before = await headNow()
    typeParagraph('lost on the way')(ada.doc)
    ada.change(2, typeParagraph('builds on it'))
    await until(
      () => ada.frames.some((frame) => frame[0] === messages.sync && frame[1] === syncSteps.stateVector),
      'asked',
    )
    expect(ada.stored).toEqual([])
    expect(await headNow()).toBe(before)
    ada.send(changeFrame(3, Y.encodeStateAsUpdate(ada.doc)))
    await until(() => ada.stored.includes(3), 'stored')
  })
})

describe('who writes', () => {
  test('nobody goes on under the client id of a colleague, nor of the server', async () => {
    const ada = await connect(office.firm.ada)
    ada.change(1, typeParagraph('by Ada'))
    await until(() => ada.stored.includes(1), 'stored')
    const before = await headNow()
    const ben = await connect(office.firm.ben)
    ben.doc.clientID = ada.doc.clientID
    ben.change(1, typeParagraph('as if by Ada'))
    await closedWith(ben, closeCodes.foreignClient)
    const again = await connect(office.firm.ben)
    again.doc.clientID = office.firm.serverClient
    again.change(1, typeParagraph('as if by the server'))
    await closedWith(again, closeCodes.foreignClient)
    expect(await headNow()).toBe(before)
  })

  test('a presence under another name gets the right one; a colleague’s presence is not for taking', async () => {
    const ada = await connect(office.firm.ada)
    const ben = await connect(office.firm.ben)
    const of = (doc: Y.Doc, state: Record<string, unknown>) => {
      const awareness = new Awareness(doc)
      awareness.setLocalState(state)
      const update = encodeAwarenessUpdate(awareness, [doc.clientID])
      awareness.destroy()
      return awarenessFrame(update)
    }
    ada.send(of(ada.doc, { user: { name: 'Mallory' }, where: { key: 'g1' }, anything: 1 }))
    const stamped = () => statesIn(ben.frames).find((state) => JSON.stringify(state).includes('g1'))
    await until(() => stamped() !== undefined, 'Ben hears')
    expect(stamped()).toEqual({
      where: { key: 'g1' },
      user: expect.objectContaining({ name: 'Ada Reyes', account: office.firm.ada.id }) as unknown,
    })
    const forged = new Y.Doc()
    forged.clientID = ada.doc.clientID
    ben.send(of(forged, { where: { key: 'stolen' } }))
    ben.send(of(ben.doc, { where: { key: 'd1' } }))
    await until(() => JSON.stringify(statesIn(ada.frames)).includes('d1'), 'Ada hears Ben')
    expect(JSON.stringify(statesIn(ada.frames))).not.toContain('stolen')
    ben.send(of(ben.doc, { where: { key: 'x'.repeat(limits.presenceBytes) } }))
    await closedWith(ben, closeCodes.unreadable)
  })
})

const statesIn = (frames: Uint8Array[]): unknown[] =>
  frames
    .filter((frame) => frame[0] === messages.awareness)
    .flatMap((frame) => {
      const outer = decoding.createDecoder(frame)
      decoding.readVarUint(outer)
      const decoder = decoding.createDecoder(decoding.readVarUint8Array(outer))
      return Array.from({ length: decoding.readVarUint(decoder) }, () => {
        decoding.readVarUint(decoder)
        decoding.readVarUint(decoder)
        return JSON.parse(decoding.readVarString(decoder)) as unknown
      })
    })
