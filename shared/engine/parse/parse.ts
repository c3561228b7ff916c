import type { LooseProblem } from '../../errors/problem'
import type { ParsedExpression } from './expression'
import type { Vocabulary } from './vocabulary'

export type { Vocabulary } from './vocabulary'

export interface ParseResult {
  /** Absent where a problem of severity error stands in the way. */
  parsed?: ParsedExpression
  problems: LooseProblem[]
}

/**
 * Reads an expression. Spans and repairs name `field` (`expression` unless told otherwise).
 */
export declare const parseExpression: (text: string, vocabulary: Vocabulary, field?: string) => ParseResult
