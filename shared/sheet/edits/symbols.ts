import type { Line } from '../kinds'
import { linesOf } from '../lines'
import type { Sheet } from '../sheet'

const symbolsOf = (sheet: Sheet): Set<string> => new Set(linesOf(sheet).map((line) => line.symbol))

/** The wanted symbol, or the next free one: `d_o`, then `d_o_2`, `d_o_3` …. */
export const freeSymbol = (
  sheet: Sheet,
  wanted: string,
  taken: ReadonlySet<string> = symbolsOf(sheet),
): string => {
  if (wanted === '' || !taken.has(wanted)) return wanted
  const stem = wanted.replace(/_\d+$/, (end) => (taken.has(wanted.slice(0, -end.length)) ? '' : end))
  for (let number = 2; ; number++) {
    const candidate = `${stem}_${number}`
    if (!taken.has(candidate)) return candidate
  }
}

const numbered = (sheet: Sheet, letter: string): string => {
  const taken = symbolsOf(sheet)
  const pattern = new RegExp(`^${letter}(\\d{1,9})$`)
  let highest = 0
  for (const symbol of taken) highest = Math.max(highest, Number(pattern.exec(symbol)?.[1] ?? 0))
  return `${letter}${highest + 1}`
}

/** `C1`, `C2` …: above every number in use, so that a removed criterion's name is not given to another below it. */
export const nextCriterionSymbol = (sheet: Sheet): string => numbered(sheet, 'C')

const letters: Partial<Record<Line['kind'], string>> = {
  criterion: 'C',
  analysis: 'S',
  cases: 'LC',
  sizing: 'Z',
  parametric: 'P',
  tolerance: 'TA',
  table: 'TB',
}

/** The symbol that a new line of this kind gets: `S1`, `LC1` …; empty where the author must find one. */
export const nextSymbol = (sheet: Sheet, kind: Line['kind']): string => {
  const letter = letters[kind]
  return letter === undefined ? '' : numbered(sheet, letter)
}

export const nextAnalysisSymbol = (sheet: Sheet): string => nextSymbol(sheet, 'analysis')
