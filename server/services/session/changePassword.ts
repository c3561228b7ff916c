import { findAccount, findForSignIn, setPasswordHash } from '@server/repositories/accounts'
import { recordEvent } from '@server/repositories/auditEvents'
import { endSessions } from '@server/repositories/sessions'
import { spendTokens } from '@server/repositories/tokens'
import { inTransaction, systemScope } from '@server/repositories/transaction'
import type { Database } from '@server/repositories/transaction'
import { Refusal, notFound } from '../refusals'
import { hashPassword, passwordFits, refuseWeak } from './passwords'

/** Ends every other session of the account: whoever had the old password is out. */
export const changePassword = async (
  dataSource: Database,
  accountId: string,
  passwords: { current: string; next: string },
  keptSession: string,
): Promise<void> => {
  const scope = systemScope(dataSource)
  const account = await inTransaction(scope, async (tx) => {
    const found = await findAccount(tx, accountId)
    return found && findForSignIn(tx, found.email)
  })
  if (!account) throw notFound('account')
  if (!(await passwordFits(account.passwordHash, passwords.current)))
    throw new Refusal('sign-in-refused', 'The present password is not right.', [
      { path: 'current', message: 'The present password is not right.' },
    ])
  refuseWeak(passwords.next, account, 'next')
  const hash = await hashPassword(passwords.next)
  await inTransaction(scope, async (tx) => {
    await setPasswordHash(tx, accountId, hash)
    await spendTokens(tx, accountId)
    await endSessions(tx, accountId, keptSession)
    await recordEvent(tx, { action: 'account.change-password', subjectId: accountId, accountId })
  })
}
