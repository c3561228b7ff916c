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
