/** What every part of the document is made from: the sheet, its numbers and its values. */
import type { LineId, LineResult, Presentation, QuoteResult } from '@shared/engine/contracts'
import type { Problem } from '@shared/errors/problem'
import type { Line } from '@shared/sheet/kinds'
import { linesOf } from '@shared/sheet/lines'
import { numberSheet, type Numbering } from '@shared/sheet/numbering'
import type { Sheet } from '@shared/sheet/sheet'
import type { SheetEvaluation } from '@server/evaluation/messages'

export interface SheetScope {
  sheet: Sheet
  lines: Line[]
  numbering: Numbering
  results: ReadonlyMap<LineId, LineResult>
  quotes: ReadonlyMap<string, QuoteResult>
  presentations: ReadonlyMap<LineId, Presentation>
  nomenclature: SheetEvaluation['nomenclature']
  /** Problems of the document itself, and of lines. */
  problems: Problem[]
  /** `3.12`; empty for an id that stands nowhere. */
  numberOf(id: LineId): string
}

/** @param problems what reading the document found */
export const scopeOfSheet = (
  sheet: Sheet,
  evaluation: SheetEvaluation,
  problems: readonly Problem[],
): SheetScope => {
  const byId = <T extends { id: string }>(items: readonly T[]) =>
    new Map(items.map((item) => [item.id, item]))
  const numbering = numberSheet(sheet)
  return {
    sheet,
    lines: linesOf(sheet),
    numbering,
    results: byId(evaluation.lines),
    quotes: byId(evaluation.quotes),
    presentations: byId(evaluation.presentations),
    nomenclature: evaluation.nomenclature,
    problems: [...problems, ...evaluation.lines.flatMap((result) => result.problems)],
    numberOf: (id) => numbering.lines.get(id) ?? '',
  }
}
