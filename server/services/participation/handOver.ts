import { randomUUID } from 'node:crypto'
import type { HandOver } from '@shared/api/participation'
import { recordEvent } from '@server/repositories/auditEvents'
import {
  currentParticipations,
  endParticipationRow,
  insertParticipation,
} from '@server/repositories/participations'
import { inTransaction } from '@server/repositories/transaction'
import type { FirmScope } from '@server/repositories/transaction'
import { authoriseCalculation } from '../authorise'
import { readParticipations } from '../calculations/readCalculation'
import { notFound } from '../refusals'
import { refuseUnfit } from './appoint'

/** Passes a part on to a colleague, one's own or that of somebody on leave; what was done under it keeps its name. */
export const handOver = (
  scope: FirmScope,
  calculationId: string,
  participationId: string,
  { accountId, note }: HandOver,
) =>
  inTransaction(scope, async (tx) => {
    const subject = await authoriseCalculation(tx, calculationId, 'appoint', 'lock')
    const current = await currentParticipations(tx, [calculationId])
    const given = current.find((one) => one.id === participationId)
    if (given === undefined) throw notFound('part')
    await refuseUnfit(tx, subject, accountId, given.part, given)
    await endParticipationRow(tx, given.id)
    await insertParticipation(tx, { id: randomUUID(), calculationId, accountId, part: given.part, note })
    await recordEvent(tx, {
      action: 'participation.hand-over',
      subjectId: calculationId,
      details: { part: given.part, from: given.accountId, to: accountId },
    })
    return { ...(await readParticipations(tx, calculationId)), from: given.accountId }
  })
