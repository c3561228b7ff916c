/** One-time links. The database knows only the SHA-256 of what a link carries. */
import { Token } from '../entities'
import type { Transaction } from './transaction'

export const insertToken = async (
  tx: Transaction,
  token: Pick<Token, 'id' | 'hash' | 'purpose' | 'accountId' | 'firmId' | 'expiresAt'>,
): Promise<void> => {
  await tx.manager.insert(Token, token)
}

/** An unused link that has not lapsed, its row locked where it is to be used. */
export const findToken = (tx: Transaction, hash: Buffer, lock: boolean): Promise<Token | null> => {
  const query = tx.manager
    .createQueryBuilder(Token, 'token')
    .where('token.hash = :hash AND token.used_at IS NULL AND token.expires_at > now()', { hash })
  return (lock ? query.setLock('pessimistic_write') : query).getOne()
}

/** Spends every open link of an account: one use ends them all. */
export const spendTokens = async (tx: Transaction, accountId: string): Promise<void> => {
  await tx.manager.query('UPDATE token SET used_at = now() WHERE account_id = $1 AND used_at IS NULL', [
    accountId,
  ])
}

/** Whether another firm has ever sent this account a link. */
export const wasInvitedElsewhere = async (
  tx: Transaction,
  accountId: string,
  firmId: string,
): Promise<boolean> => {
  const rows: unknown[] = await tx.manager.query(
    'SELECT 1 FROM token WHERE account_id = $1 AND firm_id IS DISTINCT FROM $2 LIMIT 1',
    [accountId, firmId],
  )
  return rows.length > 0
}
