/** Title block and mark of a preliminary print: who has done what, never as done what is only asked for. */
import type { Part } from '@shared/review/permissions'
import type { RevisionState } from '@shared/review/states'
import type { Pages, TitleBlock } from '@server/printing/pages'
import type { OpenedRevision } from './readRevision'

const part = (date: Date, timeZone: string, options: Intl.DateTimeFormatOptions): string =>
  new Intl.DateTimeFormat('en-GB', { timeZone, ...options }).format(date)

/** `1 December 2026`, in the firm's time zone. */
export const printedDay = (date: Date, timeZone: string): string =>
  part(date, timeZone, { day: 'numeric', month: 'long', year: 'numeric' })

/** `1 Dec 2026, 15:04 GMT+1` */
const printedInstant = (date: Date, timeZone: string): string =>
  part(date, timeZone, {
    day: 'numeric',
    month: 'short',
    year: 'numeric',
    hour: '2-digit',
    minute: '2-digit',
    timeZoneName: 'shortOffset',
  })

const purposes: Record<RevisionState, string> = {
  preparing: 'for preparation and review',
  returned: 'for preparation and review',
  checking: 'for checking',
  checked: 'for approval',
  issued: 'working copy of the sheet, not the issued document',
  superseded: 'superseded revision, for the record',
  void: 'void revision, for the record',
}

export const printedTitleBlock = (opened: OpenedRevision, at: Date): TitleBlock => {
  const { calculation, revision, project, firm, document, participations, accounts } = opened
  const names = (wanted: Part): string =>
    participations
      .filter((one) => one.part === wanted)
      .map((one) => accounts.get(one.accountId)?.name ?? '')
      .filter((name) => name !== '')
      .join(', ')
  const prepared = names('preparer')
  const pending = (wanted: Part) => (names(wanted) ? `not yet; appointed: ${names(wanted)}` : 'not yet')
  const changed = printedDay(document.changedAt, firm.timeZone)
  return {
    firm: firm.name,
    number: calculation.number,
    title: calculation.title,
    revision: revision.letter,
    state: revision.isOnHold ? 'on hold' : revision.state,
    project: [project.number, project.name].join(' ') + (project.client ? `, ${project.client}` : ''),
    prepared: prepared ? `${prepared}; last written in ${changed}` : `last written in ${changed}`,
    checked: pending('checker'),
    approved: pending('approver'),
    printed: printedInstant(at, firm.timeZone),
  }
}

/** A preliminary print says what it is, for what, by whom and when, and bears no seal. */
export const preliminaryMark = (
  { revision, firm }: OpenedRevision,
  purpose: string,
  person: string,
  at: Date,
): Pages['mark'] => ({
  lead: 'PRELIMINARY – NOT ISSUED',
  detail: `${purpose || purposes[revision.state]} · ${person} · ${printedDay(at, firm.timeZone)}`,
})
