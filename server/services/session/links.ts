/** One-time links by which a person sets the first password. */
import { createHash, randomBytes, randomUUID } from 'node:crypto'
import { findAccount, hasPassword, setPasswordHash } from '@server/repositories/accounts'
import { recordEvent } from '@server/repositories/auditEvents'
import { readFirm } from '@server/repositories/firms'
import { endSessions } from '@server/repositories/sessions'
import { findToken, insertToken, spendTokens } from '@server/repositories/tokens'
import { firmScope, inTransaction, systemScope } from '@server/repositories/transaction'
import type { Database, FirmTransaction, Transaction } from '@server/repositories/transaction'
import type { Account, Token } from '@server/entities'
import { Refusal } from '../refusals'
import { hashPassword, refuseWeak } from './passwords'

const LINK_DAYS = 7

export interface IssuedLink {
  /** To be put after the address of the program; shown once, kept nowhere. */
  path: string
  expiresAt: Date
}

const digest = (token: string): Buffer => createHash('sha256').update(token).digest()
const expired = (): Refusal =>
  new Refusal(
    'link-expired',
    'This link was used already, or is too old. Ask your administrator for a new one.',
  )

/** A new link for an account, in place of all earlier ones. */
export const issueLink = async (tx: FirmTransaction, accountId: string): Promise<IssuedLink> => {
  const token = randomBytes(32).toString('base64url')
  const expiresAt = new Date(Date.now() + LINK_DAYS * 24 * 3_600_000)
  await spendTokens(tx, accountId)
  await insertToken(tx, {
    id: randomUUID(),
    hash: digest(token),
    purpose: 'password',
    accountId,
    firmId: tx.scope.firmId,
    expiresAt,
  })
  // After #, which browsers keep to themselves: no log of a server or proxy ever holds the secret.
  return { path: `/set-password#${token}`, expiresAt }
}

const openLink = async (tx: Transaction, token: string, lock: boolean): Promise<[Token, Account]> => {
  const found = await findToken(tx, digest(token), lock)
  const account = found && (await findAccount(tx, found.accountId))
  if (!found || !account?.isActive) throw expired()
  return [found, account]
}

/** For whom a link is; using it is another act, so that a preview of the address spends nothing. */
export const lookUpLink = async (
  dataSource: Database,
  token: string,
): Promise<{ name: string; email: string; firm: string | null; expiresAt: Date }> => {
  const [found, account] = await inTransaction(systemScope(dataSource), (tx) => openLink(tx, token, false))
  const { firmId } = found
  const firm =
    firmId === null
      ? null
      : await inTransaction(
          firmScope(dataSource, { firmId, accountId: account.id, role: 'observer' }),
          readFirm,
        )
  return { name: account.name, email: account.email, firm: firm?.name ?? null, expiresAt: found.expiresAt }
}

export const setPasswordByLink = async (
  dataSource: Database,
  token: string,
  password: string,
): Promise<void> => {
  const scope = systemScope(dataSource)
  const [, account] = await inTransaction(scope, (tx) => openLink(tx, token, false))
  refuseWeak(password, account, 'password')
  const hash = await hashPassword(password)
  await inTransaction(scope, async (tx) => {
    // Asked again under lock: of two who use one link at once, one is too late.
    await openLink(tx, token, true)
    if ((await hasPassword(tx, [account.id])).has(account.id)) throw expired()
    await setPasswordHash(tx, account.id, hash)
    await spendTokens(tx, account.id)
    await endSessions(tx, account.id)
    await recordEvent(tx, { action: 'account.set-password', subjectId: account.id, accountId: account.id })
  })
}
