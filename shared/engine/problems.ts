/**
 * What the engine's front says about a text, word by word. A message says what is wrong and where, and what
 * to do, in the present tense; a repair gives the whole text of the field as it would be.
 */
import type { LooseProblem, ProblemCode, Repair, Severity, Span } from '../errors/problem'
import type { UnitElement } from './units/scan'

/** Only what asks for a second look, and lets the value stand, is an advisory. */
export const severityOf = (problem: { code: ProblemCode; severity?: Severity }): Severity =>
  problem.severity ?? (problem.code === 'used-before-defined' ? 'advisory' : 'error')

const splice = (text: string, from: number, to: number, by: string): string =>
  text.slice(0, from) + by + text.slice(to)

/** The words in `texts` as one says them: `a`, `a or b`, `a, b or c`. */
export const either = (texts: readonly string[]): string =>
  texts.length <= 1 ? (texts[0] ?? '') : `${texts.slice(0, -1).join(', ')} or ${texts.at(-1)}`

const repair = (label: string, field: string, text: string): Repair => ({ label, fields: { [field]: text } })

export const syntax = (message: string, span: Span, repairs?: Repair[]): LooseProblem => ({
  code: 'syntax',
  message,
  span,
  ...(repairs === undefined || repairs.length === 0 ? {} : { repairs }),
})

/** A syntax problem that one change of the text mends. */
export const mendable = (
  message: string,
  text: string,
  span: Span & { from: number; to: number },
  label: string,
  mended: string,
): LooseProblem => syntax(message, span, mended === text ? [] : [repair(label, span.field, mended)])

// ---------------------------------------------------------------- numbers

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
  const repairs = [repair(`Write ${point}`, field, splice(text, comma, comma + 1, '.'))]
  if (inCall) {
    const apart = shown.replace(',', ', ')
    repairs.push(repair(`Two arguments: ${apart}`, field, splice(text, comma, comma + 1, ', ')))
  }
  if (to - comma - 1 === 3) {
    repairs.push(repair(`Write ${shown.replace(',', '')}`, field, splice(text, comma, comma + 1, '')))
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

// ---------------------------------------------------------------- units

export const unknownUnit = (
  name: string,
  near: readonly string[],
  text: string,
  span: Span & { from: number; to: number },
): LooseProblem => ({
  code: 'unknown-unit',
  message:
    near.length === 0
      ? `${name} is no unit of the list.`
      : `${name} is no unit of the list. ${near.length === 1 ? 'Near it is' : 'Near it are'} ${either(near).replace(' or ', ' and ')}.`,
  span,
  ...(near.length === 0
    ? {}
    : {
        repairs: near.map((unit) =>
          repair(`Write ${unit}`, span.field, splice(text, span.from, span.to, unit)),
        ),
      }),
})

export const unitExpected = (shown: string, span: Span): LooseProblem =>
  syntax(`A unit is expected here, not ${shown}. Write it like N m, MPa or kg/m^3.`, span)

const withoutSpaces = (text: string): string => text.trim()

/** `W/m K`: after a `/`, a space or `*` leaves open what is divided. */
export const unclearUnit = (
  text: string,
  elements: readonly UnitElement[],
  unclear: UnitElement,
  span: Span & { from: number; to: number },
): LooseProblem => {
  const last = elements.at(-1) ?? unclear
  const divided = splice(text, unclear.after, unclear.from, '/')
  const first = elements[0]
  const moved = text.slice(unclear.from, unclear.to)
  const multiplied =
    first === undefined || elements.indexOf(unclear) < 1
      ? undefined
      : text.slice(0, firstSlash(elements)) +
        ` ${moved}` +
        text.slice(firstSlash(elements), unclear.after) +
        text.slice(unclear.to)
  const shown = text.slice(span.from, last.to)
  return {
    code: 'ambiguous-division',
    message: `${withoutSpaces(shown)} can be read in two ways: after the / it is open whether ${moved} is divided, too.`,
    span,
    repairs: [
      repair(`Divide by ${moved}: ${withoutSpaces(divided.slice(span.from, last.to))}`, span.field, divided),
      ...(multiplied === undefined
        ? []
        : [
            repair(
              `Multiply by ${moved}: ${withoutSpaces(multiplied.slice(span.from, last.to + 1))}`,
              span.field,
              multiplied,
            ),
          ]),
    ],
  }
}

const firstSlash = (elements: readonly UnitElement[]): number =>
  elements.find((element) => element.separator === '/')?.after ?? elements[0]?.from ?? 0

export const offsetUnitInProduct = (unit: string, span: Span): LooseProblem => ({
  code: 'unit-mismatch',
  message: `${unit} counts from a zero of its own, so it cannot stand in a product. Write a difference of temperature in K or degR.`,
  span,
})

/** A number with a unit phrase that is also a shorter phrase times quantities of the sheet. */
export const ambiguousUnit = (
  text: string,
  shown: string,
  names: readonly string[],
  readings: readonly string[],
  span: Span & { from: number; to: number },
): LooseProblem => ({
  code: 'ambiguous-unit',
  message: `${shown} can be read in ${readings.length === 2 ? 'two' : 'several'} ways: ${names.join(' and ')} ${names.length === 1 ? 'is' : 'are'} both a unit and a symbol of this sheet.`,
  span,
  repairs: readings.map((reading, place) =>
    repair(
      place === 0 ? `As a unit: ${reading}` : `As a product: ${reading}`,
      span.field,
      splice(text, span.from, span.to, reading),
    ),
  ),
})

// ---------------------------------------------------------------- division

/** Two readings of a quotient; `readings` are whole texts of the field. */
export const ambiguousDivision = (
  shown: string,
  readings: readonly { shown: string; text: string }[],
  span: Span,
): LooseProblem => ({
  code: 'ambiguous-division',
  message: `${shown} can be read in two ways: ${either(readings.map((reading) => reading.shown))}.`,
  span,
  repairs: readings.map((reading) => repair(`Write ${reading.shown}`, span.field, reading.text)),
})

// ---------------------------------------------------------------- bounds

export const limitExceeded = (message: string, span: Span): LooseProblem => ({
  code: 'limit-exceeded',
  message,
  span,
})

// ---------------------------------------------------------------- dimensions

export const mismatch = (message: string, span: Span, repairs?: Repair[]): LooseProblem => ({
  code: 'dimension-mismatch',
  message,
  span,
  ...(repairs === undefined || repairs.length === 0 ? {} : { repairs }),
})

export const repairOf = repair
