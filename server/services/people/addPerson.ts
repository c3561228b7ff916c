import { randomUUID } from 'node:crypto'
import type { AddPerson } from '@shared/api/people'
import { findAccountByEmail, hasPassword, insertAccount } from '@server/repositories/accounts'
import { recordEvent } from '@server/repositories/auditEvents'
import { findMembership, insertMembership } from '@server/repositories/memberships'
import { wasInvitedElsewhere } from '@server/repositories/tokens'
import { inTransaction } from '@server/repositories/transaction'
import type { FirmScope } from '@server/repositories/transaction'
import { authoriseInFirm } from '../authorise'
import { conflict, isTaken } from '../refusals'
import { issueLink } from '../session/links'
import type { IssuedLink } from '../session/links'
import { readPerson } from './listPeople'
import type { PersonOfFirm } from './listPeople'

export interface InvitedPerson {
  person: PersonOfFirm
  link: IssuedLink | null
}

/**
 * Makes somebody a member. A person whom another firm has invited keeps the account, the name and the
 * password they have: no administrator ever gets a link that would open another firm's account.
 */
export const addPerson = async (
  scope: FirmScope,
  { name, email, role }: AddPerson,
): Promise<InvitedPerson> => {
  authoriseInFirm(scope, 'manage-people')
  try {
    return await inTransaction(scope, async (tx) => {
      const known = await findAccountByEmail(tx, email)
      const accountId = known?.id ?? randomUUID()
      if (known && (await findMembership(tx, known.id)))
        throw conflict(`${known.name} is a person of this firm already.`)
      if (!known) await insertAccount(tx, { id: accountId, email, name, passwordHash: null, isDemo: false })
      await insertMembership(tx, { id: randomUUID(), accountId, role })
      const isOurs =
        !known ||
        (!(await hasPassword(tx, [known.id])).size &&
          !(await wasInvitedElsewhere(tx, known.id, scope.firmId)))
      const link = isOurs ? await issueLink(tx, accountId) : null
      await recordEvent(tx, { action: 'person.add', subjectId: accountId, details: { role } })
      return { person: await readPerson(tx, accountId), link }
    })
  } catch (error) {
    if (isTaken(error)) throw conflict('This person was just added by somebody else. Look at the list again.')
    throw error
  }
}
