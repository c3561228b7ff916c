import { In } from 'typeorm'
import { Firm } from '../entities'
import type { FirmTransaction, Transaction } from './transaction'

export const insertFirm = async (
  tx: FirmTransaction,
  firm: Pick<Firm, 'name' | 'timeZone' | 'numberPrefix'>,
): Promise<void> => {
  await tx.manager.insert(Firm, { id: tx.scope.firmId, ...firm })
}

export const readFirm = (tx: FirmTransaction): Promise<Firm> =>
  tx.manager.findOneByOrFail(Firm, { id: tx.scope.firmId })

/** Firms that the account of the scope is a member of: row-level security shows no others. */
export const findFirms = (tx: Transaction, ids: string[]): Promise<Firm[]> =>
  ids.length === 0 ? Promise.resolve([]) : tx.manager.findBy(Firm, { id: In(ids) })

/**
 * The next number of a calculation. The row stays locked to the end of the transaction, so that two who
 * begin at once get two numbers, and one who fails leaves no gap.
 */
export const takeNumber = async (tx: FirmTransaction): Promise<string> => {
  const [rows]: [{ prefix: string; number: number }[], number] = await tx.manager.query(
    `UPDATE firm SET last_number = last_number + 1 WHERE id = $1
     RETURNING number_prefix AS prefix, last_number AS number`,
    [tx.scope.firmId],
  )
  const row = rows[0]
  if (row === undefined) throw new Error('The firm of this scope is not there.')
  return `${row.prefix}-${String(row.number).padStart(4, '0')}`
}
