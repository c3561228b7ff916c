import { afterAll, beforeAll, describe, expect, test } from 'vitest'
import { insertLine, removeLine } from '@shared/sheet/edits'
import { lineSchema } from '@shared/sheet/kinds'
import { readContributions } from '@server/repositories/contributions'
import { readDocument } from '@server/repositories/documentUpdates'
import { inTransaction } from '@server/repositories/transaction'
import { isStored, openOffice, until, type Office } from './support/office'
import { prose, type, valueOf, write } from './support/writing'

let office: Office
beforeAll(async () => {
  office = await openOffice()
})
afterAll(() => office.end())

const headNow = async () =>
  (await inTransaction(office.firm.scope, (tx) => readDocument(tx, office.firm.documentId)))?.head ?? -1

describe('two people in one sheet', () => {
  test('opening, standing somewhere and leaving writes nothing', async () => {
    const before = await headNow()
    const ada = await office.open(office.firm.ada)
    ada.standAt({ key: 'g1', field: 'value' })
    await ada.pens.take(['g1'])
    ada.pens.release(['g1'])
    await ada.close()
    expect(await headNow()).toBe(before)
  })

  test('what one writes, the other sees, and it is stored before it is said to be', async () => {
    const ada = await office.open(office.firm.ada)
    const ben = await office.open(office.firm.ben)
    expect(await write(ada, 'g1', '79')).toBe(true)
    expect(ada.status.value.state).toBe('sending')
    await isStored(ada)
    await until(() => valueOf(ben, 'g1') === '79', 'Ben sees 79')
    type(ben, ' And more.')
    type(ada, ' From Ada.')
    await Promise.all([isStored(ada), isStored(ben)])
    await until(() => prose(ada) === prose(ben), 'the prose is the same')
    expect(prose(ada)).toContain(' And more.')
    expect(prose(ada)).toContain(' From Ada.')
    await ada.close()
    await ben.close()
    const later = await office.open(office.firm.ben)
    expect(valueOf(later, 'g1')).toBe('79')
    expect(prose(later)).toContain(' From Ada.')
    await later.close()
  })

  test('a deletion alone is acknowledged, too', async () => {
    const ada = await office.open(office.firm.ada)
    const before = await headNow()
    removeLine(ada.doc.value, 'd1')
    await until(() => ada.status.value.state === 'sending', 'sending')
    await isStored(ada)
    expect(await headNow()).toBe(before + 1)
    await ada.close()
  })

  test('the edit record names person, line, field, before and after', async () => {
    const ada = await office.open(office.firm.ada)
    const ben = await office.open(office.firm.ben)
    await write(ada, 'g1', '77')
    await isStored(ada)
    const line = lineSchema.parse({ id: 'f1', kind: 'formula', symbol: 'T', expression: '2 N m' })
    insertLine(ben.doc.value, line, 'end')
    type(ben, ' Recorded.')
    await until(() => ben.status.value.state === 'sending', 'sending')
    await isStored(ben)
    const record = await inTransaction(office.firm.scope, (tx) =>
      readContributions(tx, office.firm.documentId),
    )
    expect(record.filter((entry) => entry.subjectId === 'g1').at(-1)).toMatchObject({
      accountId: office.firm.ada.id,
      subject: 'line',
      field: 'value',
      before: '"79"',
      after: '"77"',
    })
    const added = record.filter((entry) => entry.subjectId === 'f1')
    expect(added).toHaveLength(1)
    expect(added[0]).toMatchObject({ accountId: office.firm.ben.id, field: '', before: null })
    expect(JSON.parse(added[0]?.after ?? '{}')).toMatchObject({ kind: 'formula', expression: '2 N m' })
    expect(record.at(-1)).toMatchObject({
      accountId: office.firm.ben.id,
      subject: 'block',
      subjectId: 'opening',
      before: null,
      after: '" Recorded."',
    })
    await ada.close()
    await ben.close()
  })

  test('each sees who else is here, by the name the server knows', async () => {
    const ada = await office.open(office.firm.ada)
    const ben = await office.open(office.firm.ben)
    ada.awareness.value.setLocalStateField('user', { name: 'Somebody Else', account: 'x' })
    ada.standAt({ key: 'g1' })
    await until(() => ben.people.value.some((one) => one.where?.key === 'g1'), 'Ben sees Ada at g1')
    const seen = ben.people.value.find((one) => one.where?.key === 'g1')
    expect(seen).toMatchObject({ name: 'Ada Reyes', initials: 'AR', account: office.firm.ada.id })
    await ada.close()
    await until(() => !ben.people.value.some((one) => one.name === 'Ada Reyes'), 'Ada has left')
    await ben.close()
  })
})
