/** A quantity: number, thin space, unit (ISO 80000-1, 7.1.4); the degree sign and its like follow at once. */
import type { Quantity, MathNode } from '../contracts'
import { binding, row, space, type Drawn } from './drawn'
import { drawNumber } from './numeral'
import { drawUnit } from './unit'

const isAngleSign = (unit: string): boolean => /^[°′″]$/u.test(unit.trim())

/** @param unit as typed; empty for a bare number. */
export const drawQuantityText = (number: string, unit: string): Drawn => {
  const value = drawNumber(number)
  if (unit.trim() === '') return value
  const named = drawUnit(unit)
  const between: MathNode[] = isAngleSign(unit) ? [] : [space]
  return {
    tex: `${value.tex}${isAngleSign(unit) ? '' : '\\,'}${named.tex}`,
    print: row(value.print, ...between, named.print),
    speech: `${value.speech} ${named.speech}`,
    binding: value.binding === binding.negative ? binding.negative : binding.quantity,
    height: 1,
    first: value.first,
    last: 'unit',
  }
}

/** The number as the engine shows it, so that a given stays as typed and a result has its digits. */
export const drawQuantity = ({ shown, unit }: Pick<Quantity, 'shown' | 'unit'>): Drawn => {
  const ending = unit.trim()
  const number = ending !== '' && shown.endsWith(ending) ? shown.slice(0, -ending.length) : shown
  return drawQuantityText(number.trim(), ending)
}
