/** Reported results and every criterion, together. */
import type { Line } from '@shared/sheet/kinds'
import { reportedLines } from '@shared/sheet/reported'
import type { Appendix, Piece } from '../pages'
import { printedLine } from './line'
import type { SheetScope } from './scope'
import { cell, heads, math, quantityNode, symbolNode, text } from './shown'

const reference = (number: string): Piece[] => (number === '' ? [] : [{ is: 'reference', number }])

const resultRow = (line: Line, scope: SheetScope): Piece[][] => {
  const value = scope.results.get(line.id)?.value
  return [
    reference(scope.numberOf(line.id)),
    [math(symbolNode(line.symbol))],
    cell(line.note),
    value ? [math(quantityNode(value))] : [{ is: 'missing', text: 'no value' }],
  ]
}

const criterionRow = (line: Line, scope: SheetScope): Piece[][] => {
  const { parts, verdict, title, symbol } = printedLine(line, scope)
  const statement = parts.result ?? parts.symbolic
  return [
    reference(scope.numberOf(line.id)),
    [...(symbol ? [math(symbol), text(' ')] : []), ...cell(title || line.note)],
    statement ? [math(statement)] : [],
    verdict ? [{ is: 'text', text: verdict.word, bold: true }] : [{ is: 'missing', text: 'no verdict' }],
    cell(verdict?.shown ?? ''),
  ]
}

/** What stands between the sheet and its conclusion; without reported results or criteria, nothing. */
export const summaryOf = (scope: SheetScope): Appendix[] => {
  const { results, criteria } = reportedLines(scope.sheet)
  const lines = new Map(scope.lines.map((line) => [line.id, line]))
  const named = (ids: string[]) => ids.flatMap((id) => lines.get(id) ?? [])
  return [
    {
      title: 'Reported results',
      paragraphs: [],
      table: {
        head: heads('Line', 'Symbol', 'Meaning', 'Value'),
        parts: [0.6, 1, 4, 2],
        rows: named(results).map((line) => resultRow(line, scope)),
      },
    },
    {
      title: 'Criteria',
      paragraphs: [],
      table: {
        head: heads('Line', 'Criterion', 'Comparison', 'Verdict', 'Utilisation'),
        parts: [0.6, 2.6, 3, 1.4, 1.1],
        rows: named(criteria).map((line) => criterionRow(line, scope)),
      },
    },
  ].filter(({ table }) => table.rows.length > 0)
}
