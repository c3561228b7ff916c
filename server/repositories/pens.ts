/** Pens as rows, so that they hold across processes. Times are the database's own. */
import type { FirmTransaction } from './transaction'

export interface PenRow {
  key: string
  holder: string
  clientId: number
  holderName: string
  until: Date
}

const penColumns = `pen.line AS key, pen.holder, pen.client_id::float8 AS "clientId",
  account.name AS "holderName", pen.until`

/** Pens of a document that have not lapsed, of some keys or of all. */
export const readPens = async (tx: FirmTransaction, documentId: string, keys?: string[]): Promise<PenRow[]> =>
  tx.manager.query(
    `SELECT ${penColumns} FROM pen JOIN account ON account.id = pen.holder
     WHERE pen.document_id = $1 AND pen.until > clock_timestamp() AND ($2::text[] IS NULL OR pen.line = ANY($2))`,
    [documentId, keys ?? null],
  )

/** Gives all of these pens to one client; the caller has made sure that none is another's. */
export const givePens = async (
  tx: FirmTransaction,
  documentId: string,
  keys: string[],
  holder: { accountId: string; clientId: number },
  lapseMs: number,
): Promise<void> => {
  await tx.manager.query(
    `INSERT INTO pen (document_id, firm_id, line, holder, client_id, until)
     SELECT $1, $2, key, $4, $5, clock_timestamp() + $6 * interval '1 millisecond' FROM unnest($3::text[]) AS key
     ON CONFLICT (document_id, line) DO UPDATE
     SET holder = excluded.holder, client_id = excluded.client_id, until = excluded.until`,
    [documentId, tx.scope.firmId, keys, holder.accountId, holder.clientId, lapseMs],
  )
}

/** Keeps pens that have not lapsed; says which are still the client's. */
export const keepPens = async (
  tx: FirmTransaction,
  documentId: string,
  keys: string[],
  holder: { accountId: string; clientId: number },
  lapseMs: number,
): Promise<string[]> => {
  const [rows]: [{ key: string }[], number] = await tx.manager.query(
    `UPDATE pen SET until = clock_timestamp() + $5 * interval '1 millisecond'
     WHERE document_id = $1 AND line = ANY($2) AND holder = $3 AND client_id = $4 AND until > clock_timestamp()
     RETURNING line AS key`,
    [documentId, keys, holder.accountId, holder.clientId, lapseMs],
  )
  return rows.map((row) => row.key)
}

/** Lays pens down: some keys, or all that the client holds. */
export const releasePens = async (
  tx: FirmTransaction,
  documentId: string,
  holder: { accountId: string; clientId: number },
  keys?: string[],
): Promise<void> => {
  await tx.manager.query(
    `DELETE FROM pen WHERE document_id = $1 AND holder = $2 AND client_id = $3
     AND ($4::text[] IS NULL OR line = ANY($4))`,
    [documentId, holder.accountId, holder.clientId, keys ?? null],
  )
}
