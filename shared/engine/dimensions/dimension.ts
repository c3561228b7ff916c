/**
 * A dimension: the exponents of the seven SI base units and of the turn, in this order. Turns stand
 * apart because rotational frequency and angular velocity are different quantities (ISO 80000-3) and
 * the 2π between them is the commonest slip of the trade.
 */
export const baseDimensions = [
  'length',
  'mass',
  'time',
  'current',
  'temperature',
  'amount',
  'luminous intensity',
  'turn',
] as const

/** Eight exponents, in the order of `baseDimensions`; fractions such as 0.5 occur (square roots). */
export type Dimension = readonly number[]

const rounded = (exponent: number): number => {
  if (Number.isInteger(exponent)) return exponent === 0 ? 0 : exponent
  const nearest = Math.round(exponent * 2520) / 2520
  return nearest === 0 ? 0 : nearest
}

export const dimensionless: Dimension = [0, 0, 0, 0, 0, 0, 0, 0]

export const dimension = (exponents: Partial<Record<(typeof baseDimensions)[number], number>>): Dimension =>
  baseDimensions.map((name) => exponents[name] ?? 0)

export const product = (a: Dimension, b: Dimension): Dimension => a.map((x, i) => rounded(x + (b[i] ?? 0)))

export const quotient = (a: Dimension, b: Dimension): Dimension => a.map((x, i) => rounded(x - (b[i] ?? 0)))

export const power = (a: Dimension, exponent: number): Dimension => a.map((x) => rounded(x * exponent))

export const sameDimension = (a: Dimension, b: Dimension): boolean => a.every((x, i) => x === b[i])

export const isDimensionless = (a: Dimension): boolean => a.every((x) => x === 0)

export const turns = (a: Dimension): number => a[7] ?? 0
