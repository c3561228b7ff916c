/**
 * What every part of the engine's front says in the same way. A message says what is wrong and where, and what
 * to do, in the present tense; a repair gives the whole text of the field as it would be. What only numbers, units
 * or turns say stands beside them.
 */
import type { LooseProblem, ProblemCode, Repair, Severity, Span } from '../errors/problem'

/** Only what asks for a second look, and lets the value stand, is an advisory. */
export const severityOf = (problem: { code: ProblemCode; severity?: Severity }): Severity =>
  problem.severity ?? (problem.code === 'used-before-defined' ? 'advisory' : 'error')

/** `text` with `by` in the place of `from` to `to`. */
export const splice = (text: string, from: number, to: number, by: string): string =>
  text.slice(0, from) + by + text.slice(to)

/** The words in `texts` as one says them: `a`, `a or b`, `a, b or c`. */
export const either = (texts: readonly string[]): string =>
  texts.length <= 1 ? (texts[0] ?? '') : `${texts.slice(0, -1).join(', ')} or ${texts.at(-1)}`

/** One field's whole new text. */
export const repairOf = (label: string, field: string, text: string): Repair => ({
  label,
  fields: { [field]: text },
})

export const syntax = (message: string, span: Span, repairs?: Repair[]): LooseProblem => ({
  code: 'syntax',
  message,
  span,
  ...(repairs === undefined || repairs.length === 0 ? {} : { repairs }),
})

/** A syntax problem that one change of the text mends. */
export const mendable = (
  message: string,
  text: string,
  span: Span & { from: number; to: number },
  label: string,
  mended: string,
): LooseProblem => syntax(message, span, mended === text ? [] : [repairOf(label, span.field, mended)])

/** Two readings of a quotient; `readings` are whole texts of the field. */
export const ambiguousDivision = (
  shown: string,
  readings: readonly { shown: string; text: string }[],
  span: Span,
): LooseProblem => ({
  code: 'ambiguous-division',
  message: `${shown} can be read in two ways: ${either(readings.map((reading) => reading.shown))}.`,
  span,
  repairs: readings.map((reading) => repairOf(`Write ${reading.shown}`, span.field, reading.text)),
})

export const limitExceeded = (message: string, span: Span): LooseProblem => ({
  code: 'limit-exceeded',
  message,
  span,
})

export const mismatch = (message: string, span: Span, repairs?: Repair[]): LooseProblem => ({
  code: 'dimension-mismatch',
  message,
  span,
  ...(repairs === undefined || repairs.length === 0 ? {} : { repairs }),
})
