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

/** Median milliseconds of each work. */
export const medians = (
  works: readonly Work[],
  samples: number,
  warmUp = Math.ceil(samples / 3),
): number[] => {
  for (let i = 0; i < warmUp; i += 1) for (const work of works) sample(work)
  const times = works.map((): number[] => [])
  for (let i = 0; i < samples; i += 1) works.forEach((work, k) => times[k]?.push(sample(work)))
  return times.map(median)
}
