/** Where a value may begin, and what is said where one is missing. */
import { mendable, syntax } from '../../problems'
import type { Reading } from './reading'

/** The value read last, as one would name it in a message. */
const shownBefore = ({ leaves, before, text }: Reading): string => {
  const leaf = leaves.at(-1)
  return before === 'close' || leaf === undefined ? 'the bracket' : text.slice(leaf.range.from, leaf.range.to)
}

/** A number begins at `from`: it never multiplies what stands before it, since `d 2` is more likely `d_2` or `d^2`. */
export const numberMayBegin = (reading: Reading, from: number): void => {
  if (reading.expectsOperand) return
  const { text, end } = reading
  reading.fail(
    mendable(
      `An operator is missing between ${shownBefore(reading)} and ${/^[\d.]+/.exec(text.slice(from))?.[0] ?? 'the number'}.`,
      text,
      reading.span(end, from + 1),
      'Write * between them',
      `${text.slice(0, end)}*${text.slice(from)}`,
    ),
  )
}

/** A name or a bracket begins at `from`: right after another value, an implicit product. */
export const multiplyImplicitly = (reading: Reading, from: number): void => {
  if (reading.expectsOperand) return
  const frame = reading.frame()
  if (frame.slash !== undefined) frame.gaps.push({ from: reading.end, to: from })
  reading.source += '*'
}

/**
 * A value is missing at `at`.
 * @param next what stands there instead; empty at the end of the text
 */
export const missingOperand = (reading: Reading, at: number, next: string): never => {
  const { before, operatorFrom, end, text } = reading
  if (before === 'open' && next === ')') {
    reading.fail(syntax('The brackets are empty.', reading.span(at - 1, at + 1)))
  }
  const after = before === 'operator' ? ` after ${text.slice(operatorFrom, end)}` : ''
  const place = after || (next === '' ? ' here' : ` before ${next}`)
  reading.fail(
    syntax(
      `A value is missing${place}.`,
      after ? reading.span(operatorFrom, end) : reading.span(at, at + Math.max(next.length, 1)),
    ),
  )
}
