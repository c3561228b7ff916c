import { afterAll, afterEach, beforeAll, expect, test } from 'vitest'
import { setField } from '@shared/sheet/edits'
import { MemoryDeviceStore } from '@/collaboration/deviceStore'
import { connectSheet, type SheetConnection } from '@/collaboration/sheetConnection'
import { isStored, openOffice, socketOf, until, type Office } from './support/office'
import { openProxy, type Proxy } from './support/proxy'
import { prose, type, valueOf, write } from './support/writing'

let office: Office
let proxy: Proxy
let port: number
const open: SheetConnection[] = []
beforeAll(async () => {
  office = await openOffice()
  port = Number(new URL(office.process.address).port)
  proxy = await openProxy(port)
})
afterEach(async () => {
  proxy.lead(port)
  await Promise.all(open.splice(0).map((connection) => connection.close()))
})
afterAll(async () => {
  await proxy.close()
  await office.end()
})

/** Ada, behind a network that can be lost. */
const openAda = async (store = new MemoryDeviceStore()): Promise<SheetConnection> => {
  const ada = connectSheet(
    { documentId: office.firm.documentId, person: office.firm.ada },
    { address: proxy.address, store, WebSocket: socketOf(office.firm.ada), maxBackoffMs: 100 },
  )
  open.push(ada)
  await isStored(ada)
  return ada
}
const openBen = async (): Promise<SheetConnection> => {
  const ben = await office.open(office.firm.ben)
  open.push(ben)
  return ben
}
const loseNetwork = async (connection: SheetConnection) => {
  proxy.lead(undefined)
  proxy.cut()
  await until(() => connection.status.value.state === 'offline', 'offline')
}
const comeBack = async (connection: SheetConnection) => {
  proxy.lead(port)
  await until(() => connection.status.value.state === 'stored', 'back')
}

test('a laptop closed for a day: prose typed offline arrives once, the colleague’s work stands, lines were closed', async () => {
  const ada = await openAda()
  const ben = await openBen()
  const before = ada.doc.value
  await loseNetwork(ada)
  expect(ada.linesOpen.value).toBe(false)
  expect(await ada.pens.take(['g1'])).toBe(false)
  type(ada, ' Typed on the train.')
  for (let round = 0; round < 5; round++) {
    type(ben, ` Day ${round}.`)
    await write(ben, 'g1', `8${round}`)
  }
  await isStored(ben)
  await comeBack(ada)
  expect(ada.doc.value).not.toBe(before)
  expect(valueOf(ada, 'g1')).toBe('84')
  await until(() => prose(ben).includes('Typed on the train.'), 'Ben sees it')
  expect(prose(ada)).toBe(prose(ben))
  expect(prose(ben).split('Typed on the train.')).toHaveLength(2)
  for (let round = 0; round < 5; round++) expect(prose(ada)).toContain(`Day ${round}.`)
  expect(ada.drafts.value).toHaveLength(0)
})

test('with nothing unsent the same document goes on', async () => {
  const ada = await openAda()
  const ben = await openBen()
  const before = ada.doc.value
  await loseNetwork(ada)
  type(ben, ' Meanwhile.')
  await isStored(ben)
  await comeBack(ada)
  expect(ada.doc.value).toBe(before)
  await until(() => prose(ada).includes('Meanwhile.'), 'caught up')
})

test('what stands in an open field when the connection goes becomes a draft of mine', async () => {
  const ada = await openAda()
  await ada.pens.take(['d1'])
  ada.holdField({ key: 'd1', field: 'value', before: '40', value: '42' })
  await loseNetwork(ada)
  await until(() => ada.drafts.value.length === 1, 'a draft')
  expect(ada.drafts.value[0]?.fields).toEqual([{ key: 'd1', field: 'value', before: '40', mine: '42' }])
  await comeBack(ada)
  await until(() => ada.pens.holderOf('d1') === undefined, 'the pen is free')
  expect(await ada.drafts.value[0]?.send()).toBe(true)
  expect(valueOf(ada, 'd1')).toBe('42')
})

test('a field that was written and not sent: merged where nobody else changed the line, a draft where somebody did', async () => {
  const ada = await openAda()
  const ben = await openBen()
  await loseNetwork(ada)
  // As when the connection goes in the moment between the key and the sending.
  setField(ada.doc.value, 'g1', 'value', '101')
  setField(ada.doc.value, 'd1', 'value', '51')
  await until(() => write(ben, 'd1', '77'), 'Ben writes')
  await isStored(ben)
  await comeBack(ada)
  await until(() => valueOf(ben, 'g1') === '101', 'Ben sees 101')
  expect(valueOf(ada, 'd1')).toBe('77')
  expect(valueOf(ben, 'd1')).toBe('77')
  expect(ada.drafts.value).toHaveLength(1)
  expect(ada.drafts.value[0]?.fields).toEqual([
    expect.objectContaining({ key: 'd1', field: 'value', mine: '51' }),
  ])
  await ada.drafts.value[0]?.drop()
  expect(ada.drafts.value).toHaveLength(0)
})

test('a page that was closed offline leaves what it had typed on the device; the next one sends it', async () => {
  const store = new MemoryDeviceStore()
  const ada = await openAda(store)
  await loseNetwork(ada)
  type(ada, ' Left behind.')
  open.splice(open.indexOf(ada), 1)
  await ada.close()
  proxy.lead(port)
  const later = await openAda(store)
  await until(() => prose(later).includes('Left behind.'), 'taken in')
  await isStored(later)
  const ben = await openBen()
  expect(prose(ben)).toContain('Left behind.')
  const another = await openAda(store)
  expect(prose(another).split('Left behind.')).toHaveLength(2)
})

test('a tab that was open while the server restarted goes on without a reload', async () => {
  const ada = await openAda()
  proxy.cut()
  type(ada, ' Through the restart.')
  await until(() => ada.status.value.state !== 'stored', 'noticed')
  await until(() => ada.status.value.state === 'stored', 'back')
  const ben = await openBen()
  expect(prose(ben).split('Through the restart.')).toHaveLength(2)
})
