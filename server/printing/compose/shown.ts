/** SI numbers in the units of the sheet, and texts of the expression language as mathematics. */
import type { Dimension, LibraryFunction, MathNode, Quantity } from '@shared/engine/contracts'
import { presentEquality, presentExpression, presentQuantity, presentSymbol } from '@shared/engine/display'
import { builtins } from '@shared/engine/evaluate/builtins'
import { quantityOf } from '@shared/engine/evaluate/quantity'
import type { Expression } from '@shared/engine/parse/expression'
import { parseExpression } from '@shared/engine/parse/parse'
import { canonicalName } from '@shared/engine/parse/symbolName'
import { noUnit, readUnit } from '@shared/engine/units/unit'
import { libraryFunctions } from '@shared/mechanics/library'
import { DEFAULT_DIGITS } from '@shared/pipeline'
import type { Sheet } from '@shared/sheet/sheet'
import type { Parts, Piece } from '../pages'
import { shallow } from './shallow'

export type UnitSystem = Sheet['front']['unitSystem']

/** A value with its unit in either system, as specs and working name it. */
export interface Kind {
  dimension: Dimension
  unit: { SI: string; US: string }
}

export const quantityIn = (si: number, { dimension, unit }: Kind, system: UnitSystem): Quantity =>
  quantityOf(si, dimension, readUnit(unit[system]).phrase ?? noUnit, DEFAULT_DIGITS)

/** `1200 N·m`: a value inside a drawing or a sentence, where it is text. */
export const quantityText = ({ shown, unit }: Pick<Quantity, 'shown' | 'unit'>): string =>
  unit !== '' && shown.endsWith(unit)
    ? `${shown.slice(0, -unit.length)}${unit.trim().replace(/\s+/g, '·')}`
    : shown

const functions: ReadonlyMap<string, LibraryFunction> = new Map([
  ...builtins,
  ...libraryFunctions.map((one) => [one.name, one] as const),
])
const nothingDefined = { isDefined: () => false, functions }

/** Undefined for a text that is no expression. */
export const expressionOf = (text: string): Expression | undefined =>
  parseExpression(text, nothingDefined).parsed?.root

/** An input of an analysis as typed, where one number with one unit is just that. */
export const inputExpression = (text: string): Expression | undefined =>
  parseExpression(text, { ...nothingDefined, onlyUnit: true }).parsed?.root

export const symbolNode = (symbol: string): MathNode => presentSymbol(canonicalName(symbol.trim())).print
export const quantityNode = (quantity: Pick<Quantity, 'shown' | 'unit'>): MathNode =>
  presentQuantity(quantity).print
export const expressionNode = (expression: Expression): MathNode =>
  shallow(presentExpression(expression).print)

/** Parts of a line or a step, as deep as they can be drawn. */
export const printedParts = ({ symbolic, substituted, result }: Parts): Parts => ({
  ...(symbolic && { symbolic: shallow(symbolic) }),
  ...(substituted && { substituted: shallow(substituted) }),
  ...(result && { result: shallow(result) }),
})

export const text = (words: string): Piece => ({ is: 'text', text: words })
export const math = (node: MathNode): Piece => ({ is: 'math', math: node })
export const cell = (words: string): Piece[] => (words === '' ? [] : [text(words)])

export const heads = (...names: string[]): Piece[][] => names.map(cell)

/** Sides of an equality, parted at the equals signs that stand outside of brackets. */
const sidesOf = (formula: string): string[] => {
  const sides = ['']
  let depth = 0
  for (const [index, character] of [...formula].entries()) {
    if (character === '(') depth++
    if (character === ')') depth--
    const neighbours = `${formula[index - 1] ?? ''}${formula[index + 1] ?? ''}`
    if (character === '=' && depth === 0 && !/[<>=!]/.test(neighbours)) sides.push('')
    else sides[sides.length - 1] += character
  }
  return sides.map((side) => side.trim())
}

/** `tau = T*r/J` as mathematics; undefined where a side is no expression. */
export const equalityNode = (formula: string): MathNode | undefined => {
  const sides = sidesOf(formula).map(expressionOf)
  const [first, ...others] = sides
  if (!first) return undefined
  const rest = others.filter((side) => side !== undefined)
  return rest.length === others.length ? shallow(presentEquality(first, ...rest).print) : undefined
}

/** Text with formulas between dollar signs, as a method statement has them. */
export const piecesOfStatement = (statement: string): Piece[] =>
  statement.split('$').flatMap((part, index): Piece[] => {
    if (part === '') return []
    if (index % 2 === 0) return [text(part)]
    const node = equalityNode(part)
    return [node ? math(node) : { is: 'text', text: part, italic: true }]
  })
