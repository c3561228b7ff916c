/** From a sheet and its title block to the document that Typst draws. Pure: the same in, the same out. */
import type { QuoteResult } from '@shared/engine/contracts'
import type { Problem } from '@shared/errors/problem'
import type { Block, Sheet } from '@shared/sheet/sheet'
import type { SheetEvaluation } from '@server/evaluation/messages'
import type { Pages, Paper, PrintedBlock, TitleBlock } from '../pages'
import { appendicesOf, cautionsOf } from './appendices'
import { printedLine } from './line'
import { printedProse } from './prose'
import { scopeOfSheet, type SheetScope } from './scope'
import { summaryOf } from './summary'

export interface PagesRequest {
  sheet: Sheet
  /** Values and presentations: of now, or of a snapshot. */
  evaluation: SheetEvaluation
  /** What reading the document found wrong. */
  problems: Problem[]
  paper: Paper
  titleBlock: TitleBlock
  mark: Pages['mark']
  program: string
}

const paragraphsOf = (written: string): string[] =>
  written
    .split(/\n\s*\n/)
    .map((paragraph) => paragraph.trim())
    .filter((paragraph) => paragraph !== '')

const quotesOfBlock = (place: number, scope: SheetScope): (QuoteResult | undefined)[] => {
  const quotes: (QuoteResult | undefined)[] = []
  for (let index = 0; ; index++) {
    const quote = scope.quotes.get(`${place}:${index}`)
    if (!quote) return quotes
    quotes.push(quote)
  }
}

const printedBlock = (block: Block, place: number, scope: SheetScope): PrintedBlock =>
  block.type === 'line'
    ? printedLine(block.line, scope)
    : printedProse(block, { numbering: scope.numbering, quotes: quotesOfBlock(place, scope) })

const counted = (count: number, one: string, many: string): string =>
  count === 1 ? `1 ${one}` : `${count} ${many}`

/** `lines 1.2, 1.3 and 12 others` */
const naming = (numbers: string[]): string => {
  const shown = [...new Set(numbers)].filter((number) => number !== '')
  const named = shown.slice(0, 12).join(', ')
  return shown.length > 12
    ? `lines ${named} and ${shown.length - 12} others`
    : `${shown.length === 1 ? 'line' : 'lines'} ${named}`
}

const noticesOf = (scope: SheetScope): Pages['notices'] => {
  const { problems, lines, results, numberOf } = scope
  const errors = problems.filter(({ severity }) => severity === 'error')
  const withoutValue = lines.filter(({ id }) => ['problem', 'waits'].includes(results.get(id)?.state ?? ''))
  const notSatisfied = lines.filter(({ id }) => results.get(id)?.criterion?.satisfied === false)
  const open = lines.filter((line) => line.kind === 'given' && line.toConfirm)
  const contested = lines.filter((line) => line.contested)
  const unwritten = (['purpose', 'method', 'conclusion'] as const).filter(
    (name) => scope.sheet.front[name].trim() === '',
  )
  const notice = (severity: 'error' | 'advisory', said: typeof lines, text: string) =>
    said.length === 0 ? [] : [{ severity, text: `${text}: ${naming(said.map(({ id }) => numberOf(id)))}.` }]
  return [
    ...(errors.length > 0
      ? [
          {
            severity: 'error' as const,
            text: `This sheet has ${counted(errors.length, 'error', 'errors')}. Values that depend on them are missing.`,
          },
        ]
      : []),
    ...notice('error', withoutValue, `${counted(withoutValue.length, 'line has', 'lines have')} no value`),
    ...notice('error', contested, `${counted(contested.length, 'line is', 'lines are')} contested`),
    ...notice(
      'error',
      notSatisfied,
      `${counted(notSatisfied.length, 'criterion is', 'criteria are')} not satisfied`,
    ),
    ...(unwritten.length > 0
      ? [{ severity: 'advisory' as const, text: `Not written yet: ${unwritten.join(', ')}.` }]
      : []),
    ...notice(
      'advisory',
      open,
      `${counted(open.length, 'value is', 'values are')} to be confirmed before issue`,
    ),
  ]
}

export const composePages = (request: PagesRequest): Pages => {
  const { sheet, evaluation, problems, paper, titleBlock, mark, program } = request
  const scope = scopeOfSheet(sheet, evaluation, problems)
  return {
    paper,
    language: /^[A-Za-z]{2,3}(?=-|$)/.exec(sheet.front.language)?.[0].toLowerCase() ?? 'en',
    titleBlock,
    mark,
    notices: noticesOf(scope),
    purpose: paragraphsOf(sheet.front.purpose),
    method: paragraphsOf(sheet.front.method),
    blocks: sheet.blocks.map((block, place) => printedBlock(block, place, scope)),
    summary: summaryOf(scope),
    conclusion: paragraphsOf(sheet.front.conclusion),
    appendices: appendicesOf(scope),
    cautions: cautionsOf(scope),
    program,
  }
}
