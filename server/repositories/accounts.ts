/** People who can sign in. They belong to no firm: callers say why they may ask. */
import { In } from 'typeorm'
import { Account } from '../entities'
import type { Transaction } from './transaction'

export const findAccount = (tx: Transaction, id: string): Promise<Account | null> =>
  tx.manager.findOneBy(Account, { id })

export const findAccountByEmail = (tx: Transaction, email: string): Promise<Account | null> =>
  tx.manager.findOneBy(Account, { email: email.toLowerCase() })

/** The account with what a password is compared with; for signing in only. */
export const findForSignIn = (tx: Transaction, email: string): Promise<Account | null> =>
  tx.manager
    .createQueryBuilder(Account, 'account')
    .addSelect('account.passwordHash')
    .where('account.email = :email', { email: email.toLowerCase() })
    .getOne()

export const hasPassword = async (tx: Transaction, ids: string[]): Promise<Set<string>> => {
  const rows: { id: string }[] = await tx.manager.query(
    'SELECT id FROM account WHERE id = ANY($1) AND password_hash IS NOT NULL',
    [ids],
  )
  return new Set(rows.map((row) => row.id))
}

export const findAccounts = (tx: Transaction, ids: string[]): Promise<Account[]> =>
  ids.length === 0 ? Promise.resolve([]) : tx.manager.findBy(Account, { id: In(ids) })

export const insertAccount = async (
  tx: Transaction,
  account: Pick<Account, 'id' | 'email' | 'name' | 'passwordHash' | 'isDemo'>,
): Promise<void> => {
  await tx.manager.insert(Account, {
    ...account,
    email: account.email.toLowerCase(),
    passwordChangedAt: account.passwordHash === null ? null : new Date(),
  })
}

export const setPasswordHash = async (tx: Transaction, id: string, passwordHash: string): Promise<void> => {
  await tx.manager.update(Account, { id }, { passwordHash, passwordChangedAt: new Date() })
}

/** Whether anybody at all has an account: an installation without one has not been set up. */
export const anyAccount = (tx: Transaction): Promise<boolean> => tx.manager.exists(Account)

export const demoAccounts = (tx: Transaction): Promise<Account[]> =>
  tx.manager.find(Account, {
    where: { isDemo: true, isActive: true },
    order: { createdAt: 'ASC', name: 'ASC' },
  })

/** Makes accounts those of the demo, whom *Continue as…* signs in; only the demo's seeding calls it. */
export const markAsDemo = async (tx: Transaction, ids: string[]): Promise<void> => {
  await tx.manager.update(Account, { id: In(ids) }, { isDemo: true })
}
