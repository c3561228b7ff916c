/**
 * Reads an expression as typed, before the grammar does: names, numbers with their unit phrases, and everything
 * that the grammar would read otherwise than an engineer. Whoever follows `read` sees the whole language; what
 * each piece may be stands in `lexer/`.
 */
import type { LooseProblem } from '../../errors/problem'
import { limitExceeded, syntax } from '../problems'
import { isDigit, isNameStart, skipSpaces } from './characters'
import { readClosing, readComma, readCondition, readOpening } from './lexer/brackets'
import { checkDisplayUnitPlace, displayUnit, endExpression } from './lexer/ending'
import { nameEnd, readName } from './lexer/names'
import { isSuperscript, readNumber, readSuperscript } from './lexer/numbers'
import { missingOperand } from './lexer/operands'
import { readBinary, readOperator } from './lexer/operators'
import { Reading, Unreadable } from './lexer/reading'
import type { Lexed } from './tokens'
import type { Vocabulary } from './vocabulary'

export const LONGEST_EXPRESSION = 4000

/** Codes of the characters that decide what is read next. */
const Code = { open: 40, close: 41, comma: 44, point: 46, colon: 58, question: 63 } as const

/** `and` or `or` between two conditions. */
const readJoiner = (reading: Reading, typed: 'and' | 'or', to: number): void => {
  const { at } = reading
  if (reading.expectsOperand) missingOperand(reading, at, typed)
  readBinary(reading, typed, at, to)
}

const readNot = (reading: Reading, to: number): void => {
  if (!reading.expectsOperand) {
    reading.fail(
      syntax('not stands before a condition, after and, or, or a bracket.', reading.span(reading.at, to)),
    )
  }
  reading.source += ' not '
  reading.at = to
}

/** A name or a word of the language; answers the place after a `to`, which ends the expression. */
const readWord = (reading: Reading): number | undefined => {
  const to = nameEnd(reading)
  const typed = reading.text.slice(reading.at, to)
  if (typed === 'to') {
    checkDisplayUnitPlace(reading, reading.at)
    return to
  }
  if (typed === 'and' || typed === 'or') readJoiner(reading, typed, to)
  else if (typed === 'not') readNot(reading, to)
  else readName(reading, to)
  return undefined
}

const read = (reading: Reading): Lexed => {
  const { text } = reading
  let unitFrom: number | undefined
  while (unitFrom === undefined) {
    reading.at = skipSpaces(text, reading.at)
    if (reading.at >= text.length) break
    const code = text.charCodeAt(reading.at)
    if (isNameStart(code)) unitFrom = readWord(reading)
    else if (isDigit(code) || (code === Code.point && isDigit(text.charCodeAt(reading.at + 1)))) {
      readNumber(reading)
    } else if (code === Code.open) readOpening(reading)
    else if (code === Code.close) readClosing(reading)
    else if (code === Code.comma) readComma(reading)
    else if (code === Code.question) readCondition(reading, '?')
    else if (code === Code.colon) readCondition(reading, ':')
    else if (isSuperscript(code)) readSuperscript(reading)
    else readOperator(reading)
  }
  endExpression(reading)
  const { source, leaves } = reading
  return unitFrom === undefined ? { source, leaves } : { source, leaves, to: displayUnit(reading, unitFrom) }
}

/** Reads `text`; `lexed` is absent where it cannot be read. Never throws for what a person wrote. */
export const lex = (
  text: string,
  vocabulary: Vocabulary,
  field: string,
): { lexed?: Lexed; problems: LooseProblem[] } => {
  if (text.length > LONGEST_EXPRESSION) {
    return {
      problems: [
        limitExceeded(
          `The expression has ${text.length} characters; ${LONGEST_EXPRESSION} is the most. Split it into several formulas.`,
          { field },
        ),
      ],
    }
  }
  const reading = new Reading(text, vocabulary, field)
  try {
    const lexed = read(reading)
    return { lexed, problems: reading.problems }
  } catch (thrown) {
    if (!(thrown instanceof Unreadable)) throw thrown
    return { problems: [...reading.problems, thrown.problem] }
  }
}
