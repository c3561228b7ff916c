/**
 * Number functions that operators stand for. Powers are mathjs' own function for two numbers, bare:
 * without its dispatch by type, which numbers in SI do not need; the other operations are those of the
 * machine, as in mathjs. Comparisons have mathjs' relative tolerance, but not its absolute one of 1e-15:
 * a warping constant in m⁶ may be smaller than that, and still differ from another.
 */
import { pow } from 'mathjs/number'

type Binary<R> = (a: number, b: number) => R

const bare = (name: string, signatures: unknown): Binary<number> => {
  const implementation: unknown = Reflect.get(signatures as object, 'number,number')
  if (typeof implementation !== 'function') throw new Error(`mathjs has no ${name} of two numbers`)
  return implementation as Binary<number>
}

export const power: Binary<number> = bare('pow', Reflect.get(pow, 'signatures'))

const RELATIVE = 1e-12

export const isEqual: Binary<boolean> = (a, b) =>
  a === b || Math.abs(a - b) <= RELATIVE * Math.max(Math.abs(a), Math.abs(b))
export const isSmaller: Binary<boolean> = (a, b) => a < b && !isEqual(a, b)
export const isSmallerOrEqual: Binary<boolean> = (a, b) => a <= b || isEqual(a, b)
export const isLarger: Binary<boolean> = (a, b) => a > b && !isEqual(a, b)
export const isLargerOrEqual: Binary<boolean> = (a, b) => a >= b || isEqual(a, b)
