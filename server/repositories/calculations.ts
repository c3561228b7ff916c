import type { RevisionState } from '@shared/review/states'
import { Calculation } from '../entities'
import type { FirmTransaction } from './transaction'

export const findCalculation = (tx: FirmTransaction, id: string): Promise<Calculation | null> =>
  tx.manager.findOneBy(Calculation, { firmId: tx.scope.firmId, id })

/** Locks the calculation: changes of its people and of its title block come one after the other. */
export const lockCalculation = (tx: FirmTransaction, id: string): Promise<Calculation | null> =>
  tx.manager.findOne(Calculation, {
    where: { firmId: tx.scope.firmId, id },
    lock: { mode: 'pessimistic_write' },
  })

export const insertCalculation = async (
  tx: FirmTransaction,
  calculation: Omit<Calculation, 'firmId' | 'createdAt' | 'createdBy'>,
): Promise<void> => {
  await tx.manager.insert(Calculation, {
    ...calculation,
    firmId: tx.scope.firmId,
    createdBy: tx.scope.accountId,
  })
}

export const updateCalculation = async (
  tx: FirmTransaction,
  id: string,
  change: Partial<Pick<Calculation, 'title' | 'dueOn' | 'projectId'>>,
): Promise<void> => {
  await tx.manager.update(Calculation, { firmId: tx.scope.firmId, id }, change)
}

export interface CalculationQuery {
  project?: string | undefined
  state?: RevisionState | undefined
  search?: string | undefined
  /** Only those on which this person has a part. */
  participant?: string | undefined
}

/** One calculation with its latest revision and what the list shows of both. */
export interface CalculationRow {
  id: string
  number: string
  title: string
  dueOn: string | null
  projectId: string
  projectNumber: string
  projectName: string
  projectClient: string
  supervision: 'DSL1' | 'DSL2' | 'DSL3'
  revisionId: string
  letter: string
  state: RevisionState
  isOnHold: boolean
  revisionCreatedAt: Date
  stateChangedAt: Date
  documentId: string
  changedAt: Date
}

/** `%` and `_` as typed stand for themselves. */
const containing = (text: string): string => `%${text.replace(/[\\%_]/g, (sign) => `\\${sign}`)}%`

/** Latest first. Every calculation has a revision, and every revision a document. */
export const queryCalculations = (tx: FirmTransaction, query: CalculationQuery): Promise<CalculationRow[]> =>
  tx.manager.query(
    `SELECT c.id, c.number, c.title, c.due_on::text AS "dueOn",
       p.id AS "projectId", p.number AS "projectNumber", p.name AS "projectName", p.client AS "projectClient",
       p.supervision, r.id AS "revisionId", r.letter, r.state, r.is_on_hold AS "isOnHold",
       r.created_at AS "revisionCreatedAt", r.state_changed_at AS "stateChangedAt",
       d.id AS "documentId", d.changed_at AS "changedAt"
     FROM calculation c
     JOIN project p ON p.id = c.project_id AND p.firm_id = c.firm_id
     JOIN LATERAL (SELECT * FROM revision WHERE revision.calculation_id = c.id AND revision.firm_id = c.firm_id
       ORDER BY ordinal DESC LIMIT 1) r ON true
     JOIN document d ON d.revision_id = r.id AND d.firm_id = c.firm_id
     WHERE c.firm_id = $1
       AND ($2::uuid IS NULL OR c.project_id = $2)
       AND ($3::text IS NULL OR r.state = $3)
       AND ($4::text IS NULL OR concat_ws(' ', c.number, c.title, p.number, p.name) ILIKE $4)
       AND ($5::uuid IS NULL OR EXISTS (SELECT FROM participation WHERE participation.calculation_id = c.id
         AND participation.account_id = $5 AND participation.ended_at IS NULL))
     ORDER BY d.changed_at DESC, c.number DESC`,
    [
      tx.scope.firmId,
      query.project ?? null,
      query.state ?? null,
      query.search ? containing(query.search) : null,
      query.participant ?? null,
    ],
  )
