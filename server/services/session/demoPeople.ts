import type { FirmRole } from '@shared/review/permissions'
import type { Account } from '@server/entities'
import { demoAccounts } from '@server/repositories/accounts'
import { inTransaction, systemScope } from '@server/repositories/transaction'
import type { Database } from '@server/repositories/transaction'
import { currentScope, readIdentity } from './identity'
import { readInTray } from '../readInTray'

export interface DemoPerson {
  account: Account
  role: FirmRole
  firm: string
  waiting: string
}

const waitingWords = (count: number): string =>
  count === 0 ? 'Nothing waits.' : count === 1 ? 'One thing waits.' : `${count} things wait.`

/** The people of the demo, each with what waits for them. */
export const listDemoPeople = async (dataSource: Database): Promise<DemoPerson[]> => {
  const accounts = await inTransaction(systemScope(dataSource), demoAccounts)
  const people: DemoPerson[] = []
  for (const account of accounts) {
    const identity = await readIdentity(dataSource, account.id)
    const membership = identity?.memberships[0]
    const scope = identity && currentScope(dataSource, identity, membership?.firm.id)
    if (!membership || !scope) continue
    const { waitsForMe } = await readInTray(scope)
    const first = waitsForMe[0]
    const waiting =
      first === undefined
        ? waitingWords(0)
        : `${first.verb} ${first.row.number} ${first.row.letter}${waitsForMe.length > 1 ? `, and ${waitsForMe.length - 1} more` : ''}`
    people.push({ account, role: membership.role, firm: membership.firm.name, waiting })
  }
  return people
}

/** @returns whether this account is one whom *Continue as…* may sign in */
export const isDemoAccount = async (dataSource: Database, accountId: string): Promise<boolean> => {
  const accounts = await inTransaction(systemScope(dataSource), demoAccounts)
  return accounts.some((account) => account.id === accountId)
}
