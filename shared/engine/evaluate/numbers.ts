/**
 * The number functions of mathjs that operators stand for, bare: without its dispatch by type, which
 * numbers in SI do not need. Results have the same bits as mathjs' own evaluation.
 */
import * as mathjs from 'mathjs/number'

type Binary<R> = (a: number, b: number) => R

/** The implementation for two numbers of one of mathjs' functions. */
const bare = <R>(name: 'pow' | 'smaller' | 'smallerEq' | 'larger' | 'largerEq'): Binary<R> => {
  const signatures: unknown = Reflect.get(mathjs[name] as unknown as object, 'signatures')
  const implementation: unknown = Reflect.get(signatures as object, 'number,number')
  if (typeof implementation !== 'function') throw new Error(`mathjs has no ${name} of two numbers`)
  return implementation as Binary<R>
}

export const power: Binary<number> = bare('pow')
export const isSmaller: Binary<boolean> = bare('smaller')
export const isSmallerOrEqual: Binary<boolean> = bare('smallerEq')
export const isLarger: Binary<boolean> = bare('larger')
export const isLargerOrEqual: Binary<boolean> = bare('largerEq')
/** Within mathjs' relative tolerance, as all its comparisons are. */
export const isEqual: Binary<boolean> = (a, b) => mathjs.equal(a, b) as boolean
