/** Opens a product to its factors: what stands above and below the line, through brackets, signs and powers. */
import type { Expression } from '../parse/expression'
import { ambiguousDivision, mismatch } from '../problems'
import { isDimension, type Checking } from './checking'
import { dimensionless, isDimensionless, type Dimension } from './dimension'
import { constantOf, isProduct, tally, type Factor } from './factors'
import { inWords } from './words'

type Binary = Extract<Expression, { type: 'binary' }>

const isLeaf = (node: Expression): boolean =>
  node.type === 'number' ||
  node.type === 'quantity' ||
  node.type === 'symbol' ||
  (node.type === 'unary' && node.operator !== 'not' && isLeaf(node.operand)) ||
  (node.type === 'group' && isLeaf(node.inner))

/** A factor that is neither a literal nor pi. */
export const quantityFactor = (
  node: Expression,
  exponent: number,
  dimension: Dimension | undefined,
  bracket?: Expression,
): Factor => ({ node, exponent, kind: 'quantity', value: Number.NaN, dimension, bracket })

/** A power whose exponent is no constant has a fixed dimension only where its base is a bare number. */
const raised = (checking: Checking, base: Expression, exponent: Expression): Dimension | undefined => {
  const own = checking.of(base)
  const count = checking.of(exponent)
  if (own === 'truth') return checking.notValue(base)
  if (count === 'truth') return checking.notValue(exponent)
  if (isDimension(count) && !isDimensionless(count)) {
    const message = `An exponent is a bare number; ${checking.shown(exponent)} is ${inWords(count)}.`
    return checking.note(mismatch(message, checking.span(exponent)))
  }
  if (isDimension(own) && !isDimensionless(own)) {
    const shown = checking.shown(base)
    const message = `${shown} is ${inWords(own)}, and its exponent ${checking.shown(exponent)} is no constant: the result would have no fixed dimension. Divide ${shown} by a reference first.`
    return checking.note(mismatch(message, checking.span(base)))
  }
  return own === undefined || count === undefined ? undefined : dimensionless
}

/** `1/2 m` after something dimensionless: whether the unit is divided, too, both readings. */
const checkDivision = (checking: Checking, { left, right }: Binary, before: Dimension | undefined): void => {
  if (right.type !== 'quantity' || right.unit.factors.length === 0) return
  if (before === undefined || !isDimensionless(before)) return
  const { text } = checking.parsed
  const over = checking.shown(left)
  const divisor = checking.shown(right)
  const unit = text.slice(right.range.from + right.text.length, right.range.to).trim()
  const readings = [`${over}/(${divisor})`, `${over}/${right.text}*1 ${unit}`]
  checking.note(
    ambiguousDivision(
      `${over}/${divisor}`,
      readings.map((reading) => ({
        shown: reading,
        text: text.slice(0, left.range.from) + reading + text.slice(right.range.to),
      })),
      { field: checking.field, from: left.range.from, to: right.range.to },
    ),
  )
}

/**
 * Appends the factors of `node`, raised to `exponent`, to `factors`, in the order of the text.
 * @param bracket the outermost bracket of the product that it stands in
 */
export const flatten = (
  checking: Checking,
  node: Expression,
  exponent: number,
  factors: Factor[],
  bracket?: Expression,
): void => {
  const open = (part: Expression, power: number, within = bracket): void =>
    flatten(checking, part, power, factors, within)
  const add = (dimension: Dimension | undefined): void => {
    factors.push(quantityFactor(node, exponent, dimension, bracket))
  }
  switch (node.type) {
    case 'symbol':
      if (node.name !== 'pi') return add(checking.context.dimensionOfSymbol(node.name))
      factors.push({ ...quantityFactor(node, exponent, dimensionless, bracket), kind: 'pi' })
      return
    case 'number': {
      const { value } = node
      factors.push({ ...quantityFactor(node, exponent, dimensionless, bracket), kind: 'literal', value })
      return
    }
    case 'unary':
      if (node.operator !== 'not') return open(node.operand, exponent)
      break
    case 'group':
      if (isProduct(node.inner) || isLeaf(node.inner)) return open(node.inner, exponent, bracket ?? node)
      break
    case 'binary': {
      const { operator, left, right } = node
      if (operator === '*' || operator === '/') {
        const first = factors.length
        open(left, exponent)
        if (operator === '/' && right.type === 'quantity')
          checkDivision(checking, node, tally(factors.slice(first)).dimension)
        return open(right, operator === '*' ? exponent : -exponent)
      }
      if (operator === '^') {
        const constant = constantOf(right)
        return constant === undefined ? add(raised(checking, left, right)) : open(left, exponent * constant)
      }
      break
    }
    default:
  }
  const sort = checking.of(node)
  if (sort === 'truth') checking.notValue(node)
  add(sort === 'any' ? dimensionless : isDimension(sort) ? sort : undefined)
}
