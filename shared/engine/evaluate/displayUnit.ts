/**
 * The unit in which an expression's value shows where its author asked for none: that of the quantity
 * it hands on (`d_o`, `1.2*d_o`, `max(d_1, d_2)`), else the default of its dimension. Never a unit found
 * by simplifying: mm·N stays no surprise, and a torque stays N·m.
 */
import { isDimensionless, sameDimension, type Dimension } from '../dimensions/dimension'
import { temperatureKind } from '../dimensions/temperature'
import type { Expression, UnitPhrase } from '../parse/expression'
import { defaultUnit } from '../units/defaults'
import { dimensionOfUnit, isOffset } from '../units/unit'
import type { CheckScope } from './stages'

/** Functions whose value is one of their arguments, or close to one. */
const handingOn = new Set(['abs', 'min', 'max', 'preferred', 'preferred_below', 'round', 'ceil', 'floor'])

type UnitOf = (name: string) => UnitPhrase | undefined

const handedOn = (expression: Expression, unitOf: UnitOf): UnitPhrase | undefined => {
  switch (expression.type) {
    case 'quantity':
      return expression.unit
    case 'symbol':
      return unitOf(expression.name)
    case 'group':
      return handedOn(expression.inner, unitOf)
    case 'unary':
      return handedOn(expression.operand, unitOf)
    case 'conditional':
      return handedOn(expression.then, unitOf) ?? handedOn(expression.otherwise, unitOf)
    case 'binary':
      if ('+-*/'.includes(expression.operator)) return ofOperation(expression, unitOf)
      return undefined
    case 'call': {
      const [first] = expression.arguments
      if (!handingOn.has(expression.name) || !first) return undefined
      return handedOn(first, unitOf)
    }
    default:
      return undefined
  }
}

/** A product hands on the unit of its one factor that has one; the dimension decides whether that fits. */
const ofOperation = ({ operator, left, right }: Expression & { type: 'binary' }, unitOf: UnitOf) => {
  const ofLeft = handedOn(left, unitOf)
  if (operator === '/') return ofLeft
  const ofRight = handedOn(right, unitOf)
  if (ofLeft && !isDimensionless(dimensionOfUnit(ofLeft))) return ofLeft
  return ofRight && !isDimensionless(dimensionOfUnit(ofRight)) ? ofRight : (ofLeft ?? ofRight)
}

export const displayUnit = (
  expression: Expression,
  dimension: Dimension,
  scope: Pick<CheckScope, 'typeOf' | 'settings'>,
): UnitPhrase => {
  const unitOf: UnitOf = (name) => scope.typeOf(name)?.unit
  const unit = handedOn(expression, unitOf)
  // A difference of temperatures does not count from the zero of its parts' scale: 60 K, never -213 degC.
  if (unit && isOffset(unit) && temperatureKind(expression, unitOf) === 'difference')
    return defaultUnit(dimension, scope.settings.unitSystem)
  if (unit && sameDimension(dimensionOfUnit(unit), dimension) && !isPercentOfProduct(expression, unit))
    return unit
  return defaultUnit(dimension, scope.settings.unitSystem)
}

/** A product of percentages or angles is a bare number, not one of them. */
const isPercentOfProduct = (expression: Expression, unit: UnitPhrase): boolean =>
  expression.type === 'binary' && '*/'.includes(expression.operator) && isDimensionless(dimensionOfUnit(unit))
