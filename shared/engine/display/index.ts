/**
 * The mathematics of a line in its three forms: TeX for the screen, a tree for print, a spoken sentence.
 * One construct, one file. Nothing here computes or fails: whatever a person wrote can be drawn, and no
 * authored text enters TeX but through `safe.ts`.
 */
import type { Quantity } from '../contracts'
import type { Expression } from '../parse/expression'
import { drawChain } from './comparison'
import type { Drawn } from './drawn'
import { drawExpression } from './expression'
import { drawQuantity } from './quantity'
import { drawSymbol } from './symbol'
import type { Substitution } from './views'

export type { CriterionView, FormulaView, GivenView, StepView, Substitution } from './views'
export type { Drawn } from './drawn'
export { presentCriterion } from './criterion'
export { presentFormula, presentStep, presentValue } from './formula'
export { presentGiven } from './given'
export { formatNumber, formatQuantity, readNumber } from './number'

/** An expression as written, or with values in place of the symbols that `substitute` knows. */
export const presentExpression = (expression: Expression, substitute?: Substitution): Drawn =>
  drawExpression(expression, substitute)

/** Sides of an equality, as in a method statement: `tau`, `T*r/J` for `$tau = T*r/J$`; at least one. */
export const presentEquality = (first: Expression, ...others: Expression[]): Drawn =>
  drawChain(
    drawExpression(first),
    others.map((side) => ({ relation: '==', side: drawExpression(side) })),
  )

/** @param name canonical: `tau_max`, `S1.phi_end`. */
export const presentSymbol = (name: string): Drawn => drawSymbol(name)

export const presentQuantity = (quantity: Pick<Quantity, 'shown' | 'unit'>): Drawn => drawQuantity(quantity)
