/** Who is signed in, read anew for every request, so that a revoked right has its effect at once. */
import type { FirmRole } from '@shared/review/permissions'
import type { Account, Firm } from '@server/entities'
import { findAccount } from '@server/repositories/accounts'
import { findFirms } from '@server/repositories/firms'
import { ownMemberships } from '@server/repositories/memberships'
import { accountScope, firmScope, inTransaction } from '@server/repositories/transaction'
import type { Database, FirmScope } from '@server/repositories/transaction'

export interface Identity {
  account: Account
  /** Memberships in force, by name of the firm. */
  memberships: { firm: Firm; role: FirmRole }[]
}

/** Null where the account is gone or closed. */
export const readIdentity = (dataSource: Database, accountId: string): Promise<Identity | null> =>
  inTransaction(accountScope(dataSource, accountId), async (tx) => {
    const account = await findAccount(tx, accountId)
    if (account === null || !account.isActive) return null
    const memberships = await ownMemberships(tx)
    const firms = await findFirms(
      tx,
      memberships.map((membership) => membership.firmId),
    )
    return {
      account,
      memberships: memberships
        .flatMap(({ firmId, role }) => {
          const firm = firms.find((one) => one.id === firmId)
          return firm === undefined ? [] : [{ firm, role }]
        })
        .sort((left, right) => left.firm.name.localeCompare(right.firm.name)),
    }
  })

/**
 * The scope of the firm that the person works in: the chosen one while its membership is in force, or the
 * only one. Null: several, and none chosen.
 */
export const currentScope = (
  dataSource: Database,
  identity: Identity,
  chosenFirmId: string | undefined,
): FirmScope | null => {
  const { account, memberships } = identity
  const current =
    memberships.find(({ firm }) => firm.id === chosenFirmId) ??
    (memberships.length === 1 ? memberships[0] : undefined)
  if (current === undefined) return null
  return firmScope(dataSource, { firmId: current.firm.id, accountId: account.id, role: current.role })
}
