import type { Expression, UnitPhrase } from './expression'

/** What the lexer hands to the grammar: a source of placeholders and what each of them stands for. */
export type Leaf =
  | Extract<Expression, { type: 'number' | 'quantity' | 'symbol' | 'word' | 'unit' }>
  | { type: 'function'; name: string; range: { from: number; to: number } }

export interface Lexed {
  /** Placeholders (`v`, before its arguments `f`) and operators: all that the grammar sees of the text. */
  source: string
  /** What the placeholders stand for, in their order. */
  leaves: Leaf[]
  to?: UnitPhrase
}

/** A bracket, a call or the whole text: what has been read inside it so far. */
export interface Frame {
  /** Offset of its opening bracket; -1 for the text as a whole. */
  open: number
  /** Name and arguments, where it is a call. */
  call?: { name: string; kinds: readonly (string | undefined)[]; argument: number }
  /** `?` that wait for their `:`. */
  questions: number
  compared: boolean
  /** End of the `/` whose divisor is being read. */
  slash?: number
  /** Gaps of implicit products within that divisor. */
  gaps: { from: number; to: number }[]
}

export const newFrame = (open: number, call?: Frame['call']): Frame => ({
  open,
  questions: 0,
  compared: false,
  gaps: [],
  ...(call === undefined ? {} : { call }),
})
