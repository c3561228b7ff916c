/** Whether an expression fits the unit asked for, by `to`, by the line or by `numerical_value`. */
import type { LooseProblem, Repair } from '../../errors/problem'
import type { Expression, UnitPhrase } from '../parse/expression'
import { mismatch, repairOf } from '../problems'
import { countsTurns, isOffset, namesAngle } from '../units/unit'
import type { Checking } from './checking'
import { dimension, sameDimension, turns, type Dimension } from './dimension'
import { isProduct, withTurns, type Factor } from './factors'
import { flatten, quantityFactor } from './flatten'
import { mending } from './mending'
import { differenceInOffset, temperatureKind } from './temperature'
import type { TurnCase } from './turns/turnCase'
import { turnsLeftOver } from './turns/turnsLeftOver'
import { turnsMissing } from './turns/turnsMissing'
import { inWords } from './words'

const torque = dimension({ mass: 1, length: 2, time: -2 })
const massTimesLength = dimension({ mass: 1, length: 1 })

const withoutArticle = (wanted: Dimension): string => inWords(wanted).replace(/^an? (?!quantity in)/, '')

/** `lb in` is mass times length; where a torque is expected, `lbf in` is meant. */
const poundForceRepair = (
  checking: Checking,
  node: Expression,
  own: Dimension,
  wanted: Dimension,
  unit: UnitPhrase,
): Repair | undefined => {
  const { text, to } = checking.parsed
  const meant = (phrase: UnitPhrase): string => phrase.text.replace(/\blbm?\b/, 'lbf')
  if (sameDimension(own, massTimesLength) && sameDimension(wanted, torque) && node.type === 'quantity') {
    const mended = checking.shown(node).replace(node.unit.text, meant(node.unit))
    const whole = text.slice(0, node.range.from) + mended + text.slice(node.range.to)
    return repairOf(`Write ${mended}`, checking.field, whole)
  }
  if (!sameDimension(own, torque) || !sameDimension(wanted, massTimesLength)) return undefined
  const label = `Show it in ${meant(unit)}`
  if (to === undefined) return repairOf(label, 'unit', meant(unit))
  const asked = text.lastIndexOf(unit.text)
  const whole = text.slice(0, asked) + meant(unit) + text.slice(asked + unit.text.length)
  return repairOf(label, checking.field, whole)
}

/** `node` is not what its unit asks for. */
export const targetMissed = (
  checking: Checking,
  node: Expression,
  own: Dimension,
  wanted: Dimension,
  unit: UnitPhrase,
): LooseProblem => {
  if (sameDimension(withTurns(own, 0), withTurns(wanted, 0))) {
    const factors: Factor[] = []
    if (isProduct(node)) flatten(checking, node, 1, factors)
    else factors.push(quantityFactor(node, 1, own))
    const { parsed, field } = checking
    const at: TurnCase = { parsed, field, node, factors, target: wanted, unit }
    return turns(own) === 0 ? turnsMissing(at, own) : turnsLeftOver(at)
  }
  const repair = poundForceRepair(checking, node, own, wanted, unit)
  const hint = repair ? ' lb is a mass; the force is lbf.' : mending(own, wanted)
  const message = `${checking.shown(node)} is ${inWords(own)}; ${unit.text} is a unit of ${withoutArticle(wanted)}.${hint}`
  return mismatch(message, checking.span(node), repair && [repair])
}

/** `n to rad/s`, `omega to rpm`: a single symbol or unit phrase whose own unit is a turn or names rad. */
const conversion = (
  checking: Checking,
  own: Dimension,
  wanted: Dimension,
  target: UnitPhrase,
): number | undefined => {
  const { root } = checking.parsed
  const single = root.type === 'group' ? root.inner : root
  if (single.type !== 'symbol' && single.type !== 'quantity') return undefined
  const unit = checking.unitOf(single)
  const leaves = turns(own)
  const arrives = turns(wanted)
  if (leaves !== 0 && arrives === 0 && namesAngle(target)) return (2 * Math.PI) ** leaves
  return leaves === 0 && arrives !== 0 && unit && namesAngle(unit) && countsTurns(target)
    ? (2 * Math.PI) ** -arrives
    : undefined
}

/** A difference of absolute temperatures, asked for in a unit that counts from a zero of its own. */
export const isDifferenceInOffset = (
  { unitOfName }: Checking,
  node: Expression,
  target: UnitPhrase,
): boolean => isOffset(target) && temperatureKind(node, unitOfName) === 'difference'

/** The scale from the computed number to SI; notes what does not fit. */
export const scaleToTarget = (
  checking: Checking,
  own: Dimension,
  wanted: Dimension,
  target: UnitPhrase,
): number => {
  const { root } = checking.parsed
  if (sameDimension(own, wanted)) {
    if (isDifferenceInOffset(checking, root, target))
      checking.note(differenceInOffset(target, root, checking.field))
    return 1
  }
  if (sameDimension(withTurns(own, 0), withTurns(wanted, 0))) {
    const scale = conversion(checking, own, wanted, target)
    if (scale !== undefined) return scale
  }
  checking.note(targetMissed(checking, root, own, wanted, target))
  return 1
}
