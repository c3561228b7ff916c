/** The sheet of a revision as it is stored, for what starts from it. */
import type { Problem } from '@shared/errors/problem'
import { decodeSheet } from '@shared/sheet/decodeSheet'
import type { Sheet } from '@shared/sheet/sheet'
import { authorsOf } from '@server/repositories/authorship'
import type { ContributionRow } from '@server/repositories/contributions'
import { documentOfRevision } from '@server/repositories/documents'
import { readState, updatesAfter } from '@server/repositories/documentUpdates'
import type { FirmTransaction } from '@server/repositories/transaction'
import { notFound } from '../refusals'

export interface StoredSheet {
  documentId: string
  head: number
  sheet: Sheet
  /** What reading the document found wrong. */
  problems: Problem[]
}

/** @throws {Refusal} when the revision has no document */
export const readStoredSheet = async (tx: FirmTransaction, revisionId: string): Promise<StoredSheet> => {
  const document = await documentOfRevision(tx, revisionId)
  if (document === null) throw notFound('sheet')
  const state = await readState(tx, document.id)
  const updates = await updatesAfter(tx, document.id, state?.head ?? 0, document.head)
  const { sheet, problems } = decodeSheet(
    [...(state ? [state] : []), ...updates].map((update) => update.bytes),
  )
  return { documentId: document.id, head: document.head, sheet, problems }
}

/** Authorship belongs to lines and travels with copies: who wrote in a line is its author there, too. */
export const copyAuthorship = async (
  tx: FirmTransaction,
  fromDocumentId: string,
): Promise<ContributionRow[]> =>
  (await authorsOf(tx, fromDocumentId)).map((author, position) => ({
    head: 1,
    position,
    ...author,
    field: '',
    before: null,
    after: null,
  }))
