import { randomUUID } from 'node:crypto'
import type { Appoint } from '@shared/api/participation'
import type { Part } from '@shared/review/permissions'
import type { Participation } from '@server/entities'
import { recordEvent } from '@server/repositories/auditEvents'
import { findAccount } from '@server/repositories/accounts'
import { authorsOf } from '@server/repositories/authorship'
import { documentOfRevision } from '@server/repositories/documents'
import { findMembership } from '@server/repositories/memberships'
import { currentParticipations, insertParticipation } from '@server/repositories/participations'
import { inTransaction } from '@server/repositories/transaction'
import type { FirmScope, FirmTransaction } from '@server/repositories/transaction'
import { authoriseCalculation } from '../authorise'
import type { Subject } from '../authorise'
import { readParticipations } from '../calculations/readCalculation'
import { conflict, notFound } from '../refusals'

/** Gives somebody of the firm a part on a calculation. */
export const appoint = (scope: FirmScope, calculationId: string, { accountId, part, note }: Appoint) =>
  inTransaction(scope, async (tx) => {
    const subject = await authoriseCalculation(tx, calculationId, 'appoint', 'lock')
    await refuseUnfit(tx, subject, accountId, part)
    await insertParticipation(tx, { id: randomUUID(), calculationId, accountId, part, note })
    await recordEvent(tx, {
      action: 'participation.appoint',
      subjectId: calculationId,
      details: { accountId, part },
    })
    return readParticipations(tx, calculationId)
  })

const isReview = (part: Part): boolean => part === 'checker' || part === 'approver'
const partWords: Record<Part, string> = {
  preparer: 'a preparer',
  checker: 'a checker',
  approver: 'an approver',
  observer: 'an observer',
}

/**
 * Whether a person can take a part, besides parts that they are just giving away.
 * @throws {Refusal} saying why not: independence holds from the appointment on, by the edit record
 */
export const refuseUnfit = async (
  tx: FirmTransaction,
  { calculation, revision, standing }: Subject,
  accountId: string,
  part: Part,
  leaving?: Participation,
): Promise<void> => {
  const membership = await findMembership(tx, accountId)
  const account = membership && (await findAccount(tx, accountId))
  if (!membership || !account) throw notFound('person')
  const { name } = account
  if (!membership.isActive || !account.isActive) throw conflict(`${name} has no access at present.`)
  if (part === 'preparer' && membership.role === 'observer')
    throw conflict(`${name} is an observer of the firm and cannot prepare a calculation.`)
  const held = (await currentParticipations(tx, [calculation.id])).filter(
    (one) => one.accountId === accountId && one.id !== leaving?.id,
  )
  if (held.some((one) => one.part === part)) throw conflict(`${name} is ${partWords[part]} of this already.`)
  if (standing.supervision === 'DSL1') return
  const level = standing.supervision
  if (isReview(part)) {
    const document = await documentOfRevision(tx, revision.id)
    const wrote =
      document !== null && (await authorsOf(tx, document.id)).some((one) => one.accountId === accountId)
    if (held.some((one) => one.part === 'preparer') || wrote)
      throw conflict(
        `${name} ${wrote ? 'has written in this sheet' : 'prepares this calculation'}: at ${level} another person must check and approve it.`,
      )
  } else if (part === 'preparer' && held.some((one) => isReview(one.part)))
    throw conflict(`${name} is to check or approve this: at ${level} that part must be given up first.`)
}
