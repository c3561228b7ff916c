/** One line of the sheet as it prints. */
import type { LineResult } from '@shared/engine/contracts'
import { formatNumber } from '@shared/engine/display'
import type { Criterion, Given, Line } from '@shared/sheet/kinds'
import type { Piece, PrintedLine, PrintedVerdict } from '../pages'
import { printedAnalysis } from './analysis'
import { studyTable, studyTitle } from './studies'
import type { SheetScope } from './scope'
import { math, printedParts, quantityNode, text } from './shown'

const bound = (value: string | undefined, word: string, unit: string): Piece[] =>
  value === undefined || value.trim() === ''
    ? []
    : [text(` ${word} `), math(quantityNode({ shown: `${value} ${unit}`.trim(), unit }))]

const givenRemarks = ({ nature, basis, toConfirm, range, unit }: Given): Piece[][] => {
  const bounds = [...bound(range?.from, 'from', unit), ...bound(range?.to, 'to', unit)]
  return [
    ...(nature === 'assumption' ? [[text(`Assumption: ${basis?.trim() || 'no basis given.'}`)]] : []),
    ...(nature === 'constant' ? [[text('Constant.')]] : []),
    ...(bounds.length > 0 ? [[text('Valid'), ...bounds, text('.')]] : []),
    ...(toConfirm ? [[text(confirmation(toConfirm))]] : []),
  ]
}

export const confirmation = ({ owner, due }: NonNullable<Given['toConfirm']>): string =>
  `To confirm${owner ? ` by ${owner}` : ''}${due ? `, due ${due}` : ''}.`

const registerRemark = (line: Given): Piece[][] =>
  line.register
    ? [
        [
          text(
            `From the material register: ${line.register.material}, ${line.register.property}, version ${line.register.version}.`,
          ),
        ],
      ]
    : []

const verdictOf = (line: Criterion, { criterion }: LineResult): PrintedVerdict | undefined =>
  criterion && {
    satisfied: criterion.satisfied,
    word: criterion.satisfied ? 'satisfied' : 'not satisfied',
    hasBar: Number.isFinite(criterion.utilisation) && line.relation !== 'within',
    ...(criterion.utilisation !== undefined && {
      utilisation: criterion.utilisation,
      shown: formatNumber(criterion.utilisation),
    }),
  }

const problemsOf = ({ state, waitsFor, problems }: LineResult): PrintedLine['problems'] => [
  ...problems.map(({ severity, message }) => ({ severity, message })),
  ...(state === 'waits'
    ? [
        {
          severity: 'error' as const,
          message: `No value: it waits for ${waitsFor.join(', ') || 'other lines'}.`,
        },
      ]
    : []),
]

const remarksOf = (line: Line, result: LineResult | undefined): Piece[][] => [
  ...(line.kind === 'given' ? [...givenRemarks(line), ...registerRemark(line)] : []),
  ...(result?.empirical ? [[text('Empirical: numbers are taken out of their units.')]] : []),
  ...(line.contested ? [[text(`Contested: ${line.contested.by} wrote another version while offline.`)]] : []),
]

/** What stands in a line that cannot be read, as it was typed. */
const asTyped = (line: Line): Piece[][] => {
  const typed =
    line.kind === 'formula'
      ? line.expression
      : line.kind === 'criterion'
        ? [line.demand, line.relation, line.limit].join(' ').trim()
        : ''
  return typed === '' ? [] : [[text('As typed: '), { is: 'text', text: typed, code: true }]]
}

const titleOf = (line: Line): string => {
  if (line.kind === 'criterion') return line.title
  return line.kind === 'figure' ? line.caption : studyTitle(line)
}

export const printedLine = (line: Line, scope: SheetScope): PrintedLine => {
  const result = scope.results.get(line.id)
  const print = scope.presentations.get(line.id)?.print
  const { symbol, ...parts } = print ?? {}
  const verdict = line.kind === 'criterion' && result ? verdictOf(line, result) : undefined
  const analysis =
    line.kind === 'analysis'
      ? printedAnalysis(line, result?.analysis, scope.sheet.front.unitSystem)
      : undefined
  const table = studyTable(line)
  return {
    is: 'line',
    number: scope.numberOf(line.id),
    ...(symbol && line.symbol.trim() !== '' && { symbol }),
    title: titleOf(line),
    parts: printedParts(parts),
    note: line.note,
    source: 'source' in line ? line.source : '',
    remarks: [...(Object.keys(parts).length === 0 ? asTyped(line) : []), ...remarksOf(line, result)],
    problems: result ? problemsOf(result) : [],
    ...(verdict && { verdict }),
    ...(analysis && { analysis }),
    ...(table && { table }),
  }
}
