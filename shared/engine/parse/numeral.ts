/** Numbers in a text: digits[.digits][e±int], or that times 10^int written out, as one piece. */
import { isDigit, skipSpaces, superscriptDigit } from './characters'

export interface Numeral {
  value: number
  to: number
  /** Offset of the comma of `1,5`, read as a point. */
  comma?: number
  /** Offset of the sign before 10^int, where it is written out: `210*10^3`. */
  times?: number
}

const isSign = (text: string, at: number): boolean => text[at] === '-' || text[at] === '−' || text[at] === '+'

const digitsEnd = (text: string, at: number): number => {
  while (isDigit(text.charCodeAt(at))) at++
  return at
}

/** `10^3`, `10^-3`, `10⁻³` at `at`: its exponent and end, where nothing else is raised with it. */
const powerOfTen = (text: string, at: number): { exponent: number; to: number } | undefined => {
  if (text[at] !== '1' || text[at + 1] !== '0' || isDigit(text.charCodeAt(at + 2))) return undefined
  const raised = text[at + 2] === '⁻' ? at + 3 : at + 2
  let to = raised
  let size = 0
  for (
    let digit = superscriptDigit(text.charCodeAt(to));
    digit >= 0;
    digit = superscriptDigit(text.charCodeAt(to))
  ) {
    size = size * 10 + digit
    to++
  }
  let negative = raised > at + 2
  if (to === raised) {
    const caret = skipSpaces(text, at + 2)
    if (text[caret] !== '^') return undefined
    let first = skipSpaces(text, caret + 1)
    negative = text[first] === '-' || text[first] === '−'
    if (isSign(text, first)) first++
    to = digitsEnd(text, first)
    if (to === first || text[to] === '.') return undefined
    size = Number(text.slice(first, to))
  }
  const next = text[skipSpaces(text, to)]
  if (size > 400 || next === '^' || superscriptDigit(text.charCodeAt(to)) >= 0 || text[to] === '⁻')
    return undefined
  return { exponent: negative ? -size : size, to }
}

/**
 * The number that starts at `at`, which is a digit or a point before one.
 * @param joins whether a power of ten written out belongs to it (not in an exponent)
 */
export const numeralAt = (text: string, at: number, joins: boolean): Numeral => {
  const bare = joins ? powerOfTen(text, at) : undefined
  if (bare) return { value: Number(`1e${bare.exponent}`), to: bare.to }
  let to = digitsEnd(text, at)
  let comma: number | undefined
  if (text[to] === '.' && isDigit(text.charCodeAt(to + 1))) to = digitsEnd(text, to + 1)
  else if (text[to] === ',' && to > at && isDigit(text.charCodeAt(to + 1))) {
    comma = to
    to = digitsEnd(text, to + 1)
  }
  let digits = text.slice(at, to)
  if (comma !== undefined) digits = digits.replace(',', '.')
  const letter = text[to]
  if (letter === 'e' || letter === 'E') {
    const first = isSign(text, to + 1) ? to + 2 : to + 1
    const end = digitsEnd(text, first)
    if (end > first) {
      const value = Number(`${digits}e${text.slice(to + 1, end).replace('−', '-')}`)
      return { value, to: end, ...(comma === undefined ? {} : { comma }) }
    }
  }
  if (joins) {
    const sign = skipSpaces(text, to)
    if (text[sign] === '*' || text[sign] === '·' || text[sign] === '×' || text[sign] === '⋅') {
      const power = powerOfTen(text, skipSpaces(text, sign + 1))
      if (power) {
        const value = Number(`${digits}e${power.exponent}`)
        return { value, to: power.to, times: sign, ...(comma === undefined ? {} : { comma }) }
      }
    }
  }
  return { value: Number(digits), to, ...(comma === undefined ? {} : { comma }) }
}
