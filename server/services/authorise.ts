/** Asks the one table of permissions, inside the transaction that will act on the answer. */
import { may } from '@shared/review/permissions'
import type { Action, Standing } from '@shared/review/permissions'
import type { Calculation, Project, Revision } from '@server/entities'
import { findCalculation, lockCalculation } from '@server/repositories/calculations'
import { partsOf } from '@server/repositories/participations'
import { findProject } from '@server/repositories/projects'
import { findRevision, latestRevision } from '@server/repositories/revisions'
import type { FirmScope, FirmTransaction } from '@server/repositories/transaction'
import { notAllowed, notFound } from './refusals'

export interface Subject {
  calculation: Calculation
  revision: Revision
  project: Project
  standing: Standing & Required<Pick<Standing, 'state' | 'supervision'>>
}

/** For what concerns the firm as a whole. @throws {Refusal} with the table's reason */
export const authoriseInFirm = (scope: FirmScope, action: Action): void => {
  const { allowed, reason } = may(action, { role: scope.role, parts: [] })
  if (!allowed) throw notAllowed(reason)
}

const subjectOf = async (
  tx: FirmTransaction,
  calculation: Calculation,
  revision: Revision,
): Promise<Subject> => {
  const project = await findProject(tx, calculation.projectId)
  if (project === null) throw new Error(`Calculation ${calculation.id} has no project.`)
  return {
    calculation,
    revision,
    project,
    standing: {
      role: tx.scope.role,
      parts: await partsOf(tx, calculation.id, tx.scope.accountId),
      state: revision.state,
      supervision: project.supervision,
    },
  }
}

/** Who may not even open something learns nothing of it: *not found*, as for another firm's. */
const decide = (subject: Subject, action: Action, what: string): Subject => {
  if (!may('open', subject.standing).allowed) throw notFound(what)
  const { allowed, reason } = may(action, subject.standing)
  if (!allowed) throw notAllowed(reason)
  return subject
}

/** For one revision. @throws {Refusal} not-found or not-allowed */
export const authoriseRevision = async (
  tx: FirmTransaction,
  id: string,
  action: Action,
): Promise<Subject> => {
  const revision = await findRevision(tx, id)
  const calculation = revision && (await findCalculation(tx, revision.calculationId))
  if (!revision || !calculation) throw notFound('revision')
  return decide(await subjectOf(tx, calculation, revision), action, 'revision')
}

/** For a calculation by its latest revision; locks its row where something is to be changed. */
export const authoriseCalculation = async (
  tx: FirmTransaction,
  id: string,
  action: Action,
  lock: 'lock' | 'read' = 'read',
): Promise<Subject> => {
  const calculation = await (lock === 'lock' ? lockCalculation(tx, id) : findCalculation(tx, id))
  const revision = calculation && (await latestRevision(tx, calculation.id))
  if (!calculation || !revision) throw notFound('calculation')
  return decide(await subjectOf(tx, calculation, revision), action, 'calculation')
}
