/** The report for people: each line with its number, then what is wrong, then the verdict. */
import type { LineResult, Problem } from '@shared/engine/contracts'
import { numberSheet } from '@shared/sheet/numbering'
import type { Sheet } from '@shared/sheet/sheet'
import { linesOfSheet, type Report } from './report'

const percent = (utilisation: number | undefined): string =>
  utilisation === undefined ? '' : `, utilisation ${Number((utilisation * 100).toPrecision(3))} %`

const relations = { '<=': '≤', '<': '<', '>=': '≥', '>': '>' } as const

export const printed = (
  title: string,
  sheet: Sheet,
  results: readonly LineResult[],
  report: Report,
): string => {
  const numbers = numberSheet(sheet).lines
  const byId = new Map(linesOfSheet(sheet).map((line) => [line.id, line]))
  const out: string[] = title === '' ? [] : [title, '']
  for (const result of results) {
    const number = (numbers.get(result.id) ?? '').padEnd(6)
    const line = byId.get(result.id)
    const name = [result.symbol, line && noteOf(line)].filter(Boolean).join('  ')
    out.push(...bodyOf(result, line).map((text, i) => `${i === 0 ? number : ' '.repeat(6)}${text}`))
    if (bodyOf(result, line).length === 0) out.push(`${number}${name}`)
  }
  out.push(...section('Problems', report.problems.map(problemText)))
  out.push('', verdict(report))
  return `${out.join('\n')}\n`
}

type SheetLine = ReturnType<typeof linesOfSheet>[number]

const noteOf = (line: SheetLine): string => (line.kind === 'criterion' ? line.title : line.note)

const withNote = (text: string, line: SheetLine | undefined): string => {
  const note = line ? noteOf(line).split('\n')[0] : ''
  return note ? `${text}   — ${note}` : text
}

const bodyOf = (result: LineResult, line: SheetLine | undefined): string[] => {
  const { symbol, value, criterion, analysis, state, waitsFor } = result
  if (value) return [withNote(`${symbol} = ${value.shown}`, line)]
  if (criterion) {
    const { demand, limit, upper, satisfied, utilisation } = criterion
    const relation = line?.kind === 'criterion' ? line.relation : '<='
    const comparison =
      relation === 'within'
        ? `${demand.shown} within ${limit.shown} .. ${upper?.shown ?? ''}`
        : `${demand.shown} ${relations[relation]} ${limit.shown}`
    const judgement = satisfied ? 'satisfied' : 'NOT SATISFIED'
    return [withNote(`${symbol}: ${comparison}: ${judgement}${percent(utilisation)}`, line)]
  }
  if (analysis) {
    const members = Object.entries(analysis.members).map(([name, member]) => {
      const place = member.place === undefined ? '' : ` (${member.place})`
      return `  ${symbol}.${name} = ${member.shown}${place}   — ${member.meaning}`
    })
    return [withNote(`${symbol}: ${analysis.kind}`, line), ...members]
  }
  if (state === 'waits') return [withNote(`${symbol} waits for ${waitsFor.join(', ')}`, line)]
  if (state === 'problem') return [withNote(`${symbol || '(no symbol)'}: see the problems below`, line)]
  return [withNote(`${symbol}: ${line?.kind ?? 'line'}, kept; this version does not compute it`, line)]
}

const problemText = ({ textLine, severity, code, message }: Problem): string =>
  `${textLine === undefined ? '' : `line ${textLine}: `}${severity === 'error' ? 'error' : 'advisory'} (${code}): ${message}`

const section = (title: string, lines: string[]): string[] =>
  lines.length === 0 ? [] : ['', title, ...lines]

const counted = (number: number, one: string, many: string): string =>
  `${number} ${number === 1 ? one : many}`

const verdict = ({ problems, criteria }: Report): string => {
  const errors = problems.filter(({ severity }) => severity === 'error').length
  const failed = criteria.filter(({ satisfied }) => !satisfied)
  const parts = [
    errors > 0 ? counted(errors, 'problem stands in the way', 'problems stand in the way') : 'No problems',
    criteria.length === 0
      ? 'no criteria'
      : failed.length === 0
        ? `${counted(criteria.length, 'criterion', 'criteria')} satisfied`
        : `not satisfied: ${failed.map(({ symbol }) => symbol).join(', ')} (of ${criteria.length})`,
  ]
  return `${parts.join('; ')}.`
}
