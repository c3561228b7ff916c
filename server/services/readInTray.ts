/** What waits for a person, what the person waits for, and what colleagues have changed. */
import type { Part } from '@shared/review/permissions'
import type { RevisionState } from '@shared/review/states'
import type { Account } from '@server/entities'
import type { CalculationRow } from '@server/repositories/calculations'
import { recentWorkOfOthers } from '@server/repositories/authorship'
import { inTransaction } from '@server/repositories/transaction'
import type { FirmScope } from '@server/repositories/transaction'
import { accountsById, readListed } from './calculations/listCalculations'
import type { ListedCalculation } from './calculations/listCalculations'

const RECENT_DAYS = 14

export interface TrayEntry {
  verb: string
  row: CalculationRow
  part: Part | null
  detail: string
  note: string
  at: Date
}

export interface Tray {
  waitsForMe: TrayEntry[]
  iWaitFor: TrayEntry[]
  changed: TrayEntry[]
}

/** By part and state: what the person is to do now. */
const turns: Partial<Record<Part, Partial<Record<RevisionState, string>>>> = {
  preparer: { preparing: 'Prepare', returned: 'Revise' },
  checker: { checking: 'Check' },
  approver: { checked: 'Approve' },
}

/** By part and state: whose turn it is, where it is another's. */
const others: Partial<Record<Part, Partial<Record<RevisionState, Part>>>> = {
  preparer: { checking: 'checker', checked: 'approver' },
  checker: { preparing: 'preparer', returned: 'preparer' },
  approver: { preparing: 'preparer', returned: 'preparer', checking: 'checker' },
}

const waitedFor: Record<string, string> = {
  preparer: 'is being prepared',
  checker: 'is being checked',
  approver: 'waits for approval',
}

export const readInTray = (scope: FirmScope): Promise<Tray> =>
  inTransaction(scope, async (tx) => {
    const listed = await readListed(tx, { participant: scope.accountId })
    const since = new Date(Date.now() - RECENT_DAYS * 24 * 3_600_000)
    const documents = listed.map(({ row }) => row.documentId)
    const work = await recentWorkOfOthers(tx, documents, since)
    const writers = await accountsById(
      tx,
      work.map((one) => one.accountId),
    )
    const tray: Tray = { waitsForMe: [], iWaitFor: [], changed: [] }
    for (const one of listed) {
      for (const { part, note, appointedAt } of one.participations.filter(
        (own) => own.accountId === scope.accountId,
      )) {
        const entry = { row: one.row, part, note }
        const verb = turns[part]?.[one.row.state]
        const waiting = others[part]?.[one.row.state]
        if (verb)
          tray.waitsForMe.push({ ...entry, verb, detail: '', at: later(appointedAt, one.row.stateChangedAt) })
        else if (waiting)
          tray.iWaitFor.push({
            ...entry,
            verb: 'Wait for',
            detail: waitingDetail(one, waiting),
            at: one.row.stateChangedAt,
          })
        else if (part === 'observer' && one.row.state !== 'void')
          tray.changed.push({ ...entry, verb: 'Read', detail: '', at: one.row.changedAt })
      }
      const latest = work.find(({ documentId }) => documentId === one.row.documentId)
      if (latest)
        tray.changed.push({
          row: one.row,
          part: null,
          note: '',
          verb: 'See',
          detail: workDetail(writers.get(latest.accountId), latest.subjects),
          at: latest.at,
        })
    }
    tray.waitsForMe.sort(byUrgency)
    tray.iWaitFor.sort(byUrgency)
    tray.changed.sort((left, right) => right.at.getTime() - left.at.getTime())
    return tray
  })

const later = (one: Date, other: Date): Date => (one > other ? one : other)

const waitingDetail = ({ participations, accounts }: ListedCalculation, part: Part): string => {
  const names = participations
    .filter((one) => one.part === part)
    .flatMap(({ accountId }) => accounts.get(accountId)?.name ?? [])
  const words = waitedFor[part] ?? ''
  if (names.length === 0) return `${words}; nobody is appointed yet`
  return `${words} by ${names.join(', ')}`
}

const workDetail = (writer: Account | undefined, subjects: number): string =>
  `${writer?.name ?? 'Somebody'} changed ${subjects === 1 ? 'one line' : `${subjects} lines`}`

/** What is due first; then what somebody asked for in words; then the latest. */
const byUrgency = (left: TrayEntry, right: TrayEntry): number =>
  (left.row.dueOn ?? '9999').localeCompare(right.row.dueOn ?? '9999') ||
  Number(right.note !== '') - Number(left.note !== '') ||
  right.at.getTime() - left.at.getTime()
