/** Who wrote in what, from the edit record. */
import type { FirmTransaction } from './transaction'

export interface Author {
  accountId: string
  subject: 'line' | 'block' | 'front'
  subjectId: string
}

export const authorsOf = (tx: FirmTransaction, documentId: string): Promise<Author[]> =>
  tx.manager.query(
    `SELECT account_id AS "accountId", subject, subject_id AS "subjectId" FROM contribution
     WHERE document_id = $1 AND firm_id = $2 AND account_id IS NOT NULL
     GROUP BY account_id, subject, subject_id ORDER BY min(head), min(position)`,
    [documentId, tx.scope.firmId],
  )

/** What colleagues have lately written in a document. */
export interface RecentWork {
  documentId: string
  accountId: string
  subjects: number
  at: Date
}

/** The latest of others' work on each of some documents, since a moment. */
export const recentWorkOfOthers = (
  tx: FirmTransaction,
  documentIds: string[],
  since: Date,
): Promise<RecentWork[]> =>
  tx.manager.query(
    `SELECT DISTINCT ON (document_id) document_id AS "documentId", account_id AS "accountId",
       count(DISTINCT subject_id)::int AS subjects, max(at) AS at
     FROM contribution
     WHERE firm_id = $1 AND document_id = ANY($2) AND account_id <> $3 AND at > $4
     GROUP BY document_id, account_id ORDER BY document_id, max(at) DESC`,
    [tx.scope.firmId, documentIds, tx.scope.accountId, since],
  )

export interface HistoryRow {
  head: number
  accountId: string | null
  subject: 'line' | 'block' | 'front'
  subjectId: string
  field: string
  before: string | null
  after: string | null
  at: Date
}

/** The edit record of a document, or of one line, block or front text of it: latest first. */
export const readHistoryRows = (
  tx: FirmTransaction,
  documentId: string,
  subjectId: string | undefined,
  most: number,
): Promise<HistoryRow[]> =>
  tx.manager.query(
    `SELECT head, account_id AS "accountId", subject, subject_id AS "subjectId", field, before, after, at
     FROM contribution WHERE firm_id = $1 AND document_id = $2 AND ($3::text IS NULL OR subject_id = $3)
     ORDER BY head DESC, position DESC LIMIT $4`,
    [tx.scope.firmId, documentId, subjectId ?? null, most],
  )
