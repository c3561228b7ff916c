/** What was done, for ever. Written in the transaction that does it; there is no way to change or remove one. */
import { randomUUID } from 'node:crypto'
import type { Transaction } from './transaction'

export interface AuditEntry {
  /** A thing and a verb, as `calculation.create`. */
  action: string
  subjectId?: string
  details?: Record<string, unknown>
  /** Where the scope names nobody, as on signing in. */
  accountId?: string
}

export const recordEvent = async (tx: Transaction, entry: AuditEntry): Promise<void> => {
  const { scope } = tx
  await tx.manager.query(
    `INSERT INTO audit_event (id, firm_id, account_id, action, subject_id, details) VALUES ($1, $2, $3, $4, $5, $6)`,
    [
      randomUUID(),
      scope.kind === 'firm' ? scope.firmId : null,
      entry.accountId ?? (scope.kind === 'system' ? null : scope.accountId),
      entry.action,
      entry.subjectId ?? null,
      JSON.stringify(entry.details ?? {}),
    ],
  )
}
