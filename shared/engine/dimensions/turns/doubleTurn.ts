/** `2*pi` beside rad/s, `180/pi` beside deg: an angle converted by hand that its unit converts already. */
import type { LooseProblem } from '../../../errors/problem'
import { unitNamed } from '../../units/registry'
import type { Checking } from '../checking'
import { dimension, sameDimension } from '../dimension'
import type { Factor } from '../factors'
import { change, spanOf, typed, type TurnCase } from './turnCase'

const perTime = dimension({ time: -1 })

/** The literal and the pi that count an angle twice, with the repair that takes them out. */
const doubleTurn = (at: TurnCase, message: string, twice: readonly Factor[]): LooseProblem => ({
  code: 'double-turn',
  message,
  span: spanOf(at, at.node),
  repairs: [change(at, new Map(twice.map((factor) => [factor.node, null])))],
})

const isAngularSpeed = (checking: Checking, { node, dimension: own }: Factor): boolean => {
  if (own === undefined || !sameDimension(own, perTime)) return false
  if (node.type === 'call') return node.name === 'angular_speed'
  return checking.unitOf(node)?.factors.some(({ unit }) => unitNamed(unit).namesAngle) === true
}

/** `(2*pi*r)`: a bracket of its own, with another quantity and without the angular speed. */
const isCircumference = (two: Factor, pi: Factor, speed: Factor, factors: readonly Factor[]): boolean =>
  two.bracket !== undefined &&
  two.bracket === pi.bracket &&
  speed.bracket !== two.bracket &&
  factors.some((factor) => factor.kind === 'quantity' && factor.bracket === two.bracket)

export const angleConvertedTwice = (checking: Checking, at: TurnCase): LooseProblem | undefined => {
  const { factors, unit: target } = at
  const literal = (value: number, sign: 1 | -1): Factor | undefined =>
    factors.find((factor) => factor.kind === 'literal' && factor.value === value && factor.exponent === sign)
  const pi = (sign: 1 | -1): Factor | undefined =>
    factors.find((factor) => factor.kind === 'pi' && factor.exponent === sign)
  const above = pi(1)
  const below = pi(-1)

  const two = literal(2, 1)
  const speed = factors.find(
    (factor) => factor.kind === 'quantity' && factor.exponent > 0 && isAngularSpeed(checking, factor),
  )
  if (two && above && speed && !isCircumference(two, above, speed, factors)) {
    const message = `${typed(at, speed.node)} is an angular speed, so 2*pi counts the turn twice. Where 2*pi belongs to a circumference, put it in brackets with the radius: (2*pi*r).`
    return doubleTurn(at, message, [two, above])
  }

  const halfTurn = literal(180, 1)
  const asksDegrees = target?.factors.some(({ unit, exponent }) => unit === 'deg' && exponent > 0)
  if (target && asksDegrees === true && halfTurn && below) {
    const message = `${target.text} converts the angle already, so 180/pi converts it twice.`
    return doubleTurn(at, message, [halfTurn, below])
  }

  const overHalfTurn = literal(180, -1)
  const angle = factors.find(
    ({ exponent, node }) => exponent > 0 && checking.unitOf(node)?.factors.some(({ unit }) => unit === 'deg'),
  )
  if (above && overHalfTurn && angle) {
    const message = `${typed(at, angle.node)} carries its unit deg, so pi/180 converts it twice.`
    return doubleTurn(at, message, [above, overHalfTurn])
  }
  return undefined
}
