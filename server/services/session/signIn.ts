import { findForSignIn } from '@server/repositories/accounts'
import { recordEvent } from '@server/repositories/auditEvents'
import { inTransaction, systemScope } from '@server/repositories/transaction'
import type { Database } from '@server/repositories/transaction'
import { passwordFits } from './passwords'

/** The account's id when address and password belong together and the account is open; else null. */
export const checkCredentials = async (
  dataSource: Database,
  email: string,
  password: string,
): Promise<string | null> => {
  const scope = systemScope(dataSource)
  const account = await inTransaction(scope, (tx) => findForSignIn(tx, email.trim()))
  // Outside a transaction: hashing takes long, and would keep a connection of the pool meanwhile.
  const fits = await passwordFits(account?.passwordHash, password)
  const accepted = fits && account !== null && account.isActive
  await inTransaction(scope, (tx) =>
    recordEvent(tx, {
      action: accepted ? 'session.begin' : 'session.refuse',
      ...(account === null ? {} : { accountId: account.id, subjectId: account.id }),
    }),
  )
  return accepted ? account.id : null
}
