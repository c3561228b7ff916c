import { randomUUID } from 'node:crypto'
import { afterAll, beforeAll, describe, expect, test } from 'vitest'
import * as Y from 'yjs'
import { closeCodes } from '@shared/protocol'
import { isStored, openOffice, startProcess, until, type Office, type Process } from './support/office'
import { rawSocket } from './support/rawSocket'
import { prose, type, valueOf, write } from './support/writing'

let office: Office
let other: Process
beforeAll(async () => {
  office = await openOffice()
  other = await startProcess(office.database.appUrl)
})
afterAll(async () => {
  await other.stop()
  await office.end()
})

describe('two processes on one database', () => {
  test('edits cross, pens hold in both, and both end with the same sheet', async () => {
    const ada = await office.open(office.firm.ada)
    const ben = await office.open(office.firm.ben, { process: other })
    for (let round = 0; round < 25; round++) {
      type(ada, `a${round} `)
      type(ben, `b${round} `)
      if (round % 5 === 0) {
        const writer = round % 2 === 0 ? ada : ben
        await until(() => write(writer, 'g1', `${round}`), 'the pen')
      }
    }
    await Promise.all([isStored(ada), isStored(ben)])
    await until(() => prose(ada) === prose(ben) && valueOf(ada, 'g1') === valueOf(ben, 'g1'), 'the same')
    for (let round = 0; round < 25; round++) {
      expect(prose(ada)).toContain(`a${round} `)
      expect(prose(ada)).toContain(`b${round} `)
    }
    expect(await ada.pens.take(['d1'])).toBe(true)
    await until(() => ben.pens.holderOf('d1')?.initials === 'AR', 'Ben sees AR from the other process')
    expect(await ben.pens.take(['d1'])).toBe(false)
    await ada.close()
    await ben.close()
  })

  test('who takes a pen sees what was written in its line by another process before', async () => {
    const ada = await office.open(office.firm.ada)
    const ben = await office.open(office.firm.ben, { process: other })
    for (let round = 0; round < 10; round++) {
      await until(() => write(ada, 'g1', `x${round}`), 'the pen of Ada')
      await until(() => ben.pens.take(['g1']), 'the pen of Ben')
      expect(valueOf(ben, 'g1')).toBe(`x${round}`)
      ben.pens.release(['g1'])
    }
    await ada.close()
    await ben.close()
  })

  test('a listening connection that dies without a word heals, and what was missed is read', async () => {
    const ada = await office.open(office.firm.ada)
    const ben = await office.open(office.firm.ben, { process: other })
    await other.dataSource.query(
      `SELECT pg_terminate_backend(pid) FROM pg_stat_activity
       WHERE application_name = 'torfolio listen' AND datname = current_database() AND usename = current_user`,
    )
    type(ada, ' while nobody listens')
    await until(() => prose(ben).includes('while nobody listens'), 'Ben hears of it')
    type(ben, ' and back')
    await until(() => prose(ada).includes('and back'), 'Ada hears of it')
    await ada.close()
    await ben.close()
  })

  test('one of them stops in good order: what it acknowledged is there, and nobody has to wait for it', async () => {
    const third = await startProcess(office.database.appUrl)
    const raw = await rawSocket(third, office.firm.documentId, office.firm.ada)
    for (let number = 1; number <= 40; number++)
      raw.change(number, (doc) => {
        const paragraph = new Y.XmlElement('paragraph')
        paragraph.insert(0, [new Y.XmlText(`change-${number}.`)])
        doc.getXmlFragment('page').push([paragraph])
      })
    await until(() => raw.stored.length > 0, 'the first acknowledgement')
    await third.stop()
    await until(() => raw.closed !== undefined, 'closed')
    const ben = await office.open(office.firm.ben)
    const page = ben.doc.value.getXmlFragment('page').toString()
    for (const number of raw.stored) expect(page).toContain(`change-${number}.`)
    await ben.close()
    raw.close()
  })
})

describe('loading', () => {
  test('what cannot be loaded is not served, and nothing is stored from it', async () => {
    const { dataSource } = office.process
    const documentId = randomUUID()
    const { inTransaction } = await import('@server/repositories/transaction')
    const { insertUpdates, raiseHead } = await import('@server/repositories/documentUpdates')
    await inTransaction(office.firm.scope, async (tx) => {
      const revisionId = randomUUID()
      await tx.manager.query(
        `INSERT INTO revision (id, firm_id, calculation_id, letter, ordinal, created_by)
         VALUES ($1, $2, $3, 'B', 2, $4)`,
        [revisionId, office.firm.firmId, office.firm.calculationId, office.firm.ada.id],
      )
      await tx.manager.query(
        `INSERT INTO document (id, firm_id, revision_id, format) VALUES ($1, $2, $3, 1)`,
        [documentId, office.firm.firmId, revisionId],
      )
      await raiseHead(tx, documentId, 1, 3, 10)
      await insertUpdates(tx, documentId, [
        { head: 3, bytes: Buffer.from([0, 0]), accountId: null, clientId: null },
      ])
    })
    const raw = await rawSocket(office.process, documentId, office.firm.ada)
    await until(() => raw.closed !== undefined, 'closed')
    expect(raw.closed?.code).toBe(closeCodes.tryAgain)
    expect(raw.frames).toHaveLength(0)
    const [row] = await inTransaction(office.firm.scope, ({ manager }): Promise<{ head: number }[]> =>
      manager.query('SELECT head FROM document WHERE id = $1', [documentId]),
    )
    expect(row?.head).toBe(3)
    expect(dataSource.isInitialized).toBe(true)
  })
})
