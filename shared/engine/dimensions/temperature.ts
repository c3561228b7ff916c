/** Absolute temperatures and differences are different things; degC and degF count from a zero of their own. */
import type { LooseProblem } from '../../errors/problem'
import type { Expression, UnitPhrase } from '../parse/expression'
import { isOffset } from '../units/unit'
import { mismatch } from '../problems'

type UnitOf = (name: string) => UnitPhrase | undefined

/** The offset unit that a literal or a symbol is given in. */
export const offsetUnitOf = (node: Expression, unitOf: UnitOf): UnitPhrase | undefined => {
  if (node.type === 'group') return offsetUnitOf(node.inner, unitOf)
  const unit = node.type === 'quantity' ? node.unit : node.type === 'symbol' ? unitOf(node.name) : undefined
  return unit !== undefined && isOffset(unit) ? unit : undefined
}

/** A temperature on its scale, or how far two lie apart; kelvin can be either, so it says neither. */
export type TemperatureKind = 'absolute' | 'difference'

/** Functions whose value is one of their arguments. */
const handingOn = new Set(['abs', 'min', 'max'])

/** What an expression of temperatures is, as far as the units of its parts tell. */
export const temperatureKind = (node: Expression, unitOf: UnitOf): TemperatureKind | undefined => {
  const kind = (part: Expression) => temperatureKind(part, unitOf)
  switch (node.type) {
    case 'quantity':
    case 'symbol':
      return offsetUnitOf(node, unitOf) && 'absolute'
    case 'group':
      return kind(node.inner)
    case 'unary':
      return kind(node.operand)
    case 'conditional':
      return kind(node.then) ?? kind(node.otherwise)
    case 'call':
      return handingOn.has(node.name) ? node.arguments.map(kind).find((found) => found) : undefined
    case 'binary':
      return kindOfOperation(node.operator, kind(node.left), kind(node.right))
    default:
      return undefined
  }
}

const kindOfOperation = (
  operator: string,
  left: TemperatureKind | undefined,
  right: TemperatureKind | undefined,
): TemperatureKind | undefined => {
  if (operator === '-') return right === 'absolute' ? 'difference' : left
  if (operator === '+') return left === 'absolute' || right === 'absolute' ? 'absolute' : (left ?? right)
  return operator === '*' || operator === '/' ? (left ?? right) : undefined
}

/** One side is a difference, the other stands on a scale: 60 K against 50 degC would be 60 K against 323 K. */
export const differenceAgainstScale = (field: string): LooseProblem => ({
  code: 'unit-mismatch',
  message:
    'A difference of temperatures is compared with a temperature on its scale. Write the limit of a difference in K or degR.',
  span: { field },
})

const spanned = (node: Expression, field: string) => ({ field, from: node.range.from, to: node.range.to })

export const offsetInProduct = (
  shown: string,
  unit: UnitPhrase,
  node: Expression,
  field: string,
): LooseProblem => ({
  code: 'unit-mismatch',
  message:
    node.type === 'quantity'
      ? `${shown} is an absolute temperature, so it cannot stand in a product. Write a difference in K or degR.`
      : `${shown} is an absolute temperature in ${unit.text}, so it cannot stand in a product. If it is a difference, give it in K; if the absolute temperature is meant, write (${shown} - 0 K).`,
  span: spanned(node, field),
})

export const sumOfTemperatures = (node: Expression, field: string): LooseProblem =>
  mismatch('Two absolute temperatures have no sum. Write the difference in K or degR.', spanned(node, field))

export const differenceInOffset = (unit: UnitPhrase, node: Expression, field: string): LooseProblem => ({
  code: 'unit-mismatch',
  message: `This is a difference of temperature; ${unit.text} counts from a zero of its own. Show it in K or degR.`,
  span: spanned(node, field),
})

/** A temperature on a scale that is more than one literal: the minus of `-20 degC` belongs to its number. */
export const isOnScale = (node: Expression, unitOf: UnitOf): boolean =>
  node.type !== 'quantity' && temperatureKind(node, unitOf) === 'absolute'

export const negatedTemperature = (shown: string, node: Expression, field: string): LooseProblem => ({
  code: 'unit-mismatch',
  message: `${shown} is a temperature on its scale, which has no negative. Write a difference, or a number such as -20 degC.`,
  span: spanned(node, field),
})
