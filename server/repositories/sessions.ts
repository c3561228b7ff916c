/** Signed-in sessions, kept by connect-pg-simple: here they are only ended. */
import type { Transaction } from './transaction'

/** Ends every session of an account, or all but one. */
export const endSessions = async (tx: Transaction, accountId: string, except?: string): Promise<void> => {
  await tx.manager.query(
    `DELETE FROM session WHERE sess -> 'passport' ->> 'user' = $1 AND ($2::text IS NULL OR sid <> $2)`,
    [accountId, except ?? null],
  )
}
