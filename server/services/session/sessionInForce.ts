import { sessionStands } from '@server/repositories/sessions'
import { inTransaction, systemScope } from '@server/repositories/transaction'
import type { Database } from '@server/repositories/transaction'

/** However much it is used, a session ends a week after signing in. */
export const LONGEST_SESSION_MS = 7 * 24 * 3_600_000

/** Whether a session that was there when a socket opened still is: not signed out of, ended or lapsed since. */
export const isSessionInForce = (
  dataSource: Database,
  { sessionId, accountId }: { sessionId: string; accountId: string },
): Promise<boolean> =>
  inTransaction(systemScope(dataSource), (tx) =>
    sessionStands(tx, sessionId, accountId, Date.now() - LONGEST_SESSION_MS),
  )
