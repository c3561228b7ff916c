/** The edit record: rows that are only ever added, in the transaction that stores their update. */
import type { FirmTransaction } from './transaction'

export interface ContributionRow {
  head: number
  position: number
  accountId: string | null
  subject: 'line' | 'block' | 'front'
  subjectId: string
  field: string
  before: string | null
  after: string | null
}

export const insertContributions = async (
  tx: FirmTransaction,
  documentId: string,
  rows: ContributionRow[],
): Promise<void> => {
  if (rows.length === 0) return
  await tx.manager.query(
    `INSERT INTO contribution
       (document_id, firm_id, head, position, account_id, subject, subject_id, field, before, after)
     SELECT $1, $2, * FROM unnest($3::int[], $4::int[], $5::uuid[], $6::text[], $7::text[], $8::text[],
       $9::text[], $10::text[])`,
    [
      documentId,
      tx.scope.firmId,
      rows.map((row) => row.head),
      rows.map((row) => row.position),
      rows.map((row) => row.accountId),
      rows.map((row) => row.subject),
      rows.map((row) => row.subjectId),
      rows.map((row) => row.field),
      rows.map((row) => row.before),
      rows.map((row) => row.after),
    ],
  )
}

/** The history of one line or block, oldest first. */
export const readContributions = async (
  tx: FirmTransaction,
  documentId: string,
  subjectId?: string,
): Promise<(ContributionRow & { at: Date })[]> =>
  tx.manager.query(
    `SELECT head, position, account_id AS "accountId", subject, subject_id AS "subjectId", field, before, after, at
     FROM contribution WHERE document_id = $1 AND ($2::text IS NULL OR subject_id = $2) ORDER BY head, position`,
    [documentId, subjectId ?? null],
  )
