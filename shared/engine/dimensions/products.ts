/** Products, quotients and powers: the dimension of their factors, and whether turns and 2π fit together. */
import type { LooseProblem } from '../../errors/problem'
import type { Expression } from '../parse/expression'
import type { Checking, Sort, Wanted } from './checking'
import { turns } from './dimension'
import { countsTurns, holdsTwoPi, tally, withTurns, type Factor } from './factors'
import { flatten } from './flatten'
import { offsetInProduct, offsetUnitOf } from './temperature'
import { angleConvertedTwice } from './turns/doubleTurn'
import { handbookConstant, handbookFactor } from './turns/handbookConstant'
import { turnsLeftOver } from './turns/turnsLeftOver'
import type { TurnCase } from './turns/turnCase'

/** An absolute temperature times something: its number depends on where the scale begins. */
const offsetFactor = (checking: Checking, factors: readonly Factor[]): LooseProblem | undefined => {
  if (factors.length === 1 && factors[0]?.exponent === 1) return undefined
  for (const { node, dimension } of factors) {
    // Most factors are no temperature; their unit need not be looked up.
    if (dimension === undefined || dimension[4] === 0) continue
    const unit = offsetUnitOf(node, checking.unitOfName)
    if (unit !== undefined) return offsetInProduct(checking.shown(node), unit, node, checking.field)
  }
  return undefined
}

/** Constants that do by hand what the units do already. */
const needlessConstant = (checking: Checking, at: TurnCase, besidePi: boolean): LooseProblem | undefined => {
  const { factors, target } = at
  const turning = factors.some((factor) => factor.kind === 'quantity' && countsTurns(factor))
  if (turning || (target !== undefined && turns(target) !== 0)) {
    const constant = handbookFactor(factors)
    if (constant) return handbookConstant(at, constant)
    if (turning) return undefined
  }
  return besidePi ? angleConvertedTwice(checking, at) : undefined
}

export const ofProduct = (checking: Checking, node: Expression, wanted: Wanted | undefined): Sort => {
  const factors: Factor[] = []
  const known = checking.problems.length
  flatten(checking, node, 1, factors)
  if (checking.problems.length > known) return undefined
  const sums = tally(factors)
  const at: TurnCase = {
    parsed: checking.parsed,
    field: checking.field,
    node,
    factors,
    target: wanted?.dimension,
    unit: wanted?.unit,
  }
  const problem = offsetFactor(checking, factors) ?? needlessConstant(checking, at, sums.pi !== 0)
  if (problem) return checking.note(problem)
  const own = sums.dimension
  if (own === undefined) return undefined
  const asked = wanted === undefined ? 0 : turns(wanted.dimension)
  const need = turns(own) - asked
  if (need === 0) return own
  if (holdsTwoPi(sums, need)) return withTurns(own, asked)
  // Without a target, what counts turns may stay; beside a lone pi it is the slip of pi*D*n.
  if (wanted === undefined && sums.pi !== 0 && factors.some(countsTurns)) {
    return checking.note(turnsLeftOver(at))
  }
  return own
}
