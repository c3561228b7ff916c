/** The stored updates of a live document: raising its head, appending, loading, compacting. */
import type { FirmTransaction } from './transaction'

export interface DocumentRow {
  id: string
  head: number
  epoch: number
  writable: boolean
  format: number
  storedBytes: number
}

export interface StoredUpdate {
  head: number
  bytes: Buffer
}

export interface NewUpdate extends StoredUpdate {
  accountId: string | null
  clientId: number | null
}

const documentColumns = `id, head, epoch, writable, format, stored_bytes::float8 AS "storedBytes"`

export const readDocument = async (tx: FirmTransaction, id: string): Promise<DocumentRow | undefined> => {
  const rows: DocumentRow[] = await tx.manager.query(
    `SELECT ${documentColumns} FROM document WHERE id = $1`,
    [id],
  )
  return rows[0]
}

/** Rows of several documents of one firm, for finding out which have moved on. */
export const readDocuments = async (tx: FirmTransaction, ids: string[]): Promise<DocumentRow[]> =>
  tx.manager.query(`SELECT ${documentColumns} FROM document WHERE id = ANY($1)`, [ids])

/** Locks the row that orders everything; undefined where epoch or writability no longer fit. */
export const lockWritable = async (
  tx: FirmTransaction,
  id: string,
  epoch: number,
): Promise<{ head: number } | undefined> => {
  const rows: { head: number }[] = await tx.manager.query(
    `SELECT head FROM document WHERE id = $1 AND epoch = $2 AND writable FOR UPDATE`,
    [id, epoch],
  )
  return rows[0]
}

/** The one way to a higher head. Undefined: the document was closed to edits, or opened again. */
export const raiseHead = async (
  tx: FirmTransaction,
  id: string,
  epoch: number,
  count: number,
  bytes: number,
): Promise<{ head: number; storedBytes: number } | undefined> => {
  const [rows]: [{ head: number; storedBytes: number }[], number] = await tx.manager.query(
    `UPDATE document SET head = head + $3, stored_bytes = stored_bytes + $4, changed_at = now()
     WHERE id = $1 AND epoch = $2 AND writable
     RETURNING head, stored_bytes::float8 AS "storedBytes"`,
    [id, epoch, count, bytes],
  )
  return rows[0]
}

export const insertUpdates = async (tx: FirmTransaction, id: string, updates: NewUpdate[]): Promise<void> => {
  await tx.manager.query(
    `INSERT INTO document_update (document_id, firm_id, head, account_id, client_id, bytes)
     SELECT $1, $2, * FROM unnest($3::int[], $4::uuid[], $5::bigint[], $6::bytea[])`,
    [
      id,
      tx.scope.firmId,
      updates.map((update) => update.head),
      updates.map((update) => update.accountId),
      updates.map((update) => update.clientId),
      updates.map((update) => update.bytes),
    ],
  )
}

export const updatesAfter = async (
  tx: FirmTransaction,
  id: string,
  after: number,
  upTo: number,
): Promise<StoredUpdate[]> =>
  tx.manager.query(
    `SELECT head, bytes FROM document_update
     WHERE document_id = $1 AND head > $2 AND head <= $3 ORDER BY head`,
    [id, after, upTo],
  )

export const readState = async (tx: FirmTransaction, id: string): Promise<StoredUpdate | undefined> => {
  const rows: StoredUpdate[] = await tx.manager.query(
    `SELECT head, bytes FROM document_state WHERE document_id = $1`,
    [id],
  )
  return rows[0]
}

/** Keeps the merged state of everything up to `head`, unless a later one is there. */
export const saveState = async (tx: FirmTransaction, id: string, state: StoredUpdate): Promise<void> => {
  await tx.manager.query(
    `INSERT INTO document_state AS kept (document_id, firm_id, head, bytes) VALUES ($1, $2, $3, $4)
     ON CONFLICT (document_id) DO UPDATE SET head = excluded.head, bytes = excluded.bytes, compacted_at = now()
     WHERE kept.head < excluded.head`,
    [id, tx.scope.firmId, state.head, state.bytes],
  )
}

/** Drops updates that the merged state contains; the edit record stays. */
export const forgetUpdates = async (tx: FirmTransaction, id: string, upTo: number): Promise<void> => {
  await tx.manager.query(
    `DELETE FROM document_update WHERE document_id = $1 AND head <= least($2::int,
       (SELECT head FROM document_state WHERE document_id = $1))`,
    [id, upTo],
  )
}

/**
 * Binds fresh client ids to accounts where they are not bound yet, and says whose each of those asked for
 * is now. The caller holds the document's row, so that two first uses cannot cross.
 */
export const bindClients = async (
  tx: FirmTransaction,
  id: string,
  fresh: { clientId: number; accountId: string }[],
  asked: number[],
): Promise<Map<number, string>> => {
  if (fresh.length > 0)
    await tx.manager.query(
      `INSERT INTO document_client (document_id, firm_id, client_id, account_id)
       SELECT $1, $2, * FROM unnest($3::bigint[], $4::uuid[]) ON CONFLICT DO NOTHING`,
      [id, tx.scope.firmId, fresh.map((client) => client.clientId), fresh.map((client) => client.accountId)],
    )
  const rows: { clientId: number; accountId: string }[] = await tx.manager.query(
    `SELECT client_id::float8 AS "clientId", account_id AS "accountId" FROM document_client
     WHERE document_id = $1 AND client_id = ANY($2::bigint[])`,
    [id, asked],
  )
  return new Map(rows.map((row) => [row.clientId, row.accountId]))
}
