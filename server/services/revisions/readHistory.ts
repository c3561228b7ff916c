import type { Account } from '@server/entities'
import { readHistoryRows } from '@server/repositories/authorship'
import type { HistoryRow } from '@server/repositories/authorship'
import { documentOfRevision } from '@server/repositories/documents'
import { inTransaction } from '@server/repositories/transaction'
import type { FirmScope } from '@server/repositories/transaction'
import { authoriseRevision } from '../authorise'
import { accountsById } from '../calculations/listCalculations'
import { notFound } from '../refusals'

const MOST_ENTRIES = 500

export interface RevisionHistory {
  rows: HistoryRow[]
  accounts: Map<string, Account>
  isCut: boolean
}

export const readHistory = (scope: FirmScope, id: string, subjectId?: string): Promise<RevisionHistory> =>
  inTransaction(scope, async (tx) => {
    await authoriseRevision(tx, id, 'open')
    const document = await documentOfRevision(tx, id)
    if (document === null) throw notFound('sheet')
    const rows = await readHistoryRows(tx, document.id, subjectId, MOST_ENTRIES + 1)
    const shown = rows.slice(0, MOST_ENTRIES)
    return {
      rows: shown,
      accounts: await accountsById(
        tx,
        shown.flatMap((row) => (row.accountId === null ? [] : [row.accountId])),
      ),
      isCut: rows.length > MOST_ENTRIES,
    }
  })
