/** The document of a revision, as its title block and its opening need it; updates are in documentUpdates. */
import { Document } from '../entities'
import type { FirmTransaction } from './transaction'

export const documentOfRevision = (tx: FirmTransaction, revisionId: string): Promise<Document | null> =>
  tx.manager.findOneBy(Document, { firmId: tx.scope.firmId, revisionId })

export const findDocument = (tx: FirmTransaction, id: string): Promise<Document | null> =>
  tx.manager.findOneBy(Document, { firmId: tx.scope.firmId, id })

/** Documents of a calculation's revisions: those whose sockets must be told when its people change. */
export const documentIdsOf = async (tx: FirmTransaction, calculationId: string): Promise<string[]> => {
  const rows: { id: string }[] = await tx.manager.query(
    `SELECT document.id FROM document JOIN revision ON revision.id = document.revision_id
     WHERE revision.calculation_id = $1 AND document.firm_id = $2`,
    [calculationId, tx.scope.firmId],
  )
  return rows.map((row) => row.id)
}

export const insertDocument = async (
  tx: FirmTransaction,
  document: Pick<Document, 'id' | 'revisionId' | 'format'>,
): Promise<void> => {
  await tx.manager.insert(Document, { ...document, firmId: tx.scope.firmId })
}
