/** Finds the longest run of units at a place in a text; used by unit fields and by the lexer of expressions. */
import type { UnitPhrase } from '../parse/expression'
import { isDigit, isNamePart, isNameStart, skipSpaces, superscriptDigit } from '../parse/characters'
import { unitsSpelled, type Unit } from './registry'

export interface UnitElement {
  separator: '' | ' ' | '*' | '/'
  /** Offset of the separator (the end of what went before). */
  after: number
  from: number
  to: number
  /** As typed, without its exponent. */
  name: string
  units: readonly Unit[]
  exponent: number
}

/** End of the number at `at` (digits[.digits]), or `at` where none starts there. */
const plainNumberEnd = (text: string, at: number): number => {
  let end = at
  while (isDigit(text.charCodeAt(end))) end++
  if (end > at && text[end] === '.' && isDigit(text.charCodeAt(end + 1))) {
    end++
    while (isDigit(text.charCodeAt(end))) end++
  }
  return end
}

const superscriptAt = (text: string, at: number): { exponent: number; end: number } | undefined => {
  let end = at
  const negative = text[end] === '⁻'
  if (negative) end++
  const first = end
  let exponent = 0
  for (;;) {
    const digit = superscriptDigit(text.charCodeAt(end))
    if (digit < 0) break
    exponent = exponent * 10 + digit
    end++
  }
  return end === first ? undefined : { exponent: negative ? -exponent : exponent, end }
}

const exponentAt = (text: string, at: number): { exponent: number; end: number } | undefined => {
  const raised = superscriptAt(text, at)
  if (raised) return raised
  const caret = skipSpaces(text, at)
  if (text[caret] !== '^') return undefined
  let start = skipSpaces(text, caret + 1)
  const negative = text[start] === '-' || text[start] === '−'
  if (negative) start++
  const end = plainNumberEnd(text, start)
  if (end === start) return undefined
  const size = Number(text.slice(start, end))
  return { exponent: negative ? -size : size, end }
}

/** End of the name at `at`: letters, digits, `_`, or one of the signs for degree and percent. */
const nameEnd = (text: string, at: number): number => {
  const code = text.charCodeAt(at)
  if (text[at] === '%') return at + 1
  let end = at
  if (text[at] === '°' || text[at] === 'º') end++
  else if (!isNameStart(code)) return at
  while (isNamePart(text.charCodeAt(end))) end++
  return end
}

/** One unit with its exponent at `at`; undefined where no unit stands there. */
const elementAt = (
  text: string,
  at: number,
  isFunction: (name: string) => boolean,
): Omit<UnitElement, 'separator' | 'after'> | undefined => {
  let end = nameEnd(text, at)
  if (end === at || text[end] === "'" || text[end] === '′') return undefined
  if (text[end] === '.' && isNameStart(text.charCodeAt(end + 1))) return undefined
  let name = text.slice(at, end).replace('º', '°')
  if (text[end] === '-' && isNameStart(text.charCodeAt(end + 1))) {
    const further = nameEnd(text, end + 1)
    const joined = unitsSpelled(text.slice(at, further))
    if (joined) return { from: at, to: further, name: text.slice(at, further), units: joined, exponent: 1 }
  }
  let units = unitsSpelled(name)
  if (units === undefined) {
    let letters = end
    while (letters > at && isDigit(text.charCodeAt(letters - 1))) letters--
    if (letters === end || letters === at) return undefined
    name = text.slice(at, letters)
    units = unitsSpelled(name)
    return units && { from: at, to: end, name, units, exponent: Number(text.slice(letters, end)) }
  }
  if (isFunction(name) && text[skipSpaces(text, end)] === '(') return undefined
  const raised = exponentAt(text, end)
  if (raised) end = raised.end
  return { from: at, to: end, name, units, exponent: raised?.exponent ?? 1 }
}

const isTimes = (sign: string | undefined): boolean =>
  sign === '*' || sign === '·' || sign === '×' || sign === '⋅'

const neverFunction = (_name: string): boolean => false

/** The longest run of units that starts at `at` (spaces before it allowed); empty where there is none. */
export const scanUnits = (text: string, at: number, isFunction = neverFunction): UnitElement[] => {
  const elements: UnitElement[] = []
  let after = at
  for (;;) {
    let place = skipSpaces(text, after)
    let separator: UnitElement['separator'] = elements.length === 0 ? '' : ' '
    if (elements.length > 0) {
      const sign = text[place]
      if (isTimes(sign)) separator = '*'
      else if (sign === '/' || sign === '÷') separator = '/'
      else if (place === after) return elements
      if (separator !== ' ') place = skipSpaces(text, place + 1)
    }
    const element = elementAt(text, place, isFunction)
    if (element === undefined) return elements
    elements.push({ ...element, separator, after })
    after = element.to
  }
}

/** The phrase of elements that stand side by side in `text`. */
export const phraseOf = (text: string, elements: readonly UnitElement[], inverse = false): UnitPhrase => {
  const factors: UnitPhrase['factors'] = []
  for (const [place, { separator, units, exponent }] of elements.entries()) {
    const sign = separator === '/' || (inverse && place === 0) ? -1 : 1
    for (const unit of units) factors.push({ unit: unit.name, exponent: sign * exponent })
  }
  return { text: text.trim(), factors }
}

/** The first element that follows a `/` by a space or `*`: a reader cannot know whether it is divided, too. */
export const unclearAfterSlash = (
  elements: readonly UnitElement[],
  inverse = false,
): UnitElement | undefined => {
  let divided = inverse
  for (const element of elements) {
    if (element.separator === '/') divided = true
    else if (divided && element.separator !== '') return element
  }
  return undefined
}
