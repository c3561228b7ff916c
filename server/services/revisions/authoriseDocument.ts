import { may } from '@shared/review/permissions'
import { findDocument } from '@server/repositories/documents'
import { inTransaction } from '@server/repositories/transaction'
import type { Database, FirmScope } from '@server/repositories/transaction'
import { authoriseRevision } from '../authorise'
import { Refusal } from '../refusals'
import { currentScope, readIdentity } from '../session/identity'

export interface DocumentRights {
  scope: FirmScope
  mayWrite: boolean
}

/**
 * What a person may do with a live document, in whichever of their firms it is: a tab on one firm's sheet
 * goes on while another tab works in the other. Undefined where they may not open it or it is not there.
 */
export const authoriseDocument = async (
  dataSource: Database,
  accountId: string,
  documentId: string,
): Promise<DocumentRights | undefined> => {
  const identity = await readIdentity(dataSource, accountId)
  for (const { firm } of identity?.memberships ?? []) {
    const scope = identity && currentScope(dataSource, identity, firm.id)
    const rights = scope && (await rightsIn(scope, documentId))
    if (rights) return rights
  }
  return undefined
}

const rightsIn = (scope: FirmScope, documentId: string): Promise<DocumentRights | undefined> =>
  inTransaction(scope, async (tx) => {
    const document = await findDocument(tx, documentId)
    if (document === null || document.revisionId === null) return undefined
    try {
      const { standing } = await authoriseRevision(tx, document.revisionId, 'open')
      return { scope, mayWrite: document.writable && may('edit', standing).allowed }
    } catch (error) {
      if (error instanceof Refusal) return undefined
      throw error
    }
  })
