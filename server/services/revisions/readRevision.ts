import { may } from '@shared/review/permissions'
import type { Account, Document, Firm, Participation } from '@server/entities'
import { documentOfRevision } from '@server/repositories/documents'
import { readFirm } from '@server/repositories/firms'
import { inTransaction } from '@server/repositories/transaction'
import type { FirmScope, FirmTransaction } from '@server/repositories/transaction'
import { authoriseRevision } from '../authorise'
import type { Subject } from '../authorise'
import { readParticipations } from '../calculations/readCalculation'
import { notFound } from '../refusals'

export interface OpenedRevision extends Subject {
  firm: Firm
  document: Document
  participations: Participation[]
  accounts: Map<string, Account>
  mayWrite: boolean
  /** Why it opens for reading only. */
  reason: string
}

export const readRevision = (scope: FirmScope, id: string): Promise<OpenedRevision> =>
  inTransaction(scope, (tx) => openRevision(tx, id))

export const openRevision = async (tx: FirmTransaction, id: string): Promise<OpenedRevision> => {
  const subject = await authoriseRevision(tx, id, 'open')
  const document = await documentOfRevision(tx, id)
  if (document === null) throw notFound('sheet')
  const edit = may('edit', subject.standing)
  const mayWrite = edit.allowed && document.writable
  return {
    ...subject,
    firm: await readFirm(tx),
    document,
    ...(await readParticipations(tx, subject.calculation.id)),
    mayWrite,
    reason: mayWrite ? '' : edit.reason || 'The sheet is closed to changes.',
  }
}
