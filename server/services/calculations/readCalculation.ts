import type { Account, Calculation, Participation, Project, Revision } from '@server/entities'
import { documentOfRevision } from '@server/repositories/documents'
import { currentParticipations } from '@server/repositories/participations'
import { revisionsOf } from '@server/repositories/revisions'
import { inTransaction } from '@server/repositories/transaction'
import type { FirmScope, FirmTransaction } from '@server/repositories/transaction'
import { authoriseCalculation } from '../authorise'
import { accountsById } from './listCalculations'

export interface WholeCalculation {
  calculation: Calculation
  project: Project
  revisions: Revision[]
  participations: Participation[]
  accounts: Map<string, Account>
  changedAt: Date
}

export const readCalculation = (scope: FirmScope, id: string): Promise<WholeCalculation> =>
  inTransaction(scope, (tx) => readWhole(tx, id))

export const readWhole = async (tx: FirmTransaction, id: string): Promise<WholeCalculation> => {
  const { calculation, project, revision } = await authoriseCalculation(tx, id, 'open')
  const { participations, accounts } = await readParticipations(tx, id)
  const document = await documentOfRevision(tx, revision.id)
  return {
    calculation,
    project,
    revisions: await revisionsOf(tx, id),
    participations,
    accounts,
    changedAt: document?.changedAt ?? revision.stateChangedAt,
  }
}

export interface CurrentParticipations {
  participations: Participation[]
  accounts: Map<string, Account>
}

/** The parts in force on a calculation, with the people that they name. */
export const readParticipations = async (
  tx: FirmTransaction,
  calculationId: string,
): Promise<CurrentParticipations> => {
  const participations = await currentParticipations(tx, [calculationId])
  const named = participations.flatMap((one) => [one.accountId, one.appointedBy])
  return { participations, accounts: await accountsById(tx, named) }
}
