import type { ChangePerson } from '@shared/api/people'
import { recordEvent } from '@server/repositories/auditEvents'
import {
  findMembership,
  lockAdministrators,
  ownMemberships,
  updateMembership,
} from '@server/repositories/memberships'
import { endSessions } from '@server/repositories/sessions'
import { accountScope, inTransaction } from '@server/repositories/transaction'
import type { Database, FirmScope } from '@server/repositories/transaction'
import { authoriseInFirm } from '../authorise'
import { conflict, notFound } from '../refusals'
import { readPerson } from './listPeople'
import type { PersonOfFirm } from './listPeople'

/**
 * Changes somebody's role, or ends or restores their access. The last administrator in force stays one.
 * Whoever has no firm left is signed out everywhere; another firm's work goes on untouched. The caller has
 * the rights of the person's sockets asked again.
 */
export const changePerson = async (
  scope: FirmScope,
  accountId: string,
  change: ChangePerson,
): Promise<PersonOfFirm> => {
  authoriseInFirm(scope, 'manage-people')
  const person = await inTransaction(scope, async (tx) => {
    const administrators = await lockAdministrators(tx)
    const before = await findMembership(tx, accountId)
    if (before === null) throw notFound('person')
    const role = change.role ?? before.role
    const isActive = change.isActive ?? before.isActive
    const others = administrators.filter((one) => one.accountId !== accountId)
    if (
      others.length === 0 &&
      (role !== 'administrator' || !isActive) &&
      before.role === 'administrator' &&
      before.isActive
    )
      throw conflict('This is the last administrator. Make somebody else an administrator first.')
    if (accountId === scope.accountId && !isActive)
      throw conflict('You cannot end your own access: another administrator must do it.')
    await updateMembership(tx, accountId, { role, isActive })
    await recordEvent(tx, {
      action: 'person.change',
      subjectId: accountId,
      details: { from: { role: before.role, isActive: before.isActive }, to: { role, isActive } },
    })
    return readPerson(tx, accountId)
  })
  if (!person.membership.isActive) await signOutWithoutFirm(scope.dataSource, accountId)
  return person
}

/** Memberships elsewhere are hidden from a firm: they are asked for in the person's own name. */
const signOutWithoutFirm = (dataSource: Database, accountId: string): Promise<void> =>
  inTransaction(accountScope(dataSource, accountId), async (tx) => {
    const left = await ownMemberships(tx)
    if (left.length === 0) await endSessions(tx, accountId)
  })
