/** Prints the sheet of a revision as it is stored at this moment; reads only. */
import type { PagesQuery } from '@shared/api/pages'
import { EvaluationFailed, evaluateInWorker } from '@server/evaluation/evaluateInWorker'
import { programLine } from '@server/printing/programLine'
import { PressFailed, setPages } from '@server/printing/setPages'
import type { PressLimits, SetPages } from '@server/printing/setPages'
import { createWaitingRoom } from '@server/printing/waitingRoom'
import { inTransaction } from '@server/repositories/transaction'
import type { FirmScope, FirmTransaction } from '@server/repositories/transaction'
import { authoriseRevision } from '../authorise'
import { accountsById } from '../calculations/listCalculations'
import { readStoredSheet } from '../calculations/storedSheet'
import { Refusal, unusable } from '../refusals'
import { preliminaryMark, printedTitleBlock } from './printedTitleBlock'
import { openRevision } from './readRevision'

export interface PrintRequest extends PagesQuery {
  /** The moment of the print; the same sheet at the same moment gives the same bytes. */
  at: Date
  /** Of this program. */
  version: string
}

export interface PrintedRevision extends SetPages {
  /** `TF-0042-A.pdf` */
  fileName: string
}

const read = async (tx: FirmTransaction, id: string) => {
  await authoriseRevision(tx, id, 'print')
  const opened = await openRevision(tx, id)
  const accounts = await accountsById(tx, [tx.scope.accountId])
  return {
    opened,
    stored: await readStoredSheet(tx, id),
    person: accounts.get(tx.scope.accountId)?.name ?? '',
  }
}

/** Evaluating and setting both take a processor each; nobody keeps all colleagues waiting. */
const room = createWaitingRoom(2, 20, 4)

/** @throws {Refusal} where the person may not print it, or the sheet cannot be computed or set */
export const printPages = async (
  scope: FirmScope,
  id: string,
  { paper, purpose, at, version }: PrintRequest,
  limits: PressLimits = {},
): Promise<PrintedRevision> => {
  const { opened, stored, person } = await inTransaction(scope, (tx) => read(tx, id))
  const { sheet, problems } = stored
  const printing = room.enter(scope.accountId, async () => {
    const pages = {
      sheet,
      evaluation: await evaluateInWorker(sheet, { present: true, timeoutMs: 60_000 }),
      problems,
      paper,
      titleBlock: printedTitleBlock(opened, at),
      mark: preliminaryMark(opened, purpose, person, at),
      program: programLine(version),
    }
    const printed = await setPages({ pages, printedAt: Math.floor(at.getTime() / 1000) }, limits)
    const name = `${opened.calculation.number}-${opened.revision.letter}`
    return { ...printed, fileName: `${name.replace(/[^\w.-]+/g, '-')}.pdf` }
  })
  if (printing === undefined)
    throw new Refusal('unavailable', 'Many prints are waiting at the moment. Try again in a minute.')
  return printing.catch((error: unknown) => {
    throw refusalOf(error)
  })
}

/** What a person can do something about, in words; the rest stays a fault of ours, with its reference. */
const refusalOf = (error: unknown): unknown => {
  if (error instanceof EvaluationFailed && error.reason !== 'fault')
    return unusable(
      `${error.message} It was not printed. Split it, or look for a line that computes very long.`,
    )
  if (!(error instanceof PressFailed)) return error
  switch (error.reason) {
    case 'timeout':
    case 'memory':
      return unusable(
        'The sheet is too large to print in one document. Split it into several calculations; nothing in it was changed.',
      )
    case 'fault':
      return Object.assign(
        new Refusal(
          'internal',
          'The pages could not be set. The sheet itself is untouched; try again, and if it stays, tell us the reference.',
        ),
        { cause: error },
      )
  }
}
