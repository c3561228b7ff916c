/**
 * What line views read and ask for. The readings are reactive: a view draws inside an effect and is
 * drawn again when what it read has changed, and only then.
 */
import type { LineId, LineResult, Presentation, Problem, QuoteResult } from '@shared/engine/contracts'
import type { Repair } from '@shared/errors/problem'
import type { Line, LineKind } from '@shared/sheet/kinds'

export interface PenHolder {
  name: string
  initials: string
  /** A custom property of the palette, `var(--pen-plum)`. */
  colour: string
  isMine: boolean
}

export type HostPart = 'fields' | 'results'

export interface Desk {
  line: (id: LineId) => Line | undefined
  result: (id: LineId) => LineResult | undefined
  presentation: (id: LineId) => Presentation | undefined
  quote: (id: string) => QuoteResult | undefined
  /** `3.12`; empty while the line is not in the page yet. */
  numberOf: (id: LineId) => string
  /** True when its shown value is older than what was asked for, for more than 300 ms. */
  isStale: (id: LineId) => boolean
  /** How a source is shown: its title and edition, or the text itself where it names no key. */
  sourceShown: (source: string) => string
  holder: (id: LineId) => PenHolder | undefined
  mayEdit: () => boolean
  /** The line whose fields are open. */
  openLine: () => LineId | undefined
  /** True for two seconds after its value changed in view. */
  justChanged: (id: LineId) => boolean
  /** What a line was just made of a typed paragraph into; it can still be kept as text. */
  madeOf: (id: LineId) => LineKind | undefined
  keepAsText: () => void

  edit: (id: LineId) => void
  close: () => void
  showInsertMenu: (id: LineId, anchor: HTMLElement) => void
  showMoreMenu: (id: LineId, anchor: HTMLElement) => void
  repair: (problem: Problem, repair: Repair) => void
  goTo: (id: LineId) => void
  /** Somebody chooses between two versions of a line. */
  settleContested: (id: LineId, keep: 'mine' | 'theirs') => void
  /** Where the fields of an open line, and the figure and results of an analysis, are put. */
  offerHost: (part: HostPart, id: LineId, host: HTMLElement) => void
  /** That host goes; another one of the same line may be there already, as when a line is moved. */
  withdrawHost: (part: HostPart, id: LineId, host: HTMLElement) => void
  /** Lines in view get their mathematics; `data-line` on the element names them. */
  watchView: (view: HTMLElement) => void
  unwatchView: (view: HTMLElement) => void
}

export const kindWords: Record<LineKind, string> = {
  given: 'given',
  formula: 'formula',
  criterion: 'criterion',
  analysis: 'analysis',
  cases: 'load cases',
  sizing: 'sizing',
  parametric: 'parametric study',
  tolerance: 'tolerance analysis',
  table: 'data table',
  figure: 'figure',
}
