/** What the compact form of one line holds, and what a reading of it can answer. */
import type { LibraryFunction } from '../../contracts'
import type { CompactTail } from './tail'

export type Relation = '<=' | '<' | '>=' | '>' | 'within'

export type CompactGiven = CompactTail & {
  kind: 'given'
  symbol: string
  value: string
  unit: string
  tolerance?: { plus: string; minus: string } | { fit: string }
}

export type CompactFormula = CompactTail & {
  kind: 'formula'
  symbol: string
  expression: string
  unit: string
}

export type CompactCriterion = CompactTail & {
  kind: 'criterion'
  /** Empty where the author gave none. */
  symbol: string
  demand: string
  relation: Relation
  limit: string
  upper?: string
}

export type CompactFields = CompactGiven | CompactFormula | CompactCriterion

export type CompactReading =
  | { reading: 'line'; line: CompactFields }
  /** `b = 10 m` beside a symbol `m`: the author is asked. */
  | { reading: 'ambiguous'; given: CompactFields; formula: CompactFields }
  /** Ordinary text, or not readable where a line must stand: `message` says why. */
  | { reading: 'none'; message: string }

export interface CompactContext {
  isDefined(name: string): boolean
  /** Names of functions, refused as symbols; without them every called name counts as one. */
  functions?: ReadonlyMap<string, LibraryFunction>
  /** The info word of the block it stands in; absent in a paragraph. */
  block?: CompactFields['kind']
}

export const none = (message: string): CompactReading => ({ reading: 'none', message })
export const line = (fields: CompactFields): CompactReading => ({ reading: 'line', line: fields })
