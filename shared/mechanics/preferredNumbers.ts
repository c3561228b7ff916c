/**
 * Preferred numbers of ISO 3:1973, table 1: the rounded values of R40, of which R20, R10 and R5 are every
 * second, fourth and eighth.
 */
const R40 = [
  1.0, 1.06, 1.12, 1.18, 1.25, 1.32, 1.4, 1.5, 1.6, 1.7, 1.8, 1.9, 2.0, 2.12, 2.24, 2.36, 2.5, 2.65, 2.8, 3.0,
  3.15, 3.35, 3.55, 3.75, 4.0, 4.25, 4.5, 4.75, 5.0, 5.3, 5.6, 6.0, 6.3, 6.7, 7.1, 7.5, 8.0, 8.5, 9.0, 9.5,
] as const

export const series = { R5: 8, R10: 4, R20: 2, R40: 1 } as const
export type Series = keyof typeof series

export const isSeries = (word: string): word is Series => Object.hasOwn(series, word)

/** Values this close to a term, relatively, are the term: what a formula leaves of rounding must not skip one. */
const SAME = 1e-9

/** The terms of a series around x > 0, from a tenth of its decade to ten times it. */
const terms = (x: number, of: Series): number[] => {
  const exponent = Math.floor(Math.log10(x))
  const mantissas = R40.filter((_, i) => i % series[of] === 0)
  return [-1, 0, 1].flatMap((decade) => mantissas.map((term) => Number(`${term}e${exponent + decade}`)))
}

/** The term of the series next above x, or x where it is one. @param x > 0, a bare number */
export const preferredAbove = (x: number, of: Series): number =>
  terms(x, of).find((term) => term >= x * (1 - SAME)) ?? NaN

/** The term of the series next below x, or x where it is one. @param x > 0, a bare number */
export const preferredBelow = (x: number, of: Series): number =>
  terms(x, of).findLast((term) => term <= x * (1 + SAME)) ?? NaN
