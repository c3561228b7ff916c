/** Times are medians over many samples after a warm-up; what is compared is measured in turn, so that drift hits both. */

const median = (values: number[]): number => {
  const sorted = [...values].sort((a, b) => a - b)
  return sorted[Math.floor(sorted.length / 2)] ?? NaN
}

export interface Work {
  /** One sample; whatever it returns is kept from being optimised away. */
  run(): unknown
  /** Runs per sample: short work is repeated until the clock can tell. */
  repeat?: number
}

let kept: unknown

/** The last result of any work; reading it keeps the compiler honest. */
export const lastResult = (): unknown => kept

const sample = ({ run, repeat = 1 }: Work): number => {
  const start = performance.now()
  for (let i = 0; i < repeat; i += 1) kept = run()
  return (performance.now() - start) / repeat
}

/** A row takes about this long, however slow the machine is at the moment; at least nine samples are taken. */
const BUDGET_MS = 12_000
const FEWEST = 9

/** Median milliseconds of each work, over at most `samples` samples after a warm-up of a third of the time. */
export const medians = (works: readonly Work[], samples: number): number[] => {
  const takeInTurn = (most: number, budgetMs: number, fewest: number): number[][] => {
    const end = performance.now() + budgetMs
    const times = works.map((): number[] => [])
    for (let i = 0; i < most && (i < fewest || performance.now() < end); i += 1) {
      works.forEach((work, k) => times[k]?.push(sample(work)))
    }
    return times
  }
  takeInTurn(samples / 3, BUDGET_MS / 3, 3)
  return takeInTurn(samples, BUDGET_MS, FEWEST).map(median)
}
