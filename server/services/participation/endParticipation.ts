import { recordEvent } from '@server/repositories/auditEvents'
import { currentParticipations, endParticipationRow } from '@server/repositories/participations'
import { inTransaction } from '@server/repositories/transaction'
import type { FirmScope } from '@server/repositories/transaction'
import { authoriseCalculation } from '../authorise'
import { readParticipations } from '../calculations/readCalculation'
import { conflict, notFound } from '../refusals'

/** Gives up one's own part, or ends another's; a calculation keeps at least one preparer. */
export const endParticipation = (scope: FirmScope, calculationId: string, participationId: string) =>
  inTransaction(scope, async (tx) => {
    await authoriseCalculation(tx, calculationId, 'open', 'lock')
    const current = await currentParticipations(tx, [calculationId])
    const given = current.find((one) => one.id === participationId)
    if (given === undefined) throw notFound('part')
    const isOwn = given.accountId === scope.accountId
    await authoriseCalculation(tx, calculationId, isOwn ? 'give-up-part' : 'appoint')
    if (given.part === 'preparer' && current.filter((one) => one.part === 'preparer').length === 1)
      throw conflict('This is the last preparer. Hand the part over to a colleague instead.')
    await endParticipationRow(tx, given.id)
    await recordEvent(tx, {
      action: isOwn ? 'participation.give-up' : 'participation.end',
      subjectId: calculationId,
      details: { part: given.part, accountId: given.accountId },
    })
    // Read by the calculation's id alone: an observer who has just left may not open it any more.
    return { ...(await readParticipations(tx, calculationId)), from: given.accountId }
  })
