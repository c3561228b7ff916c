/** Calls: functions of the library, forms that only the graph knows, and `numerical_value`. */
import type { LooseProblem } from '../../errors/problem'
import type { Expression } from '../parse/expression'
import { isCaseMember } from '../parse/specialForms'
import { mismatch, repairOf } from '../problems'
import { dimensionOfUnit } from '../units/unit'
import { isDimension, type Checking, type Sort } from './checking'
import { dimensionless, sameDimension, type Dimension } from './dimension'
import { isDifferenceInOffset, targetMissed } from './target'
import { differenceInOffset } from './temperature'

type Call = Extract<Expression, { type: 'call' }>

/** There the literal 0 takes the dimension of the other argument; elsewhere it is a bare number. */
const takesAny = (name: string): boolean => name === 'min' || name === 'max' || name === 'atan2'

/** What the graph answers for `at`, `interpolate`, `entry` or `C.max`. */
const form = (
  checking: Checking,
  node: Call,
  argumentDimensions: (Dimension | undefined)[],
): Dimension | undefined => {
  const { context } = checking
  const answer: Dimension | LooseProblem | undefined = context.dimensionOfForm?.(node, argumentDimensions)
  return answer === undefined || !('code' in answer) ? answer : checking.note(answer)
}

/** The bare number of a quantity in a unit, for formulas that are not dimensionally homogeneous. */
const numericalValue = (checking: Checking, node: Call): Sort => {
  checking.empirical = true
  const [value, unit] = node.arguments
  if (value === undefined || unit?.type !== 'unit') return undefined
  const wanted = dimensionOfUnit(unit.unit)
  const own = checking.of(value, { dimension: wanted, unit: unit.unit })
  if (own === 'truth') return checking.notValue(value)
  if (own === undefined) return undefined
  if (isDifferenceInOffset(checking, value, unit.unit)) {
    return checking.note(differenceInOffset(unit.unit, value, checking.field))
  }
  return own === 'any' || sameDimension(own, wanted)
    ? dimensionless
    : checking.note(targetMissed(checking, value, own, wanted, unit.unit))
}

/** A unit among the arguments is the one in which the value is taken: it must be of its kind. */
const isInOtherUnit = (checking: Checking, node: Call, own: Dimension): boolean => {
  const [value] = node.arguments
  const unit = node.arguments.find((argument) => argument.type === 'unit')
  if (value === undefined || unit?.type !== 'unit') return false
  const wanted = dimensionOfUnit(unit.unit)
  if (sameDimension(own, wanted)) return false
  checking.note(targetMissed(checking, value, own, wanted, unit.unit))
  return true
}

const ofAngle = new Set(['sin', 'cos', 'tan'])

/** `sin(30)`: a bare number of more than a turn is hardly meant in radians. */
const lacksAngleUnit = (checking: Checking, node: Call): boolean => {
  const [value] = node.arguments
  if (!ofAngle.has(node.name) || value?.type !== 'number' || value.value <= 2 * Math.PI) return false
  const { text } = checking.parsed
  const { to } = value.range
  checking.note({
    code: 'ambiguous-unit',
    message: `${node.name}(${value.text}) has no unit of angle: without one, ${value.text} would be in radians.`,
    span: checking.span(value),
    repairs: ['deg', 'rad'].map((unit) =>
      repairOf(
        `Write ${value.text} ${unit}`,
        checking.field,
        `${text.slice(0, to)} ${unit}${text.slice(to)}`,
      ),
    ),
  })
  return true
}

export const ofCall = (checking: Checking, node: Call): Sort => {
  if (node.name === 'numerical_value') return numericalValue(checking, node)
  // Its arguments name outputs of the load cases; they are not computed here.
  if (isCaseMember(node.name)) return form(checking, node, [])
  /** null: a word or a unit. */
  const sorts = node.arguments.map((argument) =>
    argument.type === 'word' || argument.type === 'unit' ? null : checking.of(argument),
  )
  const truth = sorts.indexOf('truth')
  if (truth >= 0) return checking.notValue(node.arguments[truth] ?? node)
  const library = checking.context.functions.get(node.name)
  if (library === undefined) {
    return form(
      checking,
      node,
      sorts.map((sort) => (sort === null || !isDimension(sort) ? undefined : sort)),
    )
  }
  if (sorts.includes(undefined)) return undefined
  const kind = sorts.find((sort): sort is Dimension => sort !== null && isDimension(sort))
  const zero = takesAny(node.name) ? (kind ?? dimensionless) : dimensionless
  const answer = library.dimension(sorts.map((sort) => (sort === 'any' ? zero : (sort as Dimension | null))))
  if (!('message' in answer)) {
    return isInOtherUnit(checking, node, answer) || lacksAngleUnit(checking, node) ? undefined : answer
  }
  return checking.note(mismatch(answer.message, checking.span(node.arguments[answer.argument] ?? node)))
}
