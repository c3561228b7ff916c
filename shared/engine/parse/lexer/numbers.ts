/** A number with the unit phrase that belongs to it, and exponents written above the line. */
import { mendable, syntax } from '../../problems'
import { scanUnits } from '../../units/scan'
import { superscriptDigit } from '../characters'
import { decimalComma, joinedNumber, numberTooLarge } from '../numberProblems'
import { numeralAt } from '../numeral'
import { phraseAfter } from '../phrases'
import { checkPowerOfTen } from './division'
import { missingOperand, numberMayBegin } from './operands'
import { quotedUnitAt } from './quotedUnit'
import type { Reading } from './reading'

/** `5 1/s`: in a unit field that is a unit, in an expression it is not. */
const refuseInverseUnit = (reading: Reading): void => {
  const { text, at } = reading
  const inverse = /^1\s*\/\s*/.exec(text.slice(at))
  const under = inverse && scanUnits(text, at + inverse[0].length)[0]
  if (!under) return
  const written = `${under.name}^-${under.exponent}`
  reading.fail(
    mendable(
      `${text.slice(at, under.to)} is no unit inside an expression. Write ${written}.`,
      text,
      reading.span(at, under.to),
      `Write ${written}`,
      text.slice(0, at) + written + text.slice(under.to),
    ),
  )
}

/** `1 500`: a number right after a number. */
const refuseSecondNumber = (reading: Reading): void => {
  const { text, at, field } = reading
  const first = reading.leaves.at(-1)
  if (reading.expectsOperand || reading.before !== 'number' || first === undefined) return
  refuseInverseUnit(reading)
  reading.fail(joinedNumber(text, first.range.from, first.range.to, at, field))
}

export const readNumber = (reading: Reading): void => {
  const { text, at, field, raised } = reading
  refuseSecondNumber(reading)
  numberMayBegin(reading, at)
  const numeral = numeralAt(text, at, !raised)
  const { value } = numeral
  if (numeral.comma !== undefined) {
    const inCall = reading.frame().call !== undefined
    reading.problems.push(decimalComma(text, at, numeral.comma, numeral.to, inCall, field))
  }
  const digits = text.slice(at, numeral.to)
  const ofDigits = { from: at, to: numeral.to }
  if (!Number.isFinite(value)) reading.fail(numberTooLarge(digits, reading.span(at, numeral.to)))
  const phrase =
    quotedUnitAt(reading, numeral.to) ??
    (raised ? undefined : phraseAfter(text, ofDigits, reading.vocabulary, reading.isFunction, field))
  checkPowerOfTen(reading, numeral, phrase?.to ?? numeral.to)
  if (phrase === undefined) {
    reading.value({ type: 'number', value, text: digits, range: ofDigits }, 'number')
    return
  }
  if (phrase.problem) reading.problems.push(phrase.problem)
  const range = { from: at, to: phrase.to }
  reading.value({ type: 'quantity', value, text: digits, unit: phrase.unit, range }, 'quantity')
}

/** Whether a character stands above the line: `²`, `⁻`, `ⁿ`. */
export const isSuperscript = (code: number): boolean =>
  superscriptDigit(code) >= 0 || code === 0x207b || code === 0x207f

/** `x²`, `10⁻³`, `xⁿ`: an exponent written above the line. */
export const readSuperscript = (reading: Reading): void => {
  const { text, at } = reading
  if (reading.expectsOperand) missingOperand(reading, at, text[at] ?? '')
  if (text[at] === 'ⁿ') {
    reading.source += '^'
    reading.value({ type: 'symbol', name: 'n', range: { from: at, to: at + 1 } }, 'symbol')
    return
  }
  const negative = text[at] === '⁻'
  let to = negative ? at + 1 : at
  let size = 0
  let digits = ''
  for (
    let digit = superscriptDigit(text.charCodeAt(to));
    digit >= 0;
    digit = superscriptDigit(text.charCodeAt(to))
  ) {
    size = size * 10 + digit
    digits += String(digit)
    to++
  }
  if (digits === '') {
    reading.fail(syntax('A raised minus needs raised digits after it: x⁻¹.', reading.span(at, at + 1)))
  }
  reading.source += '^'
  const value = negative ? -size : size
  const shown = (negative ? '-' : '') + digits
  // Not 'number': a digit after an exponent misses an operator; it does not continue a number.
  reading.value({ type: 'number', value, text: shown, range: { from: at, to } }, 'symbol')
}
