import type { Transaction } from './transaction'

/** Name of the latest migration that the database has. */
export const latestMigration = async (tx: Transaction): Promise<string | undefined> => {
  const rows: { name: string }[] = await tx.manager.query(
    'SELECT name FROM schema_migration ORDER BY "timestamp" DESC, id DESC LIMIT 1',
  )
  return rows[0]?.name
}

/** One at a time for the rest of the transaction, across all processes. */
export const takeTurn = async (tx: Transaction, lock: number): Promise<void> => {
  await tx.manager.query('SELECT pg_advisory_xact_lock($1)', [lock])
}
