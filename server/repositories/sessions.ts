/** Signed-in sessions, kept by connect-pg-simple: here they are only looked for and ended. */
import type { Transaction } from './transaction'

/** @param begunAfter a session that was begun earlier, ms since 1970, counts no more */
export const sessionStands = async (
  tx: Transaction,
  sessionId: string,
  accountId: string,
  begunAfter: number,
): Promise<boolean> => {
  const rows: unknown[] = await tx.manager.query(
    `SELECT 1 FROM session WHERE sid = $1 AND sess -> 'passport' ->> 'user' = $2 AND expire >= now()
     AND coalesce((sess ->> 'startedAt')::float8, 'infinity') > $3`,
    [sessionId, accountId, begunAfter],
  )
  return rows.length > 0
}

/** Ends every session of an account, or all but one. */
export const endSessions = async (tx: Transaction, accountId: string, except?: string): Promise<void> => {
  await tx.manager.query(
    `DELETE FROM session WHERE sess -> 'passport' ->> 'user' = $1 AND ($2::text IS NULL OR sid <> $2)`,
    [accountId, except ?? null],
  )
}
