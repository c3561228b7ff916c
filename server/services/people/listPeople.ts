import type { Account, Membership } from '@server/entities'
import { findAccounts, hasPassword } from '@server/repositories/accounts'
import { firmMemberships } from '@server/repositories/memberships'
import { countParts } from '@server/repositories/participations'
import { inTransaction } from '@server/repositories/transaction'
import type { FirmScope, FirmTransaction } from '@server/repositories/transaction'
import { authoriseInFirm } from '../authorise'
import { notFound } from '../refusals'

export interface PersonOfFirm {
  account: Account
  membership: Membership
  hasPassword: boolean
  calculations: number
}

export const listPeople = (scope: FirmScope): Promise<PersonOfFirm[]> => {
  authoriseInFirm(scope, 'see-people')
  return inTransaction(scope, readPeople)
}

export const readPeople = async (tx: FirmTransaction): Promise<PersonOfFirm[]> => {
  const memberships = await firmMemberships(tx)
  const ids = memberships.map((membership) => membership.accountId)
  const accounts = new Map((await findAccounts(tx, ids)).map((account) => [account.id, account]))
  const ready = await hasPassword(tx, ids)
  const counts = await countParts(tx)
  return memberships
    .flatMap((membership) => {
      const account = accounts.get(membership.accountId)
      if (account === undefined) return []
      const { id } = account
      return [{ account, membership, hasPassword: ready.has(id), calculations: counts.get(id) ?? 0 }]
    })
    .sort((left, right) => left.account.name.localeCompare(right.account.name))
}

/** @throws {Refusal} when the firm has no such person */
export const readPerson = async (tx: FirmTransaction, accountId: string): Promise<PersonOfFirm> => {
  const person = (await readPeople(tx)).find((one) => one.account.id === accountId)
  if (person === undefined) throw notFound('person')
  return person
}
