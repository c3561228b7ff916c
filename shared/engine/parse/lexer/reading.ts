/** Where the reading of one expression stands: the state that every step beside this file reads and moves on. */
import type { LooseProblem } from '../../../errors/problem'
import { limitExceeded } from '../../problems'
import { specialForms } from '../specialForms'
import { newFrame, type Frame, type Leaf } from '../tokens'
import type { Vocabulary } from '../vocabulary'

const MOST_LEAVES = 1000

/** The deepest nesting of brackets and conditions; the grammar after us recurses. */
export const DEEPEST = 50

/** What ends the reading; caught where it began (lex.ts), never seen outside. */
export class Unreadable extends Error {
  constructor(readonly problem: LooseProblem) {
    super(problem.message)
  }
}

export interface FieldSpan {
  field: string
  from: number
  to: number
}

/** What the piece read last was. */
export type Piece = 'none' | 'operator' | 'number' | 'quantity' | 'symbol' | 'close' | 'open' | 'comma'

export class Reading {
  /** Offset of what is read next. */
  at = 0
  /** What the grammar will see: placeholders and operators. */
  source = ''
  readonly leaves: Leaf[] = []
  /** The whole text, then every bracket that is open. */
  readonly frames: Frame[] = [newFrame(-1)]
  expectsOperand = true
  /** End of the piece read last, and what it was. */
  end = 0
  before: Piece = 'none'
  /** The operator read last, and where it stands. */
  operator = ''
  operatorFrom = 0
  /** Directly after `^`: there no unit phrase starts, and 10^3 is no numeral. */
  raised = false
  /** What is wrong without ending the reading. */
  readonly problems: LooseProblem[] = []
  readonly isFunction: (name: string) => boolean

  constructor(
    readonly text: string,
    readonly vocabulary: Vocabulary,
    readonly field: string,
  ) {
    this.isFunction = (name) => vocabulary.functions.has(name) || specialForms.has(name)
  }

  span(from: number, to: number): FieldSpan {
    return { field: this.field, from, to }
  }

  fail(problem: LooseProblem): never {
    throw new Unreadable(problem)
  }

  /** The innermost bracket that is open. */
  frame(): Frame {
    return this.frames[this.frames.length - 1] as Frame
  }

  /** Takes a value over, whole. */
  value(leaf: Leaf, piece: Piece): void {
    this.leaf(leaf, 'v')
    this.before = piece
  }

  /** Takes the name of a function over; its bracket is read next. */
  functionName(name: string, from: number, to: number): void {
    this.leaf({ type: 'function', name, range: { from, to } }, 'f')
  }

  /** Moves on behind an operator or an opening sign: a value must follow. */
  expectAfter(to: number, piece: Piece): void {
    this.at = to
    this.end = to
    this.before = piece
    this.expectsOperand = true
  }

  private leaf(leaf: Leaf, placeholder: string): void {
    if (this.leaves.length >= MOST_LEAVES) {
      this.fail(
        limitExceeded(
          `The expression has more than ${MOST_LEAVES} names and numbers. Split it into several formulas.`,
          this.span(leaf.range.from, leaf.range.to),
        ),
      )
    }
    this.source += placeholder
    this.leaves.push(leaf)
    this.at = leaf.range.to
    this.end = this.at
    this.expectsOperand = false
    this.raised = false
  }
}
