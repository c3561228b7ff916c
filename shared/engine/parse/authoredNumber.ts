import type { LooseProblem } from '../../errors/problem'
import { isDigit, skipSpaces } from './characters'
import { decimalComma, joinedNumber, numberExpected, numberTooLarge } from './numberProblems'
import { numeralAt } from './numeral'

export type NumberReading =
  { value: number; problem?: undefined } | { value?: undefined; problem: LooseProblem }

/** A signed number as typed in a field of its own: `60.0`, `-3`, `2.1e5`, `210*10^3`, `1.2×10⁻⁵`. */
export const readAuthoredNumber = (text: string, field = 'value'): NumberReading => {
  const start = skipSpaces(text, 0)
  const negative = text[start] === '-' || text[start] === '−'
  const first = negative || text[start] === '+' ? skipSpaces(text, start + 1) : start
  const code = text.charCodeAt(first)
  if (!isDigit(code) && !(text[first] === '.' && isDigit(text.charCodeAt(first + 1)))) {
    return { problem: numberExpected(text.trim(), { field }) }
  }
  const numeral = numeralAt(text, first, true)
  if (numeral.comma !== undefined) {
    return { problem: decimalComma(text, first, numeral.comma, numeral.to, false, field) }
  }
  const next = skipSpaces(text, numeral.to)
  if (next < text.length) {
    if (isDigit(text.charCodeAt(next)) && next > numeral.to) {
      return { problem: joinedNumber(text, first, numeral.to, next, field) }
    }
    return { problem: numberExpected(text.trim(), { field }) }
  }
  if (!Number.isFinite(numeral.value)) return { problem: numberTooLarge(text.trim(), { field }) }
  return { value: negative ? -numeral.value : numeral.value }
}
