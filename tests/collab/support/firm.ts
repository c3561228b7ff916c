/** A firm with people and one sheet, written into a fresh database: what the socket tests stand on. */
import { randomUUID } from 'node:crypto'
import type { DataSource } from 'typeorm'
import * as Y from 'yjs'
import { insertUpdates, raiseHead } from '@server/repositories/documentUpdates'
import { firmScope, inTransaction, systemScope, type FirmScope } from '@server/repositories/transaction'
import type { Part } from '@shared/review/permissions'
import { encodeSheet } from '@shared/sheet/document'
import { FORMAT_VERSION, sheetSchema, type Sheet } from '@shared/sheet/sheet'

export interface Worker {
  id: string
  name: string
}

export interface TestFirm {
  scope: FirmScope
  firmId: string
  calculationId: string
  revisionId: string
  documentId: string
  /** The Yjs client of the first content, which the server wrote. */
  serverClient: number
  ada: Worker
  ben: Worker
  /** Reads only: checker of the sheet. */
  cleo: Worker
  /** Belongs to no firm. */
  stranger: Worker
}

/** Two givens and a paragraph: enough to edit, delete and move. */
export const smallSheet = (): Sheet =>
  sheetSchema.parse({
    front: { purpose: 'A shaft.', method: 'By hand.' },
    blocks: [
      { type: 'paragraph', content: [{ type: 'text', text: 'Opening words.' }] },
      { type: 'line', line: { id: 'g1', kind: 'given', symbol: 'G', value: '80', unit: 'GPa' } },
      { type: 'line', line: { id: 'd1', kind: 'given', symbol: 'd', value: '40', unit: 'mm' } },
    ],
  })

export const makeFirm = async (dataSource: DataSource, sheet: Sheet = smallSheet()): Promise<TestFirm> => {
  const worker = (name: string): Worker => ({ id: randomUUID(), name })
  const [ada, ben, cleo, stranger] = ['Ada Reyes', 'Ben Ito', 'Cleo Marsh', 'Sam Stranger'].map(worker) as [
    Worker,
    Worker,
    Worker,
    Worker,
  ]
  await inTransaction(systemScope(dataSource), async ({ manager }) => {
    for (const { id, name } of [ada, ben, cleo, stranger])
      await manager.query(`INSERT INTO account (id, email, name) VALUES ($1, $2, $3)`, [
        id,
        `${id}@firm.test`,
        name,
      ])
  })
  const [firmId, projectId, calculationId, revisionId, documentId] = Array.from({ length: 5 }, () =>
    randomUUID(),
  ) as [string, string, string, string, string]
  const bytes = Buffer.from(encodeSheet(sheet))
  const [serverClient = 0] = Y.parseUpdateMeta(bytes).to.keys()
  const scope = firmScope(dataSource, { firmId, accountId: ada.id, role: 'engineer' })
  await inTransaction(scope, async (tx) => {
    const { manager } = tx
    await manager.query(`INSERT INTO firm (id, name) VALUES ($1, 'Reyes & Ito')`, [firmId])
    for (const { id } of [ada, ben, cleo])
      await manager.query(
        `INSERT INTO membership (id, firm_id, account_id, role) VALUES ($1, $2, $3, 'engineer')`,
        [randomUUID(), firmId, id],
      )
    await manager.query(`INSERT INTO project (id, firm_id, number, name) VALUES ($1, $2, 'P1', 'Mill')`, [
      projectId,
      firmId,
    ])
    await manager.query(
      `INSERT INTO calculation (id, firm_id, project_id, number, title, created_by)
       VALUES ($1, $2, $3, 'TF-0001', 'Shaft', $4)`,
      [calculationId, firmId, projectId, ada.id],
    )
    await manager.query(
      `INSERT INTO revision (id, firm_id, calculation_id, letter, ordinal, created_by)
       VALUES ($1, $2, $3, 'A', 1, $4)`,
      [revisionId, firmId, calculationId, ada.id],
    )
    await manager.query(`INSERT INTO document (id, firm_id, revision_id, format) VALUES ($1, $2, $3, $4)`, [
      documentId,
      firmId,
      revisionId,
      FORMAT_VERSION,
    ])
    const parts: [Worker, Part][] = [
      [ada, 'preparer'],
      [ben, 'preparer'],
      [cleo, 'checker'],
    ]
    for (const [{ id }, part] of parts)
      await manager.query(
        `INSERT INTO participation (id, firm_id, calculation_id, account_id, part, appointed_by)
         VALUES ($1, $2, $3, $4, $5, $6)`,
        [randomUUID(), firmId, calculationId, id, part, ada.id],
      )
    await raiseHead(tx, documentId, 1, 1, bytes.length)
    await insertUpdates(tx, documentId, [{ head: 1, bytes, accountId: null, clientId: null }])
  })
  return { scope, firmId, calculationId, revisionId, documentId, serverClient, ada, ben, cleo, stranger }
}
