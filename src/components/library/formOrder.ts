import type { LineResult } from '@shared/engine/contracts'
import type { Line } from '@shared/sheet/kinds'

type Given = Extract<Line, { kind: 'given' }>
type Criterion = Extract<Line, { kind: 'criterion' }>

/** One given of a template's form, and the criteria that can be judged once it stands. */
export interface FormStep {
  given: Given
  criteria: Criterion[]
}

/**
 * The form of a template: its givens in reading order, each criterion under the last given that it depends
 * on, through whatever formulas lie between. A criterion that depends on none stands under the last given.
 */
export const formOrder = (lines: readonly Line[], results: ReadonlyMap<string, LineResult>): FormStep[] => {
  const steps = lines
    .filter((line) => line.kind === 'given')
    .map((given): FormStep => ({ given, criteria: [] }))
  const placeOfGiven = new Map(steps.map((step, place) => [step.given.id, place]))
  const lineOfSymbol = new Map(lines.filter((line) => line.symbol).map((line) => [line.symbol, line.id]))

  const lastGivenOf = (id: string, seen = new Set<string>()): number => {
    if (seen.has(id)) return -1
    seen.add(id)
    const place = placeOfGiven.get(id)
    if (place !== undefined) return place
    const reads = results.get(id)?.reads ?? []
    return Math.max(-1, ...reads.map((symbol) => lastGivenOf(lineOfSymbol.get(ownerOf(symbol)) ?? '', seen)))
  }

  for (const line of lines) {
    if (line.kind !== 'criterion') continue
    const place = lastGivenOf(line.id)
    steps[place < 0 ? steps.length - 1 : place]?.criteria.push(line)
  }
  return steps
}

/** The symbol of the line that defines a member: `S1` for `S1.tau_max`. */
const ownerOf = (symbol: string): string => symbol.split('.')[0] ?? symbol

/** Of several criteria the one that governs: not satisfied before satisfied, then the highest utilisation. */
export const governing = (results: readonly LineResult[]): LineResult | undefined =>
  results
    .filter((result) => result.criterion)
    .sort(
      (one, other) =>
        Number(one.criterion?.satisfied) - Number(other.criterion?.satisfied) ||
        (other.criterion?.utilisation ?? 0) - (one.criterion?.utilisation ?? 0),
    )[0]
