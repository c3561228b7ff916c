/** Units as people type them, and their sizes in SI. */
import type { LooseProblem } from '../../errors/problem'
import type { Dimension } from '../dimensions/dimension'
import { dimensionless, power, product } from '../dimensions/dimension'
import { skipSpaces } from '../parse/characters'
import type { UnitPhrase } from '../parse/expression'
import { nearestNames } from '../parse/nearest'
import { offsetUnitInProduct, unclearUnit, unitExpected, unknownUnit } from './problems'
import { unitNamed, unitSpellings } from './registry'
import { phraseOf, scanUnits, unclearAfterSlash } from './scan'

export type UnitReading =
  { phrase: UnitPhrase; problem?: undefined } | { phrase?: undefined; problem: LooseProblem }

export const noUnit: UnitPhrase = { text: '', factors: [] }

/** What somebody who typed this may have meant; one-letter names that are symbols here are no units. */
const meant = new Map([
  ['t', 'tonne'],
  ['L', 'litre'],
  ['C', 'degC'],
  ['F', 'degF'],
  ['R', 'degR'],
  ['d', 'day'],
  ['mpa', 'MPa'],
  ['U/min', 'rpm'],
  ['r/min', 'rpm'],
  ['PS', 'hp_metric'],
  ['"', 'in'],
  ["'", 'ft'],
])

export const unitsNear = (name: string): string[] => {
  const known = meant.get(name)
  if (known !== undefined) return [known]
  const lower = name.toLowerCase()
  const sameLetters = unitSpellings().filter((unit) => unit.toLowerCase() === lower)
  return sameLetters.length > 0 ? sameLetters.slice(0, 3) : nearestNames(name, unitSpellings())
}

const read = (text: string, field: string): UnitReading => {
  const trimmed = text.trim()
  if (trimmed === '') return { phrase: noUnit }
  let start = skipSpaces(text, 0)
  let inverse = false
  if (text[start] === '1') {
    const slash = skipSpaces(text, start + 1)
    if (text[slash] === '/') {
      start = slash + 1
      inverse = true
    } else if (slash === text.length) return { phrase: { text: trimmed, factors: [] } }
  }
  const elements = scanUnits(text, start)
  const last = elements.at(-1)
  const end = skipSpaces(text, last?.to ?? start)
  if (end < text.length) {
    const rest = text.slice(end).replace(/^[\s*/·×]+/, '')
    const name = /^[^\s*/·×^]+/.exec(rest)?.[0] ?? rest
    const from = text.indexOf(name, end)
    const shown = name.replace(/(?<=\D)\d+$/, '')
    return {
      problem: /^[\p{L}°"']/u.test(name)
        ? unknownUnit(shown, unitsNear(shown), text, { field, from, to: from + shown.length })
        : unitExpected(name, { field, from: end, to: text.length }),
    }
  }
  if (last === undefined) return { problem: unitExpected(trimmed, { field, from: start, to: text.length }) }
  const unclear = unclearAfterSlash(elements, inverse)
  if (unclear) return { problem: unclearUnit(text, elements, unclear, { field, from: start, to: last.to }) }
  const phrase = phraseOf(text, elements, inverse)
  if (mixesOffset(phrase))
    return { problem: offsetUnitInProduct(phrase.text, { field, from: start, to: last.to }) }
  return { phrase }
}

/** degC or degF beside another unit or with an exponent: there only a difference has a meaning. */
export const mixesOffset = (phrase: UnitPhrase): boolean =>
  phrase.factors.some(({ unit }) => unitNamed(unit).zero !== undefined) &&
  (phrase.factors.length > 1 || phrase.factors[0]?.exponent !== 1)

const readings = new Map<string, UnitPhrase>()
const READINGS_KEPT = 2000

/** A unit where only a unit can stand (a unit field, after `to`); empty text is the phrase without factors. */
export const readUnit = (text: string, field = 'unit'): UnitReading => {
  const kept = readings.get(text)
  if (kept !== undefined) return { phrase: kept }
  const reading = read(text, field)
  if (reading.phrase !== undefined) {
    if (readings.size >= READINGS_KEPT) readings.clear()
    readings.set(text, reading.phrase)
  }
  return reading
}

interface Size {
  dimension: Dimension
  value: number
  tens: number
  zero: number
}

const sizes = new WeakMap<UnitPhrase, Size>()

/** Powers of ten are kept apart, so that 60 mm is 60/1000 m, correctly rounded. */
const sizeOf = (phrase: UnitPhrase): Size => {
  const kept = sizes.get(phrase)
  if (kept !== undefined) return kept
  let dimension = dimensionless
  let value = 1
  let tens = 0
  let zero = 0
  for (const { unit: name, exponent } of phrase.factors) {
    const unit = unitNamed(name)
    dimension = product(dimension, exponent === 1 ? unit.dimension : power(unit.dimension, exponent))
    if (unit.value !== 1) value *= exponent === 1 ? unit.value : unit.value ** exponent
    tens += unit.tens * exponent
    if (phrase.factors.length === 1) zero = unit.zero ?? 0
  }
  const size = { dimension, value, tens, zero }
  sizes.set(phrase, size)
  return size
}

const timesTens = (number: number, tens: number): number =>
  tens === 0 ? number : tens > 0 ? number * 10 ** tens : number / 10 ** -tens

export const dimensionOfUnit = (phrase: UnitPhrase): Dimension => sizeOf(phrase).dimension

/** SI value of one unit; the zero of degC and degF is no part of it. */
export const factorOf = (phrase: UnitPhrase): number => {
  const { value, tens } = sizeOf(phrase)
  return timesTens(value, tens)
}

/** SI value of `number` in `phrase`; degC and degF alone are absolute temperatures. */
export const toSI = (number: number, phrase: UnitPhrase): number => {
  const { value, tens, zero } = sizeOf(phrase)
  return timesTens(number * value, tens) + zero
}

/** The number of an SI value in `phrase`. */
export const fromSI = (si: number, phrase: UnitPhrase): number => {
  const { value, tens, zero } = sizeOf(phrase)
  return timesTens(si - zero, -tens) / value
}

/** True for degC and degF standing alone. */
export const isOffset = (phrase: UnitPhrase): boolean => sizeOf(phrase).zero !== 0

export const countsTurns = (phrase: UnitPhrase): boolean =>
  phrase.factors.some(({ unit }) => unitNamed(unit).countsTurns)

/** Names rad or deg. */
export const namesAngle = (phrase: UnitPhrase): boolean =>
  phrase.factors.some(({ unit }) => unitNamed(unit).namesAngle)

const spokenPower = (spoken: string, exponent: number): string => {
  if (exponent === 1) return spoken
  if (exponent === 2) return `square ${spoken}`
  if (exponent === 3) return `cubic ${spoken}`
  return `${spoken} to the power ${exponent}`
}

/** `megapascal`, `newton metre`, `degree per metre`. */
export const spokenUnit = (phrase: UnitPhrase): string => {
  const words = (sign: 1 | -1): string =>
    phrase.factors
      .filter(({ exponent }) => exponent * sign > 0)
      .map(({ unit, exponent }) => spokenPower(unitNamed(unit).spoken, exponent * sign))
      .join(sign > 0 ? ' ' : ' per ')
  const over = words(1)
  const under = words(-1)
  if (under === '') return over
  return over === '' ? `per ${under}` : `${over} per ${under}`
}
