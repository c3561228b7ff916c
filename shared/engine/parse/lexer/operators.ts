/** Operators and signs, as typed on a keyboard or copied from a document. */
import { mendable, syntax } from '../../problems'
import { strayCharacter } from '../unavailable'
import { settleDivision } from './division'
import { missingOperand } from './operands'
import type { Reading } from './reading'

/** Tried before the single signs: some of those begin one of these. */
const twoSigns = new Map([
  ['<=', '<='],
  ['>=', '>='],
  ['=<', '<='],
  ['=>', '>='],
  ['==', '=='],
  ['!=', '!='],
  ['<>', '!='],
])
const oneSign = new Map([
  ['+', '+'],
  ['-', '-'],
  ['−', '-'],
  ['–', '-'],
  ['*', '*'],
  ['·', '*'],
  ['⋅', '*'],
  ['×', '*'],
  ['∙', '*'],
  ['/', '/'],
  ['÷', '/'],
  ['∕', '/'],
  ['^', '^'],
  ['<', '<'],
  ['>', '>'],
  ['≤', '<='],
  ['≥', '>='],
  ['≠', '!='],
])
const comparisons = new Set(['<', '<=', '>', '>=', '==', '!='])

/** These join conditions, so a comparison may follow them once more. */
const joiners = new Set(['and', 'or', '?', ':'])

/** An operator between two values; `operator` as the grammar writes it. */
export const readBinary = (reading: Reading, operator: string, from: number, to: number): void => {
  const frame = reading.frame()
  if (joiners.has(operator)) frame.compared = false
  if (comparisons.has(operator)) {
    // The grammar would read a < b < c as (a < b) < c.
    if (frame.compared) {
      reading.fail(
        syntax('Two values are compared at a time. Write a < b and b < c.', reading.span(from, to)),
      )
    }
    frame.compared = true
  }
  if (operator !== '^') {
    settleDivision(reading, frame)
    if (operator === '/') frame.slash = to
  }
  reading.source += operator === 'and' || operator === 'or' ? ` ${operator} ` : operator
  reading.operator = operator
  reading.operatorFrom = from
  reading.raised = operator === '^'
  reading.expectAfter(to, 'operator')
}

const refuseCharacter = (reading: Reading, character: string): never => {
  const { text, at, field } = reading
  if (character === '%' || character === '°') {
    reading.fail(
      syntax(`${character} is a unit and stands after a number: 5 ${character}.`, reading.span(at, at + 1)),
    )
  }
  reading.fail(strayCharacter(text, at, field))
}

/** An operator or a sign at the place of reading, or a character that is neither. */
export const readOperator = (reading: Reading): void => {
  const { text, at } = reading
  const character = text[at] ?? ''
  const two = twoSigns.get(text.slice(at, at + 2))
  const operator = two ?? oneSign.get(character) ?? refuseCharacter(reading, character)
  const to = at + (two === undefined ? 1 : 2)
  if (operator === '*' && text[to] === '*') {
    reading.fail(
      mendable(
        'A power is written with ^.',
        text,
        reading.span(at, to + 1),
        'Write ^',
        `${text.slice(0, at)}^${text.slice(to + 1)}`,
      ),
    )
  }
  if (!reading.expectsOperand) return readBinary(reading, operator, at, to)
  if (operator !== '-' && operator !== '+') missingOperand(reading, at, text.slice(at, to))
  reading.source += operator
  // A number behind it does not stand directly after a `/`; see checkPowerOfTen.
  reading.operator = `sign ${operator}`
  reading.operatorFrom = at
  reading.expectAfter(to, 'operator')
}
