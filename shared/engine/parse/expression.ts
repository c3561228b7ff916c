/**
 * The checked syntax tree of an expression: what the lexer and the parser make of an authored text,
 * and all that dimensions, evaluation and display know of it.
 */

/** Offsets in UTF-16 units into the text as typed, `to` exclusive. */
export interface TextRange {
  from: number
  to: number
}

/** A product of powers of named units, as typed (`N/mm2`), e.g. of a literal, a unit field or after `to`. */
export interface UnitPhrase {
  /** As typed, trimmed; this is what is shown. */
  text: string
  /** Names as they stand in the unit list, with their exponents; a divided unit has a negative one. */
  factors: { unit: string; exponent: number }[]
}

export type BinaryOperator =
  '+' | '-' | '*' | '/' | '^' | '<' | '<=' | '>' | '>=' | '==' | '!=' | 'and' | 'or'

export type Expression =
  | { type: 'number'; value: number; text: string; range: TextRange }
  | { type: 'quantity'; value: number; text: string; unit: UnitPhrase; range: TextRange }
  /** `name` is canonical: Greek spelled out, members after points (`tau_max`, `S1.phi_end`). */
  | { type: 'symbol'; name: string; range: TextRange }
  | { type: 'unary'; operator: '-' | '+' | 'not'; operand: Expression; range: TextRange }
  | { type: 'binary'; operator: BinaryOperator; left: Expression; right: Expression; range: TextRange }
  /** Brackets as typed: they carry meaning for the ambiguity rules and for display. */
  | { type: 'group'; inner: Expression; range: TextRange }
  | { type: 'call'; name: string; arguments: Expression[]; range: TextRange }
  | { type: 'conditional'; test: Expression; then: Expression; otherwise: Expression; range: TextRange }
  /** A bare word where a function takes one: `R40`, `k6`. */
  | { type: 'word'; text: string; range: TextRange }
  /** A unit where a function takes one: the second argument of `numerical_value(x, MPa)`. */
  | { type: 'unit'; unit: UnitPhrase; range: TextRange }

export interface ParsedExpression {
  /** The text as typed. */
  text: string
  root: Expression
  /** The unit after a trailing `to`. */
  to?: UnitPhrase
  /** Canonical names of the symbols it reads, each once, in reading order. */
  reads: string[]
}
