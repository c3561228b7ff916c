/** Turns stand where none are asked for: `n*T to kW`, `pi*D*n`. */
import type { LooseProblem, Repair } from '../../../errors/problem'
import type { Expression } from '../../parse/expression'
import { mismatch } from '../../problems'
import { dimension, sameDimension, turns } from '../dimension'
import { countsTurns, tally, withTurns } from '../factors'
import { inWords } from '../words'
import {
  appended,
  asAngularSpeed,
  change,
  onlyPi,
  onlyTurning,
  replacing,
  spanOf,
  typed,
  type TurnCase,
} from './turnCase'

const torque = dimension({ mass: 1, length: 2, time: -2 })
const power = dimension({ mass: 1, length: 2, time: -3 })

/** Puts `angular_speed(n)` for n; beside pi so that the value stays the same, since it brings 2π of its own. */
const angularSpeedRepair = (at: TurnCase): Repair | undefined => {
  const factor = onlyTurning(at.factors)
  if (factor === undefined) return undefined
  const named = asAngularSpeed(at, factor)
  if (tally(at.factors).pi === 0) return change(at, new Map([[factor.node, named]]))
  const pi = onlyPi(at.factors)
  if (pi === undefined || pi.exponent !== factor.exponent) return undefined
  const above = factor.exponent > 0
  const edits = new Map<Expression, string | null>([
    [pi.node, above ? named : null],
    [factor.node, above ? null : named],
  ])
  return change(at, edits, (text) => (above ? `${text}/2` : `2*${text}`))
}

/** Each turn may be one event, as a passing tooth; never where a power or torque comes out. */
const perTurnRepair = (at: TurnCase): Repair | undefined => {
  const { pi, dimension: own } = tally(at.factors)
  if (pi !== 0 || own === undefined) return undefined
  const left = turns(own) - (at.target === undefined ? 0 : turns(at.target))
  const without = withTurns(own, 0)
  if (left !== 1 || sameDimension(without, power) || sameDimension(without, torque)) return undefined
  const text = appended(at, '/(1 rev)')
  return replacing(at, `Write ${text}, where each turn is one event`, text)
}

export const turnsLeftOver = (at: TurnCase): LooseProblem => {
  const names = [...new Set(at.factors.filter(countsTurns).map((factor) => typed(at, factor.node)))]
  const shown = names.length === 0 ? typed(at, at.node) : names.join(' and ')
  const counts = names.length > 1 ? 'count' : 'counts'
  const asked = at.target && (at.unit && at.unit.text !== '' ? at.unit.text : inWords(at.target))
  const against = asked === undefined ? 'pi stands beside it without the 2 of 2*pi' : `${asked} has none`
  return mismatch(
    `${shown} ${counts} turns, and ${against}. An angular speed is 2π times the rotational frequency.`,
    spanOf(at, at.node),
    [angularSpeedRepair(at), perTurnRepair(at)].filter((repair) => repair !== undefined),
  )
}
