/**
 * What the turn rules say of a product that breaks one, with repairs. Rotational frequency and angular velocity
 * are different quantities (ISO 80000-3); the 2π between them is the commonest slip of the trade.
 */
import type { LooseProblem, Repair } from '../../errors/problem'
import type { Expression, ParsedExpression, UnitPhrase } from '../parse/expression'
import { mismatch, repairOf } from '../problems'
import { dimension, sameDimension, turns, type Dimension } from './dimension'
import { countsTurns, holdsTwoPi, isProduct, isSingle, tally, withTurns, type Factor } from './factors'
import { rewritten, withNode, type Edits } from './rewrite'
import { inWords } from './words'

const torque = dimension({ mass: 1, length: 2, time: -2 })
const power = dimension({ mass: 1, length: 2, time: -3 })
const perTime = dimension({ time: -1 })

export interface TurnCase {
  parsed: ParsedExpression
  field: string
  node: Expression
  factors: readonly Factor[]
  /** Dimension asked for; undefined where nothing is. */
  target: Dimension | undefined
  unit?: UnitPhrase | undefined
}

const typed = ({ parsed }: TurnCase, node: Expression): string =>
  parsed.text.slice(node.range.from, node.range.to)

const spanOf = ({ field, node }: TurnCase): { field: string; from: number; to: number } => ({
  field,
  from: node.range.from,
  to: node.range.to,
})

const change = (at: TurnCase, edits: Edits, wrap: (text: string) => string = (text) => text): Repair => {
  const text = wrap(rewritten(at.parsed.text, at.node, edits) ?? '1')
  return repairOf(`Write ${text}`, at.field, withNode(at.parsed, at.node, text))
}

const appended = (at: TurnCase, piece: string): string => {
  const text = typed(at, at.node)
  return isProduct(at.node) || isSingle(at.node) ? `${text}${piece}` : `(${text})${piece}`
}

const asAngularSpeed = (at: TurnCase, factor: Factor): string => {
  const text = typed(at, factor.node)
  return factor.node.type === 'group' ? `angular_speed${text}` : `angular_speed(${text})`
}

const onlyPi = (factors: readonly Factor[]): Factor | undefined => {
  const pis = factors.filter((factor) => factor.kind === 'pi')
  return pis.length === 1 ? pis[0] : undefined
}

/** The one factor that counts turns, where its exponent is 1 or -1. */
const onlyTurning = (factors: readonly Factor[]): Factor | undefined => {
  const turning = factors.filter((factor) => factor.kind === 'quantity' && countsTurns(factor))
  const [factor] = turning
  return turning.length === 1 &&
    factor &&
    Math.abs(factor.exponent) === 1 &&
    Math.abs(turns(factor.dimension ?? [])) === 1
    ? factor
    : undefined
}

/** Puts `angular_speed(n)` for n; beside pi so that the value stays the same. */
const angularRepair = (at: TurnCase): Repair | undefined => {
  const factor = onlyTurning(at.factors)
  if (factor === undefined) return undefined
  const { pi } = tally(at.factors)
  const named = asAngularSpeed(at, factor)
  if (pi === 0) return change(at, new Map([[factor.node, named]]))
  const sign = onlyPi(at.factors)
  if (sign === undefined || sign.exponent !== factor.exponent) return undefined
  if (factor.exponent > 0) {
    return change(
      at,
      new Map<Expression, string | null>([
        [sign.node, named],
        [factor.node, null],
      ]),
      (text) => `${text}/2`,
    )
  }
  return change(
    at,
    new Map<Expression, string | null>([
      [sign.node, null],
      [factor.node, named],
    ]),
    (text) => `2*${text}`,
  )
}

/** Turns stand where none are asked for: `n*T to kW`, `pi*D*n`. */
export const turnsLeftOver = (at: TurnCase): LooseProblem => {
  const names = [...new Set(at.factors.filter(countsTurns).map((factor) => typed(at, factor.node)))]
  const shown = names.length === 0 ? typed(at, at.node) : names.join(' and ')
  const counts = names.length > 1 ? 'count' : 'counts'
  const { pi, dimension: own } = tally(at.factors)
  const repairs: Repair[] = []
  const angular = angularRepair(at)
  if (angular) repairs.push(angular)
  const left = own === undefined ? 0 : turns(own) - (at.target === undefined ? 0 : turns(at.target))
  const without = own && withTurns(own, 0)
  const isPower = without !== undefined && (sameDimension(without, power) || sameDimension(without, torque))
  if (pi === 0 && left === 1 && !isPower) {
    const text = appended(at, '/(1 rev)')
    repairs.push(
      repairOf(`Write ${text}, where each turn is one event`, at.field, withNode(at.parsed, at.node, text)),
    )
  }
  const wanted =
    at.target === undefined
      ? `${shown} ${counts} turns, and pi stands beside it without the 2 of 2*pi.`
      : `${shown} ${counts} turns, and ${at.unit && at.unit.text !== '' ? at.unit.text : inWords(at.target)} has none.`
  return mismatch(`${wanted} An angular speed is 2π times the rotational frequency.`, spanOf(at), repairs)
}

/** Turns are asked for and none are there: `sqrt(k/I) to Hz`, `1/t_p to Hz`. */
export const turnsMissing = (at: TurnCase, own: Dimension): LooseProblem => {
  const text = typed(at, at.node)
  const repairs: Repair[] = []
  if (sameDimension(own, perTime)) {
    const call = `frequency(${at.node.type === 'group' ? typed(at, at.node.inner) : text})`
    repairs.push(
      repairOf(`${text} is an angular speed: ${call}`, at.field, withNode(at.parsed, at.node, call)),
    )
  }
  if (at.target !== undefined && turns(at.target) === 1) {
    const counted = appended(at, '*1 rev')
    repairs.push(
      repairOf(`${text} counts turns: ${counted}`, at.field, withNode(at.parsed, at.node, counted)),
    )
  }
  const unit = at.unit?.text ?? 'the unit'
  return mismatch(
    `${unit} counts turns, and ${text} has none. Say whether it is an angular speed or a count of turns.`,
    spanOf(at),
    repairs,
  )
}

// ---------------------------------------------------------------- constants of handbooks

interface Handbook {
  power?: string
  torque?: string
}

/** Numbers that stand in handbook formulas for the units of their quantities. */
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
])

/** Beside bare numbers of quantities, such a constant is where it belongs. */
const holdsBareNumbers = (factors: readonly Factor[]): boolean =>
  factors.some(({ node }) => node.type === 'call' && node.name === 'numerical_value')

export const handbookFactor = (factors: readonly Factor[]): Factor | undefined =>
  holdsBareNumbers(factors)
    ? undefined
    : factors.find(
        (factor) =>
          factor.kind === 'literal' && Math.abs(factor.exponent) === 1 && handbook.has(factor.value),
      )

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
  if (sign !== undefined && sign.exponent === turning.exponent) edits.set(sign.node, null)
  edits.set(turning.node, asAngularSpeed(at, turning))
  return change(at, edits)
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
    if (turning.exponent !== 1) return undefined
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
    span: { field: at.field, from: constant.node.range.from, to: constant.node.range.to },
    repairs: [withoutConstant(at, constant), ...(onBare === undefined ? [] : [onBare])],
  }
}

/** The literal and the pi that count an angle twice, taken out. */
export const doubleTurn = (at: TurnCase, message: string, twice: readonly Factor[]): LooseProblem => ({
  code: 'double-turn',
  message,
  span: spanOf(at),
  repairs: [change(at, new Map(twice.map((factor) => [factor.node, null])))],
})
