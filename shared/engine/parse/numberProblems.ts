/** What is said about a number that cannot stand as it was typed. */
import type { LooseProblem, Span } from '../../errors/problem'
import { mendable, repairOf, splice, syntax } from '../problems'

export const numberExpected = (shown: string, span: Span): LooseProblem =>
  syntax(
    shown === ''
      ? 'A number is missing.'
      : `${shown} is no number. Write it like 60, 60.0, 2.1e5 or 210*10^3.`,
    span,
  )

export const numberTooLarge = (shown: string, span: Span): LooseProblem => ({
  code: 'not-finite',
  message: `${shown} is too large for a number of this program. The largest is about 1.8e308.`,
  span,
})

/** `1,5`: the point is the decimal mark. `from` to `to` is the number with its comma. */
export const decimalComma = (
  text: string,
  from: number,
  comma: number,
  to: number,
  inCall: boolean,
  field: string,
): LooseProblem => {
  const shown = text.slice(from, to)
  const point = shown.replace(',', '.')
  const repairs = [repairOf(`Write ${point}`, field, splice(text, comma, comma + 1, '.'))]
  if (inCall) {
    const apart = shown.replace(',', ', ')
    repairs.push(repairOf(`Two arguments: ${apart}`, field, splice(text, comma, comma + 1, ', ')))
  }
  if (to - comma - 1 === 3) {
    repairs.push(repairOf(`Write ${shown.replace(',', '')}`, field, splice(text, comma, comma + 1, '')))
  }
  return {
    code: 'decimal-comma',
    message: `${shown} has a comma. The decimal mark is the point: ${point}.`,
    span: { field, from, to },
    repairs,
  }
}

/** `1 500`: the second number starts at `next`. */
export const joinedNumber = (
  text: string,
  from: number,
  to: number,
  next: number,
  field: string,
): LooseProblem => {
  let end = next
  while (/[\d.]/.test(text[end] ?? '')) end++
  const joined = text.slice(from, to) + text.slice(next, end)
  return mendable(
    `Two numbers stand side by side: ${text.slice(from, end)}. Write one number without the space, or an operator between them.`,
    text,
    { field, from, to: end },
    `Write ${joined}`,
    splice(text, to, next, ''),
  )
}
