import type { Invited, Person } from '@shared/api/people'
import type { PersonBrief } from '@shared/api/fields'
import { initialsOf } from '@shared/protocol'
import type { Account } from '@server/entities'
import type { InvitedPerson } from '@server/services/people/addPerson'
import type { PersonOfFirm } from '@server/services/people/listPeople'

export const presentBrief = ({ id, name }: Pick<Account, 'id' | 'name'>): PersonBrief => ({
  id,
  name,
  initials: initialsOf(name),
})

/** Somebody named by a row; an account is never removed, so one that is missing is a fault of ours. */
export const briefOf = (accounts: Map<string, Account>, id: string): PersonBrief => {
  const account = accounts.get(id)
  if (account === undefined) throw new Error(`Account ${id} was not read.`)
  return presentBrief(account)
}

export const presentPerson = ({ account, membership, hasPassword, calculations }: PersonOfFirm): Person => ({
  ...presentBrief(account),
  email: account.email,
  role: membership.role,
  isActive: membership.isActive,
  hasPassword,
  calculations,
  since: membership.createdAt.toISOString(),
})

export const presentInvited = ({ person, link }: InvitedPerson): Invited => ({
  person: presentPerson(person),
  link: link && { path: link.path, expiresAt: link.expiresAt.toISOString() },
})
