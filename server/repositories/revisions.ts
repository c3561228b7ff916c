import { Revision } from '../entities'
import type { FirmTransaction } from './transaction'

export const findRevision = (tx: FirmTransaction, id: string): Promise<Revision | null> =>
  tx.manager.findOneBy(Revision, { firmId: tx.scope.firmId, id })

/** Latest first. */
export const revisionsOf = (tx: FirmTransaction, calculationId: string): Promise<Revision[]> =>
  tx.manager.find(Revision, {
    where: { firmId: tx.scope.firmId, calculationId },
    order: { ordinal: 'DESC' },
  })

export const latestRevision = (tx: FirmTransaction, calculationId: string): Promise<Revision | null> =>
  tx.manager.findOne(Revision, {
    where: { firmId: tx.scope.firmId, calculationId },
    order: { ordinal: 'DESC' },
  })

export const insertRevision = async (
  tx: FirmTransaction,
  revision: Pick<Revision, 'id' | 'calculationId' | 'letter' | 'ordinal' | 'reason'>,
): Promise<void> => {
  await tx.manager.insert(Revision, {
    ...revision,
    firmId: tx.scope.firmId,
    createdBy: tx.scope.accountId,
  })
}
