/** What is said about a unit, or about a number with one, that is unknown or can be read in two ways. */
import type { LooseProblem, Span } from '../../errors/problem'
import { either, repairOf, splice, syntax } from '../problems'
import type { UnitElement } from './scan'

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
          repairOf(`Write ${unit}`, span.field, splice(text, span.from, span.to, unit)),
        ),
      }),
})

export const unitExpected = (shown: string, span: Span): LooseProblem =>
  syntax(`A unit is expected here, not ${shown}. Write it like N m, MPa or kg/m^3.`, span)

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
    message: `${shown.trim()} can be read in two ways: after the / it is open whether ${moved} is divided, too.`,
    span,
    repairs: [
      repairOf(
        `Divide by ${moved}: ${divided.slice(span.from, last.to).trim()}`,
        span.field,
        divided,
      ),
      ...(multiplied === undefined
        ? []
        : [
            repairOf(
              `Multiply by ${moved}: ${multiplied.slice(span.from, last.to + 1).trim()}`,
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
    repairOf(
      place === 0 ? `As a unit: ${reading}` : `As a product: ${reading}`,
      span.field,
      splice(text, span.from, span.to, reading),
    ),
  ),
})
