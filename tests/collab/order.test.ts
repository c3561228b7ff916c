import { afterAll, afterEach, beforeAll, expect, test } from 'vitest'
import * as Y from 'yjs'
import { closeCodes } from '@shared/protocol'
import { readContributions } from '@server/repositories/contributions'
import { readDocument, readState, updatesAfter } from '@server/repositories/documentUpdates'
import { inTransaction } from '@server/repositories/transaction'
import { isStored, openOffice, until, type Office } from './support/office'
import { rawSocket } from './support/rawSocket'
import { prose, type, valueOf, write } from './support/writing'

let office: Office
beforeAll(async () => {
  office = await openOffice()
})
afterAll(() => office.end())

/** As submitting and returning do: on the locked row. */
const setWritable = (isWritable: boolean) =>
  inTransaction(office.firm.scope, ({ manager }) =>
    manager.query(`UPDATE document SET writable = $2, epoch = epoch + 1 WHERE id = $1`, [
      office.firm.documentId,
      isWritable,
    ]),
  )
const row = async () => {
  const read = await inTransaction(office.firm.scope, (tx) => readDocument(tx, office.firm.documentId))
  if (read === undefined) throw new Error('no document')
  return read
}
afterEach(() => setWritable(true))

test('what comes after the sheet was closed to edits is not stored, and becomes a draft of its author', async () => {
  const ada = await office.open(office.firm.ada)
  await write(ada, 'g1', '81')
  await isStored(ada)
  await setWritable(false)
  const { head } = await row()
  type(ada, ' Too late.')
  await until(() => ada.drafts.value.length === 1, 'a draft')
  await until(() => ada.status.value.state === 'stored' && !ada.mayWrite.value, 'loaded anew, for reading')
  expect((await row()).head).toBe(head)
  expect(ada.drafts.value[0]?.text).toContain('Too late.')
  expect(prose(ada)).not.toContain('Too late.')
  await ada.close()
})

test('of a change and a closing at the same moment, one is first: the head that was closed at has it or never gets it', async () => {
  for (let round = 0; round < 10; round++) {
    const raw = await rawSocket(office.process, office.firm.documentId, office.firm.ada)
    raw.change(1, (doc) => {
      const paragraph = new Y.XmlElement('paragraph')
      paragraph.insert(0, [new Y.XmlText(`round ${round}`)])
      doc.getXmlFragment('page').push([paragraph])
    })
    await setWritable(false)
    const { head } = await row()
    await until(() => raw.stored.includes(1) || raw.closed !== undefined, 'decided')
    await new Promise((resolve) => setTimeout(resolve, 20))
    expect((await row()).head).toBe(head)
    if (!raw.stored.includes(1)) expect(raw.closed?.code).toBe(closeCodes.olderEpoch)
    raw.close()
    await setWritable(true)
  }
})

test('a page that was open before the sheet was closed and opened again keeps what it has not sent as a draft', async () => {
  const ada = await office.open(office.firm.ada)
  await setWritable(false)
  await setWritable(true)
  expect(await ada.pens.take(['g1'])).toBe(false)
  type(ada, ' Older epoch.')
  await until(() => ada.drafts.value.length === 1, 'a draft')
  await until(() => ada.status.value.state === 'stored' && ada.mayWrite.value, 'loaded anew')
  expect(prose(ada)).not.toContain('Older epoch.')
  type(ada, ' Newer epoch.')
  await until(() => ada.status.value.state === 'sending', 'sending')
  await isStored(ada)
  expect(prose(ada)).toContain('Newer epoch.')
  await ada.close()
})

test('numbers are without gaps, each update has its sender, and merging keeps the edit record', async () => {
  const ada = await office.open(office.firm.ada)
  await ada.pens.take(['d1'])
  // Steps that wait meanwhile are sent as one: so on until the sheet has more than merging asks for.
  let last = ''
  for (let value = 0; value < 330 || (await row()).head < 310; value++) {
    last = String(value)
    const line = ada.doc.value.getMap('lines').get('d1')
    if (line instanceof Y.Map) ada.doc.value.transact(() => line.set('value', last), ada.origin)
    await new Promise((resolve) => setTimeout(resolve, 9))
  }
  await isStored(ada)
  const { head } = await row()
  await until(
    async () =>
      ((await inTransaction(office.firm.scope, (tx) => readState(tx, office.firm.documentId)))?.head ?? 0) >
      0,
    'merged',
  )
  const [updates, record] = await inTransaction(office.firm.scope, async (tx) => [
    await updatesAfter(tx, office.firm.documentId, 0, head),
    await readContributions(tx, office.firm.documentId, 'd1'),
  ])
  expect(updates.map((update) => update.head)).toEqual(Array.from({ length: head }, (_, index) => index + 1))
  expect(record.length).toBeGreaterThan(250)
  for (const [index, entry] of record.entries())
    if (index > 0) expect(entry.before).toBe(record[index - 1]?.after)
  await ada.close()
  const ben = await office.open(office.firm.ben)
  expect(valueOf(ben, 'd1')).toBe(last)
  await ben.close()
}, 60_000)
