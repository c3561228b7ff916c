/**
 * A piece of mathematics in its three forms, and what its surroundings must know of it to set it:
 * how tightly it binds, how tall it is, and what stands at its ends.
 */
import type { MathNode } from '../contracts'

/** How tightly a form binds, loosest first; a looser piece inside a tighter one gets brackets. */
export const binding = {
  conditional: 0,
  or: 1,
  and: 2,
  not: 3,
  comparison: 4,
  sum: 5,
  negative: 6,
  product: 7,
  /** A number with its unit or its power of ten: a factor, but no base of a power. */
  quantity: 8,
  /** A fraction with a bar: needs brackets only as the base of a power. */
  fraction: 9,
  power: 10,
  atom: 11,
} as const

export type Binding = (typeof binding)[keyof typeof binding]

/** What stands at an end; between two numbers, or after a unit, a product needs a dot. */
export type End = 'number' | 'unit' | 'fraction' | 'bracket' | 'other'

export interface Drawn {
  tex: string
  print: MathNode
  speech: string
  binding: Binding
  /** In ems of the surrounding type, roughly; chooses the size of brackets. */
  height: number
  first: End
  last: End
}

export const row = (...items: MathNode[]): MathNode => {
  const flat = items.flatMap((item) => (item.math === 'row' ? item.items : [item]))
  return flat.length === 1 && flat[0] ? flat[0] : { math: 'row', items: flat }
}

export const operator = (text: string): MathNode => ({ math: 'operator', text })
export const upright = (text: string): MathNode => ({ math: 'upright', text })
export const space: MathNode = { math: 'space' }

/** Where an expression is being drawn. */
export interface Setting {
  /** Depth of fractions around it: the outermost is set full size. */
  depth: number
  /** In an exponent: divisions are set on one line. */
  inline: boolean
}

export const onTheLine: Setting = { depth: 0, inline: false }
