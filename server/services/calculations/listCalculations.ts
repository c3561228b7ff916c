import type { CalculationFilter } from '@shared/api/calculations'
import { may } from '@shared/review/permissions'
import type { Account, Participation } from '@server/entities'
import { findAccounts } from '@server/repositories/accounts'
import { queryCalculations } from '@server/repositories/calculations'
import type { CalculationRow } from '@server/repositories/calculations'
import { currentParticipations } from '@server/repositories/participations'
import { inTransaction } from '@server/repositories/transaction'
import type { FirmScope, FirmTransaction } from '@server/repositories/transaction'

export interface ListedCalculation {
  row: CalculationRow
  participations: Participation[]
  accounts: Map<string, Account>
}

/** Whoever may not open a calculation without an invitation sees in the list those with one. */
export const listCalculations = (scope: FirmScope, filter: CalculationFilter): Promise<ListedCalculation[]> =>
  inTransaction(scope, (tx) => {
    const seesAll = may('open', { role: scope.role, parts: [], state: 'preparing' }).allowed
    const participant = filter.mine === 'true' || !seesAll ? scope.accountId : undefined
    return readListed(tx, {
      project: filter.project,
      state: filter.state,
      search: filter.search,
      participant,
    })
  })

export const readListed = async (
  tx: FirmTransaction,
  query: Parameters<typeof queryCalculations>[1],
): Promise<ListedCalculation[]> => {
  const rows = await queryCalculations(tx, query)
  const participations = await currentParticipations(
    tx,
    rows.map((row) => row.id),
  )
  const accounts = await accountsById(
    tx,
    participations.map((one) => one.accountId),
  )
  return rows.map((row) => ({
    row,
    participations: participations.filter((one) => one.calculationId === row.id),
    accounts,
  }))
}

export const accountsById = async (tx: FirmTransaction, ids: string[]): Promise<Map<string, Account>> =>
  new Map((await findAccounts(tx, [...new Set(ids)])).map((account) => [account.id, account]))
