/** A line in the engine: its texts, what each stage made of them, and what others may know of it. */
import type { EngineLine, LineId, LineResult, LooseProblem, Problem } from '../contracts'
import type { Place } from '../graph/readingOrder'
import type { SymbolEntry } from '../graph/symbolTable'
import { withoutReferences, type Checked, type Outcome, type Publication, type Reading } from './stages'

/** From which stage on a line is out of date. */
export const stale = { nothing: 0, numbers: 1, types: 2, links: 3 } as const
export type Stale = (typeof stale)[keyof typeof stale]

export interface SheetNode {
  readonly id: LineId
  line: EngineLine
  place: Place<SheetNode>
  /** Canonical; absent where the symbol is missing or no symbol. */
  symbol?: string
  symbolProblem?: LooseProblem
  defines?: SymbolEntry<SheetNode>
  reading: Reading
  /** Names of which it matters to this line whether the sheet defines them. */
  asks?: Set<string>
  linkProblems: LooseProblem[]
  nameProblems: LooseProblem[]
  checked: Checked
  standing: Standing
  outcome: Outcome
  circle?: Circle
  stale: Stale
  published: Published
  result: LineResult
}

/** Lines that are computed from one another. */
export interface Circle {
  /** Their symbols, in reading order. */
  names: readonly string[]
  symbols: ReadonlySet<string>
  /** All names in one text: two circles with the same one are the same. */
  key: string
}

/** What holds of a line before its numbers are known. */
export interface Standing {
  problems: Problem[]
  /** No number can come out of it. */
  isBlocked: boolean
  /** Names that it reads and that the sheet defines. */
  reads: string[]
}

/** What readers were told last: where this stays, they stay, too. */
export interface Published {
  publication?: Publication
  numbers?: Readonly<Record<string, number>>
  /** What one waits for who reads this. */
  roots: readonly string[]
}

export const nothingPublished: Published = { roots: [] }

export const emptyReading: Reading = { ...withoutReferences, problems: [], check: () => ({ problems: [] }) }

/** Only the first definition of a symbol counts. */
export const isDefiner = (node: SheetNode): boolean => node.defines?.definers[0] === node

const none: ReadonlySet<SheetNode> = new Set()

export const dependentsOf = (node: SheetNode): ReadonlySet<SheetNode> =>
  (isDefiner(node) && node.defines?.readers) || none

export const lacks = (node: SheetNode, stage: Stale): void => {
  if (node.stale < stage) node.stale = stage
}
