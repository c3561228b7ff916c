/**
 * Numbers that stand in handbook formulas for the units of their quantities: `2*pi*n*T/60`, `9550*P/n`. Here the
 * quantities carry their units, so such a number would convert twice.
 */
import type { LooseProblem, Repair } from '../../../errors/problem'
import type { Expression } from '../../parse/expression'
import { dimension, sameDimension, turns, type Dimension } from '../dimension'
import { holdsTwoPi, tally, withTurns, type Factor } from '../factors'
import { asAngularSpeed, change, onlyPi, onlyTurning, spanOf, typed, type TurnCase } from './turnCase'

const torque = dimension({ mass: 1, length: 2, time: -2 })
const power = dimension({ mass: 1, length: 2, time: -3 })

/** The units that a constant between power, torque and rpm belongs to; 60, 30 and 3600 only convert time. */
interface Handbook {
  power?: string
  torque?: string
}

const handbook = new Map<number, Handbook>([
  [60, {}],
  [30, {}],
  [3600, {}],
  [9.55, { power: 'W', torque: 'N m' }],
  [9.549, { power: 'W', torque: 'N m' }],
  [9549, { power: 'kW', torque: 'N m' }],
  [9550, { power: 'kW', torque: 'N m' }],
  [5252, { power: 'hp', torque: 'lbf ft' }],
  [63_025, { power: 'hp', torque: 'lbf in' }],
  [63_000, { power: 'hp', torque: 'lbf in' }],
  [9.5493, { power: 'W', torque: 'N m' }],
  [9549.3, { power: 'kW', torque: 'N m' }],
  [9_549_000, { power: 'kW', torque: 'N mm' }],
  [9_550_000, { power: 'kW', torque: 'N mm' }],
  [33_000, {}],
  [60_000, {}],
])

/** Divisors of a circumferential speed, `pi*d*n/1000` in m/min and `pi*d*n/12` in ft/min. */
const ofCircumference = new Set([12, 1000])

/** Those that convert a time and nothing else. */
const converts = new Set([60, 3600])

/** Beside bare numbers of quantities, such a constant is where it belongs. */
const holdsBareNumbers = (factors: readonly Factor[]): boolean =>
  factors.some(({ node }) => node.type === 'call' && node.name === 'numerical_value')

const isCircumferential = (factors: readonly Factor[]): boolean =>
  onlyTurning(factors) !== undefined && onlyPi(factors)?.exponent === 1

/** Such a constant among the factors, above or below the line. */
export const handbookFactor = (factors: readonly Factor[]): Factor | undefined =>
  holdsBareNumbers(factors)
    ? undefined
    : factors.find(
        (factor) =>
          factor.kind === 'literal' &&
          Math.abs(factor.exponent) === 1 &&
          (handbook.has(factor.value) ||
            (factor.exponent === -1 && ofCircumference.has(factor.value) && isCircumferential(factors))),
      )

/** A power or a torque comes of an angular speed, never of turns. */
const isMechanical = (own: Dimension | undefined): boolean => {
  const without = own && withTurns(own, 0)
  return without !== undefined && (sameDimension(without, power) || sameDimension(without, torque))
}

/** The formula without the constant, with 2π where the turn then needs it. */
const withoutConstant = (at: TurnCase, constant: Factor): Repair => {
  const edits = new Map<Expression, string | null>([[constant.node, null]])
  const rest = at.factors.filter((factor) => factor !== constant)
  const sums = tally(rest)
  const own = sums.dimension === undefined ? 0 : turns(sums.dimension)
  const asked = at.target === undefined ? 0 : turns(at.target)
  const need = own - asked
  if (need === 0 || holdsTwoPi(sums, need)) return change(at, edits)
  const turning = onlyTurning(rest)
  if (turning === undefined)
    return asked === 1 ? change(at, edits, (text) => `${text}*1 rev`) : change(at, edits)
  const sign = onlyPi(rest)
  const isBesidePi = sign !== undefined && sign.exponent === turning.exponent
  if (converts.has(constant.value) && !isBesidePi && !isMechanical(sums.dimension)) {
    // A speed, a period, a delivery per turn: what is left counts turns, and no 2π belongs there.
    if (at.target === undefined) return change(at, edits)
    return change(at, edits, (text) => (turning.exponent > 0 ? `${text}/(1 rev)` : `${text}*1 rev`))
  }
  if (isBesidePi) edits.set(sign.node, null)
  edits.set(turning.node, asAngularSpeed(at, turning))
  // pi*n/30 is the angular speed itself; pi*D*n/60 is half of it times the diameter.
  if (!isBesidePi || constant.value === 30) return change(at, edits)
  return change(at, edits, (text) => (turning.exponent > 0 ? `${text}/2` : `2*${text}`))
}

/** The formula on bare numbers, in the units that its constant belongs to. */
const onBareNumbers = (at: TurnCase, constant: Factor): Repair | undefined => {
  const units = handbook.get(constant.value)
  const edits = new Map<Expression, string | null>()
  const bare = (factor: Factor, unit: string): void => {
    edits.set(factor.node, `numerical_value(${typed(at, factor.node)}, ${unit})`)
  }
  const quantities = at.factors.filter((factor) => factor.kind === 'quantity')
  const turning = onlyTurning(quantities)
  if (turning === undefined || units === undefined) return undefined
  bare(turning, 'rpm')
  if (units.power === undefined || units.torque === undefined) {
    if (turning.exponent !== 1 || (constant.value !== 60 && constant.value !== 30)) return undefined
    const asked = at.target === undefined ? 0 : turns(at.target)
    const piece = tally(at.factors).pi !== 0 ? '*1 rad/s' : asked === 1 ? '*1 Hz' : '*1 s^-1'
    return change(at, edits, (text) => `${text}${piece}`)
  }
  const other = quantities.find((factor) => factor !== turning)
  if (quantities.length !== 2 || other?.dimension === undefined || other.exponent !== 1) return undefined
  const givesTorque = sameDimension(other.dimension, power) && turning.exponent === -1
  const givesPower = sameDimension(other.dimension, torque) && turning.exponent === 1
  if (!givesTorque && !givesPower) return undefined
  bare(other, givesTorque ? units.power : units.torque)
  return change(at, edits, (text) => `${text}*1 ${givesTorque ? units.torque : units.power}`)
}

export const handbookConstant = (at: TurnCase, constant: Factor): LooseProblem => {
  const shown = typed(at, constant.node)
  const onBare = onBareNumbers(at, constant)
  return {
    code: 'handbook-constant',
    message: `${shown} stands beside a quantity in turns. In handbooks such a number changes units; here quantities carry their units. If ${shown} is a number of teeth or the like, give it a symbol.`,
    span: spanOf(at, constant.node),
    repairs: [withoutConstant(at, constant), ...(onBare === undefined ? [] : [onBare])],
  }
}
