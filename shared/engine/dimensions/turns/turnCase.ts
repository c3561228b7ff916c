/**
 * A product whose turns are looked at, and how its text is mended. Rotational frequency and angular velocity are
 * different quantities (ISO 80000-3); the 2π between them is the commonest slip of the trade.
 */
import type { Repair } from '../../../errors/problem'
import type { Expression, ParsedExpression, UnitPhrase } from '../../parse/expression'
import { repairOf } from '../../problems'
import { turns, type Dimension } from '../dimension'
import { countsTurns, isProduct, isSingle, type Factor } from '../factors'
import { rewritten, withNode, type Edits } from '../rewrite'

export interface TurnCase {
  parsed: ParsedExpression
  field: string
  node: Expression
  factors: readonly Factor[]
  /** Dimension asked for; undefined where nothing is. */
  target: Dimension | undefined
  unit?: UnitPhrase | undefined
}

export const typed = ({ parsed }: TurnCase, node: Expression): string =>
  parsed.text.slice(node.range.from, node.range.to)

export const spanOf = (
  { field }: TurnCase,
  { range }: Expression,
): { field: string; from: number; to: number } => ({ field, from: range.from, to: range.to })

/** The whole text with `by` in the place of the product; labelled by `label`. */
export const replacing = (at: TurnCase, label: string, by: string): Repair =>
  repairOf(label, at.field, withNode(at.parsed, at.node, by))

/** The product with some of its factors replaced or left out, and `wrap` around it. */
export const change = (
  at: TurnCase,
  edits: Edits,
  wrap: (text: string) => string = (text) => text,
): Repair => {
  const text = wrap(rewritten(at.parsed.text, at.node, edits) ?? '1')
  return replacing(at, `Write ${text}`, text)
}

/** The product times or divided by `piece`, which begins with its sign. */
export const appended = (at: TurnCase, piece: string): string => {
  const text = typed(at, at.node)
  return isProduct(at.node) || isSingle(at.node) ? `${text}${piece}` : `(${text})${piece}`
}

export const asAngularSpeed = (at: TurnCase, { node }: Factor): string => {
  const text = typed(at, node)
  return node.type === 'group' ? `angular_speed${text}` : `angular_speed(${text})`
}

/** The one pi of the product; with more of them nobody can say which one belongs to the turn. */
export const onlyPi = (factors: readonly Factor[]): Factor | undefined => {
  const pis = factors.filter((factor) => factor.kind === 'pi')
  return pis.length === 1 ? pis[0] : undefined
}

/** The one factor that counts turns, where its exponent is 1 or -1. */
export const onlyTurning = (factors: readonly Factor[]): Factor | undefined => {
  const [factor, ...others] = factors.filter(
    (candidate) => candidate.kind === 'quantity' && countsTurns(candidate),
  )
  if (factor === undefined || others.length > 0 || Math.abs(factor.exponent) !== 1) return undefined
  return Math.abs(turns(factor.dimension ?? [])) === 1 ? factor : undefined
}
