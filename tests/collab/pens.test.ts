import { afterAll, afterEach, beforeAll, expect, test } from 'vitest'
import type * as Y from 'yjs'
import { insertLine, moveLine, setField } from '@shared/sheet/edits'
import { lineSchema } from '@shared/sheet/kinds'
import { closeCodes } from '@shared/protocol'
import { inTransaction } from '@server/repositories/transaction'
import { isStored, openOffice, until, type Office } from './support/office'
import { rawSocket } from './support/rawSocket'
import { prose, type, valueOf, write } from './support/writing'
import type { SheetConnection } from '@/collaboration/sheetConnection'

let office: Office
const open: SheetConnection[] = []
beforeAll(async () => {
  office = await openOffice()
})
afterEach(() => Promise.all(open.splice(0).map((connection) => connection.close())))
afterAll(() => office.end())

const enter = async (worker: Office['firm']['ada']) => {
  const connection = await office.open(worker)
  open.push(connection)
  return connection
}

test('a pen is one person’s: granted, shown by initials, refused to the other, free after laying down', async () => {
  const ada = await enter(office.firm.ada)
  const ben = await enter(office.firm.ben)
  expect(await ada.pens.take(['g1'])).toBe(true)
  await until(() => ben.pens.holderOf('g1')?.initials === 'AR', 'Ben sees AR')
  expect(await ben.pens.take(['g1'])).toBe(false)
  expect(await ben.pens.take(['d1'])).toBe(true)
  ada.pens.release(['g1'])
  await until(() => ben.pens.holderOf('g1') === undefined, 'free')
  expect(await ben.pens.take(['g1'])).toBe(true)
  ben.pens.release(['g1', 'd1'])
  await until(() => ada.pens.holderOf('g1') === undefined, 'free again')
})

test('a pen laid down and taken again at once is taken', async () => {
  const ada = await enter(office.firm.ada)
  for (let round = 0; round < 15; round++) expect(await write(ada, 'g1', `${round}`)).toBe(true)
  await isStored(ada)
  expect(valueOf(ada, 'g1')).toBe('14')
  expect(ada.drafts.value).toHaveLength(0)
})

test('several pens: all or none', async () => {
  const ada = await enter(office.firm.ada)
  const ben = await enter(office.firm.ben)
  await ada.pens.take(['d1'])
  expect(await ben.pens.take(['g1', 'd1'])).toBe(false)
  expect(await ada.pens.take(['g1'])).toBe(true)
})

test('a pen is laid down when its page goes', async () => {
  const ada = await office.open(office.firm.ada)
  const ben = await enter(office.firm.ben)
  await ada.pens.take(['g1'])
  await until(() => ben.pens.holderOf('g1') !== undefined, 'Ben sees it')
  await ada.close()
  await until(() => ben.pens.holderOf('g1') === undefined, 'free')
  expect(await ben.pens.take(['g1'])).toBe(true)
})

test('a pen lapses a minute after the last key, and then its former holder’s change is refused', async () => {
  const ada = await rawSocket(office.process, office.firm.documentId, office.firm.ada)
  const ben = await enter(office.firm.ben)
  await inTransaction(office.firm.scope, ({ manager }) =>
    manager.query(
      `INSERT INTO pen (document_id, firm_id, line, holder, client_id, until)
       VALUES ($1, $2, 'g1', $3, $4, now() - interval '1 second')`,
      [office.firm.documentId, office.firm.firmId, office.firm.ada.id, ada.doc.clientID],
    ),
  )
  ada.change(1, (doc) => void (doc.getMap('lines').get('g1') as Y.Map<unknown>).set('value', '1'))
  await until(() => ada.closed !== undefined, 'closed')
  expect(ada.closed?.code).toBe(closeCodes.penOfAnother)
  expect(await ben.pens.take(['g1'])).toBe(true)
})

test('without its pen no field of a line and no front text is stored; a new line and a move need none', async () => {
  const ada = await rawSocket(office.process, office.firm.documentId, office.firm.ada)
  moveLine(ada.doc, 'g1', 'end')
  const ben = await enter(office.firm.ben)
  insertLine(
    ben.doc.value,
    lineSchema.parse({ id: 'n1', kind: 'given', symbol: 'L', value: '1', unit: 'm' }),
    'end',
  )
  moveLine(ben.doc.value, 'n1', { index: 0 })
  await until(() => ben.status.value.state === 'sending', 'sending')
  await isStored(ben)
  ada.close()
  const fresh = await rawSocket(office.process, office.firm.documentId, office.firm.ada)
  fresh.change(1, (doc) => doc.getMap('front').set('purpose', 'Another purpose'))
  await until(() => fresh.closed !== undefined, 'closed')
  expect(fresh.closed?.code).toBe(closeCodes.penOfAnother)
  const later = await enter(office.firm.cleo)
  expect(later.doc.value.getMap('front').get('purpose')).toBe('A shaft.')
  expect(later.doc.value.getMap('lines').has('n1')).toBe(true)
})

test('a change of a line whose pen is a colleague’s becomes a draft of mine; theirs stands, prose goes on', async () => {
  const ada = await enter(office.firm.ada)
  const ben = await enter(office.firm.ben)
  await ben.pens.take(['d1'])
  setField(ada.doc.value, 'd1', 'value', '99')
  await until(() => ada.drafts.value.length === 1, 'a draft')
  await isStored(ada)
  expect(valueOf(ada, 'd1')).toBe('40')
  expect(ada.drafts.value[0]?.fields).toEqual([{ key: 'd1', field: 'value', before: '40', mine: '99' }])
  setField(ben.doc.value, 'd1', 'value', '45')
  type(ada, ' Later.')
  await until(() => valueOf(ada, 'd1') === '45' && prose(ben).includes(' Later.'), 'both go on')
  ben.pens.release(['d1'])
  await until(() => ada.pens.holderOf('d1') === undefined, 'free')
  expect(await ada.drafts.value[0]?.send()).toBe(true)
  await until(() => valueOf(ben, 'd1') === '99', 'sent')
  expect(ada.drafts.value).toHaveLength(0)
})

test('undoing takes the pens it needs and skips a step whose line a colleague has changed since', async () => {
  const ada = await enter(office.firm.ada)
  const ben = await enter(office.firm.ben)
  const first = valueOf(ada, 'g1')
  await write(ada, 'g1', '11')
  await isStored(ada)
  expect(await ada.undo()).toBe('done')
  expect(valueOf(ada, 'g1')).toBe(first)
  expect(await ada.redo()).toBe('done')
  await until(() => valueOf(ben, 'g1') === '11', 'Ben sees 11')
  await until(() => ben.pens.holderOf('g1') === undefined, 'free')
  expect(await write(ben, 'g1', '12')).toBe(true)
  await until(() => valueOf(ada, 'g1') === '12', 'Ada sees 12')
  expect(await ada.undo()).toBe('skipped')
  expect(valueOf(ada, 'g1')).toBe('12')
})
