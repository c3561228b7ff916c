/**
 * The dimension of an expression before any number is computed, with every rule of sums, powers, comparisons
 * and turns. What does not fit is a problem in words. Which rule a part follows stands in `sortOf`.
 */
import type { Expression, ParsedExpression } from '../parse/expression'
import { mismatch } from '../problems'
import { dimensionOfUnit } from '../units/unit'
import { ofCall } from './calls'
import { Checking, isDimension, type Sort, type Wanted } from './checking'
import type { DimensionContext, DimensionResult } from './context'
import { dimensionless } from './dimension'
import { isProduct } from './factors'
import { ofProduct } from './products'
import { asCondition, ofBinary, ofConditional } from './sides'
import { scaleToTarget } from './target'
import { isOnScale, negatedTemperature } from './temperature'

export type { DimensionContext, DimensionResult } from './context'
export { ambiguousRate } from './rates'

const sortOf = (checking: Checking, node: Expression, wanted?: Wanted): Sort => {
  if (isProduct(node)) return ofProduct(checking, node, wanted)
  switch (node.type) {
    case 'number':
      return node.value === 0 ? 'any' : dimensionless
    case 'quantity':
      return dimensionOfUnit(node.unit)
    case 'symbol':
      return node.name === 'pi' ? dimensionless : checking.context.dimensionOfSymbol(node.name)
    case 'group':
      return checking.of(node.inner, wanted)
    case 'unary': {
      const sort = checking.of(node.operand, wanted)
      if (node.operator === 'not') return asCondition(checking, node.operand, sort, 'not')
      if (sort === 'truth') return checking.notValue(node.operand)
      return node.operator === '-' && isOnScale(node.operand, checking.unitOfName)
        ? checking.note(negatedTemperature(checking.shown(node.operand), node, checking.field))
        : sort
    }
    case 'binary':
      return ofBinary(checking, node, wanted)
    case 'conditional':
      return ofConditional(checking, node, wanted)
    case 'call':
      return ofCall(checking, node)
    default:
      return undefined
  }
}

/** The unit asked for: after `to`, else that of the line; an empty unit field asks for nothing. */
const targetOf = ({ to }: ParsedExpression, { unit }: DimensionContext): DimensionContext['unit'] =>
  to ?? (unit?.text === '' ? undefined : unit)

/** Checks an expression against its symbols and the unit asked for. Never throws for what a person wrote. */
export const checkDimensions = (parsed: ParsedExpression, context: DimensionContext): DimensionResult => {
  const checking = new Checking(parsed, context, sortOf)
  const { problems } = checking
  const target = targetOf(parsed, context)
  const wanted = target && dimensionOfUnit(target)
  const sort = checking.of(parsed.root, target && wanted && { dimension: wanted, unit: target })
  // The literal 0 alone is what is asked for.
  let own = sort === 'any' ? (wanted ?? dimensionless) : isDimension(sort) ? sort : undefined
  let scale = 1
  if (sort === 'truth') {
    const message = 'This is a condition, and a value is needed. Write condition ? value : other value.'
    checking.note(mismatch(message, checking.span(parsed.root)))
  }
  if (own !== undefined && wanted !== undefined && target !== undefined) {
    scale = scaleToTarget(checking, own, wanted, target)
    own = problems.length > 0 ? undefined : wanted
  }
  return {
    scale,
    empirical: checking.empirical,
    problems,
    ...(own === undefined ? {} : { dimension: own }),
    ...(target === undefined ? {} : { unit: target }),
  }
}
