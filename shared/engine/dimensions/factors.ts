/** A product flattened to literals, powers of pi, and quantities: what the turn rules look at. */
import type { Expression } from '../parse/expression'
import { dimensionless, power, product, turns, type Dimension } from './dimension'

export interface Factor {
  node: Expression
  exponent: number
  kind: 'literal' | 'pi' | 'quantity'
  /** Value of a literal. */
  value: number
  /** Undefined while unknown. */
  dimension: Dimension | undefined
  /** Outermost bracket of the product that it stands in. */
  bracket: Expression | undefined
}

/** Value of an expression of literals only, such as an exponent 1/3. */
export const constantOf = (node: Expression): number | undefined => {
  switch (node.type) {
    case 'number':
      return node.value
    case 'group':
      return constantOf(node.inner)
    case 'unary': {
      const value = constantOf(node.operand)
      if (value === undefined || node.operator === 'not') return undefined
      return node.operator === '-' ? -value : value
    }
    case 'binary': {
      const left = constantOf(node.left)
      const right = left === undefined ? undefined : constantOf(node.right)
      if (left === undefined || right === undefined) return undefined
      if (node.operator === '+') return left + right
      if (node.operator === '-') return left - right
      if (node.operator === '*') return left * right
      if (node.operator === '/') return left / right
      return node.operator === '^' ? left ** right : undefined
    }
    default:
      return undefined
  }
}

/** A product, quotient or power, in brackets or with a sign or not. */
export const isProduct = (node: Expression): boolean => {
  if (node.type === 'binary') return node.operator === '*' || node.operator === '/' || node.operator === '^'
  if (node.type === 'group') return isProduct(node.inner)
  return node.type === 'unary' && node.operator !== 'not' && isProduct(node.operand)
}

export const isSingle = (node: Expression): boolean => node.type !== 'binary' && node.type !== 'unary'

export interface Tally {
  dimension: Dimension | undefined
  /** How often the literal 2 stands above and below; 4 counts as two. */
  twosAbove: number
  twosBelow: number
  /** Net exponent of pi. */
  pi: number
}

const twosOf = (value: number): number => (value === 2 ? 1 : value === 4 ? 2 : 0)

export const tally = (factors: readonly Factor[]): Tally => {
  let dimension: Dimension | undefined = dimensionless
  let twosAbove = 0
  let twosBelow = 0
  let pi = 0
  for (const factor of factors) {
    if (factor.kind === 'pi') pi += factor.exponent
    else if (factor.kind === 'literal') {
      const twos = twosOf(factor.value) * factor.exponent
      if (twos > 0) twosAbove += twos
      else twosBelow -= twos
    } else if (dimension !== undefined) {
      const own = factor.dimension
      if (own === dimensionless) continue
      dimension = own && product(dimension, factor.exponent === 1 ? own : power(own, factor.exponent))
    }
  }
  return { dimension, twosAbove, twosBelow, pi }
}

/** Whether (2π)^`count` stands in the product: above the line where positive, below where negative. */
export const holdsTwoPi = ({ twosAbove, twosBelow, pi }: Tally, count: number): boolean =>
  count > 0 ? twosAbove >= count && pi >= count : twosBelow >= -count && pi <= count

export const withTurns = (dimension: Dimension, count: number): Dimension =>
  dimension.map((exponent, base) => (base === 7 ? count : exponent))

export const countsTurns = (factor: Factor): boolean =>
  factor.dimension !== undefined && turns(factor.dimension) !== 0
