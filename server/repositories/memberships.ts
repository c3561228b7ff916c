import { Membership } from '../entities'
import type { AccountScope, FirmTransaction, Transaction } from './transaction'

/** The memberships of the account of the scope, in all firms, that are in force. */
export const ownMemberships = (tx: Transaction<AccountScope>): Promise<Membership[]> =>
  tx.manager.findBy(Membership, { accountId: tx.scope.accountId, isActive: true })

export const findMembership = (tx: FirmTransaction, accountId: string): Promise<Membership | null> =>
  tx.manager.findOneBy(Membership, { firmId: tx.scope.firmId, accountId })

export const firmMemberships = (tx: FirmTransaction): Promise<Membership[]> =>
  tx.manager.findBy(Membership, { firmId: tx.scope.firmId })

/** Administrators in force, their rows locked: who of two leaves last is decided here. */
export const lockAdministrators = (tx: FirmTransaction): Promise<Membership[]> =>
  tx.manager.find(Membership, {
    where: { firmId: tx.scope.firmId, role: 'administrator', isActive: true },
    order: { id: 'ASC' },
    lock: { mode: 'pessimistic_write' },
  })

export const insertMembership = async (
  tx: FirmTransaction,
  membership: Pick<Membership, 'id' | 'accountId' | 'role'>,
): Promise<void> => {
  await tx.manager.insert(Membership, { ...membership, firmId: tx.scope.firmId })
}

export const updateMembership = async (
  tx: FirmTransaction,
  accountId: string,
  change: Partial<Pick<Membership, 'role' | 'isActive'>>,
): Promise<void> => {
  await tx.manager.update(Membership, { firmId: tx.scope.firmId, accountId }, change)
}
