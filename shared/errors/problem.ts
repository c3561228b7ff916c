/**
 * What is wrong with a sheet, as data. The engine never throws for what a person wrote: it returns
 * these. A repair is data, too: applying one is another, separate act.
 */

export type LineId = string

export const problemCodes = [
  'syntax',
  'unknown-symbol',
  'duplicate-symbol',
  'repeated-line',
  'circular',
  'dimension-mismatch',
  'unit-mismatch',
  'unknown-unit',
  'ambiguous-unit',
  'ambiguous-division',
  'ambiguous-rate',
  'double-turn',
  'handbook-constant',
  'decimal-comma',
  'signed-demand',
  'domain',
  'not-finite',
  'out-of-range',
  'contested',
  'used-before-defined',
  'limit-exceeded',
  'missing-input',
  'invalid-field',
] as const

export type ProblemCode = (typeof problemCodes)[number]
export type Severity = 'error' | 'advisory'

/**
 * Where a problem is. `field` is the path of an authored field (`expression`, `demand`,
 * `inputs.outer`, `inputs.segments.2.length`: a row by its name); `from` and `to` are offsets in UTF-16 units into that
 * field's text as typed; without them the whole field is meant.
 */
export interface Span {
  field: string
  from?: number
  to?: number
}

/** One action that mends a problem: the texts that authored fields get, by path. */
export interface Repair {
  label: string
  /** The line whose fields change; the problem's own line where absent. */
  lineId?: LineId
  fields: Record<string, string>
}

export interface Problem {
  lineId?: LineId
  code: ProblemCode
  severity: Severity
  message: string
  span?: Span
  repairs?: Repair[]
  /** One-based line of a text form that could not be read. */
  textLine?: number
}

/** A problem that has no line yet: what expressions, methods and functions report to their caller. */
export type LooseProblem = Omit<Problem, 'lineId' | 'severity'> & { severity?: Severity }
