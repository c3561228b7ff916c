/** Unit phrases of an expression: which run of units belongs to a number, and whether it could be read otherwise. */
import type { LooseProblem } from '../../errors/problem'
import { mendable } from '../problems'
import { ambiguousUnit, offsetUnitInProduct, unclearUnit } from '../units/problems'
import { phraseOf, scanUnits, unclearAfterSlash, type UnitElement } from '../units/scan'
import { mixesOffset } from '../units/unit'
import { skipSpaces } from './characters'
import type { UnitPhrase } from './expression'
import { canonicalName } from './symbolName'
import type { Vocabulary } from './vocabulary'

export interface PhraseReading {
  unit: UnitPhrase
  to: number
  problem?: LooseProblem
}

/** The readings of a phrase as a shorter phrase (or the bare number) times quantities of the sheet. */
const productReadings = (
  text: string,
  number: { from: number; to: number },
  elements: readonly UnitElement[],
  defined: number,
): string[] => {
  const readings: string[] = []
  for (let units = elements.length - 1; units >= elements.length - defined; units--) {
    let reading = text.slice(number.from, elements[units - 1]?.to ?? number.to)
    for (const element of elements.slice(units)) {
      const written = text.slice(element.from, element.to)
      const raised = written.slice(element.name.length)
      reading += `${element.separator === '/' ? '/' : '*'}(${element.name})${raised}`
    }
    readings.push(reading)
  }
  return readings
}

/** How many names at the end of the phrase are symbols of the sheet. */
const definedAtEnd = (elements: readonly UnitElement[], vocabulary: Vocabulary): number => {
  let defined = 0
  for (let place = elements.length - 1; place >= 0; place--) {
    const name = elements[place]?.name ?? ''
    if (name === '%' || !vocabulary.isDefined(canonicalName(name))) break
    defined++
  }
  return defined
}

/** Whether number and phrase, with a sign or none, are the whole text, a trailing `to` apart. */
const isWhole = (text: string, from: number, to: number): boolean => {
  const rest = text.slice(skipSpaces(text, to))
  return /^\s*[-+−]?\s*$/.test(text.slice(0, from)) && (rest === '' || /^to\s/.test(rest))
}

/** The unit phrase after the number `from`–`to`; undefined where none follows. */
export const phraseAfter = (
  text: string,
  number: { from: number; to: number },
  vocabulary: Vocabulary,
  isFunction: (name: string) => boolean,
  field: string,
): PhraseReading | undefined => {
  const elements = scanUnits(text, number.to, isFunction)
  const first = elements[0]
  const last = elements.at(-1)
  if (first === undefined || last === undefined) return undefined
  const unit = phraseOf(text.slice(first.from, last.to), elements)
  const span = { field, from: number.from, to: last.to }
  const reading: PhraseReading = { unit, to: last.to }
  const defined = definedAtEnd(elements, vocabulary)
  if (defined > 0 && !(vocabulary.onlyUnit === true && isWhole(text, number.from, last.to))) {
    const digits = text.slice(number.from, number.to)
    const names = [...new Set(elements.slice(elements.length - defined).map((element) => element.name))]
    const readings = [`${digits} unit("${unit.text}")`, ...productReadings(text, number, elements, defined)]
    reading.problem = ambiguousUnit(text, text.slice(number.from, last.to), names, readings, span)
    return reading
  }
  const unclear = unclearAfterSlash(elements)
  if (unclear) {
    reading.problem = unclearUnit(text, elements, unclear, { field, from: first.from, to: last.to })
    return reading
  }
  if (mixesOffset(unit))
    reading.problem = offsetUnitInProduct(unit.text, { field, from: first.from, to: last.to })
  const caret = skipSpaces(text, last.to)
  if (text[caret] === '^') {
    const quantity = text.slice(number.from, last.to)
    reading.problem = mendable(
      `The exponent of a unit is a plain number, as in m^2. To raise ${quantity} as a whole, put it in brackets.`,
      text,
      { field, from: number.from, to: caret + 1 },
      `Write (${quantity})^`,
      `${text.slice(0, number.from)}(${quantity})${text.slice(last.to)}`,
    )
  }
  return reading
}
