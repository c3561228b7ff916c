/** The end of an expression: what must be closed by then, and the unit after a trailing `to`. */
import type { LooseProblem } from '../../../errors/problem'
import { mendable, syntax } from '../../problems'
import { readUnit } from '../../units/unit'
import { skipSpaces } from '../characters'
import type { UnitPhrase } from '../expression'
import { leaveFrame } from './brackets'
import { missingOperand } from './operands'
import type { Reading } from './reading'

/** Checks that nothing is open or missing where the text, or what stands before `to`, ends. */
export const endExpression = (reading: Reading): void => {
  const { text, end, field } = reading
  if (reading.expectsOperand) {
    if (reading.before === 'none') reading.fail(syntax('The expression is empty.', { field }))
    missingOperand(reading, Math.max(end - 1, 0), '')
  }
  const missing = reading.frames.length - 1
  if (missing > 0) {
    const closing = ')'.repeat(missing)
    reading.fail(
      mendable(
        missing === 1 ? 'A closing bracket is missing.' : `${missing} closing brackets are missing.`,
        text,
        reading.span(reading.frame().open, end),
        `Write ${closing} at the end`,
        text.slice(0, end) + closing,
      ),
    )
  }
  leaveFrame(reading, reading.frame())
}

/** `to` at `at` ends the expression, so it stands in no bracket and after a value. */
export const checkDisplayUnitPlace = (reading: Reading, at: number): void => {
  if (reading.expectsOperand) missingOperand(reading, at, 'to')
  if (reading.frames.length === 1) return
  const { text, end } = reading
  const closing = ')'.repeat(reading.frames.length - 1)
  reading.fail(
    mendable(
      'A closing bracket is missing before to. to stands at the end and fixes the display unit.',
      text,
      reading.span(reading.frame().open, at),
      `Write ${closing} before to`,
      `${text.slice(0, end)}${closing} ${text.slice(at)}`,
    ),
  )
}

/** @param at the place after `to` */
export const displayUnit = (reading: Reading, at: number): UnitPhrase => {
  const { text, field } = reading
  const start = skipSpaces(text, at)
  if (start >= text.length) reading.fail(syntax('A unit is missing after to.', reading.span(at - 2, at)))
  const { phrase, problem } = readUnit(text.slice(at).trim(), field)
  if (phrase === undefined) reading.fail(shifted(problem, text, start))
  return phrase
}

/** A problem of the unit at `start` of `text`, as a problem of the whole text: its repairs keep what stands before. */
const shifted = ({ span, repairs, ...problem }: LooseProblem, text: string, start: number): LooseProblem => ({
  ...problem,
  ...(span && {
    span: {
      field: span.field,
      from: (span.from ?? 0) + start,
      to: (span.to ?? text.length - start) + start,
    },
  }),
  ...(repairs && {
    repairs: repairs.map(({ label, fields }) => ({
      label,
      fields: Object.fromEntries(
        Object.entries(fields).map(([field, unit]) => [field, text.slice(0, start) + unit]),
      ),
    })),
  }),
})
