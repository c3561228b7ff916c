/** Counts of tries, kept in the database so that they hold over restarts and for all processes together. */
import type { Transaction } from './transaction'

export interface RateCount {
  hits: number
  resetsAt: Date
}

export const countHit = async (tx: Transaction, key: string, windowMs: number): Promise<RateCount> => {
  const rows: RateCount[] = await tx.manager.query(
    `INSERT INTO rate_window AS kept (key, hits, resets_at)
     VALUES ($1, 1, now() + $2 * interval '1 millisecond')
     ON CONFLICT (key) DO UPDATE SET
       hits = CASE WHEN kept.resets_at <= now() THEN 1 ELSE kept.hits + 1 END,
       resets_at = CASE WHEN kept.resets_at <= now() THEN excluded.resets_at ELSE kept.resets_at END
     RETURNING hits, resets_at AS "resetsAt"`,
    [key, windowMs],
  )
  const row = rows[0]
  if (row === undefined) throw new Error('A try could not be counted.')
  if (row.hits === 1) await forgetLapsed(tx)
  return row
}

/** A few at each new window, so that they never add up. Rows that another transaction holds are left to it. */
const forgetLapsed = async (tx: Transaction): Promise<void> => {
  await tx.manager.query(
    `DELETE FROM rate_window WHERE key IN
       (SELECT key FROM rate_window WHERE resets_at < now() LIMIT 100 FOR UPDATE SKIP LOCKED)`,
  )
}

export const uncountHit = async (tx: Transaction, key: string): Promise<void> => {
  await tx.manager.query('UPDATE rate_window SET hits = greatest(hits - 1, 0) WHERE key = $1', [key])
}

export const forgetHits = async (tx: Transaction, key: string): Promise<void> => {
  await tx.manager.query('DELETE FROM rate_window WHERE key = $1', [key])
}
