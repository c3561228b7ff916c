/** Brackets, the commas of a call, and conditions: what opens, divides and closes a part of the expression. */
import { limitExceeded, mendable, syntax } from '../../problems'
import { newFrame, type Frame } from '../tokens'
import { settleDivision } from './division'
import { readBareArgument } from './bareArguments'
import { missingOperand, multiplyImplicitly } from './operands'
import { readBinary } from './operators'
import { DEEPEST, type Reading } from './reading'

/** The bracket at the place of reading, of a call where `call` is given. */
export const openFrame = (reading: Reading, call?: Frame['call']): void => {
  const { at } = reading
  if (reading.frames.length > DEEPEST) {
    reading.fail(
      limitExceeded(
        `Brackets stand more than ${DEEPEST} deep. Split the expression into several formulas.`,
        reading.span(at, at + 1),
      ),
    )
  }
  reading.frames.push(newFrame(at, call))
  reading.source += '('
  reading.raised = false
  reading.expectAfter(at + 1, 'open')
}

/** What must be complete before a bracket, an argument or the text ends. */
export const leaveFrame = (reading: Reading, frame: Frame): void => {
  settleDivision(reading, frame)
  if (frame.questions > 0) {
    reading.fail(
      syntax(
        'A condition has ? without its :. Write test ? value : other value.',
        reading.span(Math.max(frame.open, 0), reading.end),
      ),
    )
  }
}

export const readOpening = (reading: Reading): void => {
  multiplyImplicitly(reading, reading.at)
  openFrame(reading)
}

export const readClosing = (reading: Reading): void => {
  const { text, at } = reading
  if (reading.frames.length === 1) {
    reading.fail(
      mendable(
        'A closing bracket has no opening one.',
        text,
        reading.span(at, at + 1),
        'Remove the bracket',
        text.slice(0, at) + text.slice(at + 1),
      ),
    )
  }
  const frame = reading.frame()
  // A call without arguments is left to the count of its arguments, which says what it takes.
  const isEmptyCall = reading.before === 'open' && frame.call !== undefined
  if (reading.expectsOperand && !isEmptyCall) missingOperand(reading, at, ')')
  leaveFrame(reading, frame)
  reading.frames.pop()
  reading.source += ')'
  reading.at = at + 1
  reading.end = reading.at
  reading.before = 'close'
  reading.expectsOperand = false
  reading.raised = false
}

export const readComma = (reading: Reading): void => {
  const { at } = reading
  const frame = reading.frame()
  if (frame.call === undefined) {
    reading.fail(
      syntax(
        'A comma stands only between the arguments of a function. The decimal mark is the point.',
        reading.span(at, at + 1),
      ),
    )
  }
  if (reading.expectsOperand) missingOperand(reading, at, ',')
  leaveFrame(reading, frame)
  frame.compared = false
  frame.call.argument++
  reading.source += ','
  reading.expectAfter(at + 1, 'comma')
  readBareArgument(reading)
}

/** `?` or `:` of `test ? value : other value`. */
export const readCondition = (reading: Reading, sign: '?' | ':'): void => {
  const { at } = reading
  const frame = reading.frame()
  if (reading.expectsOperand) missingOperand(reading, at, sign)
  if (sign === ':' && frame.questions === 0) {
    reading.fail(syntax(': has no ? before it. Write test ? value : other value.', reading.span(at, at + 1)))
  }
  settleDivision(reading, frame)
  frame.questions += sign === '?' ? 1 : -1
  if (reading.frames.length + frame.questions > DEEPEST) {
    reading.fail(
      limitExceeded(
        `Conditions stand more than ${DEEPEST} deep. Split the expression into several formulas.`,
        reading.span(at, at + 1),
      ),
    )
  }
  readBinary(reading, sign, at, at + 1)
}
