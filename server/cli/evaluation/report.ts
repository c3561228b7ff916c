/** What the evaluate command answers, as data: the contract of `--json`. */
import type { LineResult, Problem, Quantity } from '@shared/engine/contracts'
import type { Line } from '@shared/sheet/kinds'
import type { Sheet } from '@shared/sheet/sheet'

export interface ReportedValue {
  /** Full double precision, in SI. */
  si: number
  number: number
  unit: string
  shown: string
}

export interface Report {
  /** By symbol, outputs of analyses by member (`S1.phi_end`); what waits is absent. */
  values: Record<string, ReportedValue>
  criteria: { symbol: string; title: string; satisfied: boolean; utilisation?: number }[]
  /** Tables, studies and sizings, by symbol. */
  lines: Record<string, unknown>
  problems: Problem[]
}

const reported = ({ si, number, unit, shown }: Quantity): ReportedValue => ({ si, number, unit, shown })

export const linesOfSheet = (sheet: Sheet): Line[] =>
  sheet.blocks.flatMap((block) => (block.type === 'line' ? [block.line] : []))

/** @param textLines where each line stands in the text, one-based, by id */
export const reportOf = (
  sheet: Sheet,
  results: readonly LineResult[],
  textProblems: readonly Problem[],
  textLines: ReadonlyMap<string, number>,
): Report => {
  const report: Report = { values: {}, criteria: [], lines: {}, problems: [...textProblems] }
  const lines = new Map(linesOfSheet(sheet).map((line) => [line.id, line]))
  for (const result of results) {
    const { id, symbol, value, analysis, criterion } = result
    if (value) report.values[symbol] = reported(value)
    for (const [member, output] of Object.entries(analysis?.members ?? {})) {
      report.values[`${symbol}.${member}`] = reported(output)
    }
    const line = lines.get(id)
    if (criterion) {
      const { satisfied, utilisation } = criterion
      report.criteria.push({
        symbol,
        title: line?.kind === 'criterion' ? line.title : '',
        satisfied,
        ...(utilisation !== undefined && { utilisation }),
      })
    }
    const textLine = textLines.get(id)
    report.problems.push(...result.problems.map((problem) => ({ ...problem, ...(textLine && { textLine }) })))
  }
  return report
}

/** 1: a problem of severity error; 2: a criterion not satisfied; 0 else. */
export const exitCodeOf = ({ problems, criteria }: Report): 0 | 1 | 2 => {
  if (problems.some(({ severity }) => severity === 'error')) return 1
  return criteria.some(({ satisfied }) => !satisfied) ? 2 : 0
}
