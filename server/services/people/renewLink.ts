import { recordEvent } from '@server/repositories/auditEvents'
import { wasInvitedElsewhere } from '@server/repositories/tokens'
import { inTransaction } from '@server/repositories/transaction'
import type { FirmScope } from '@server/repositories/transaction'
import { authoriseInFirm } from '../authorise'
import { conflict } from '../refusals'
import { issueLink } from '../session/links'
import type { InvitedPerson } from './addPerson'
import { readPerson } from './listPeople'

/** A new one-time link for somebody who has never set a password; a password that is set is nobody else's to change. */
export const renewLink = (scope: FirmScope, accountId: string): Promise<InvitedPerson> => {
  authoriseInFirm(scope, 'manage-people')
  return inTransaction(scope, async (tx) => {
    const person = await readPerson(tx, accountId)
    if (person.hasPassword)
      throw conflict(`${person.account.name} has a password already, which no administrator can replace.`)
    if (!person.membership.isActive)
      throw conflict(`${person.account.name} has no access at present. Restore it first.`)
    if (await wasInvitedElsewhere(tx, accountId, scope.firmId))
      throw conflict(`${person.account.name} was invited by another firm and gets the link from there.`)
    const link = await issueLink(tx, accountId)
    await recordEvent(tx, { action: 'person.renew-link', subjectId: accountId })
    return { person, link }
  })
}
