/** The document of a revision, as its title block and its opening need it; updates are in documentUpdates. */
import { Document } from '../entities'
import type { FirmTransaction } from './transaction'

export const documentOfRevision = (tx: FirmTransaction, revisionId: string): Promise<Document | null> =>
  tx.manager.findOneBy(Document, { firmId: tx.scope.firmId, revisionId })

export const findDocument = (tx: FirmTransaction, id: string): Promise<Document | null> =>
  tx.manager.findOneBy(Document, { firmId: tx.scope.firmId, id })

export const insertDocument = async (
  tx: FirmTransaction,
  document: Pick<Document, 'id' | 'revisionId' | 'format'>,
): Promise<void> => {
  await tx.manager.insert(Document, { ...document, firmId: tx.scope.firmId })
}
