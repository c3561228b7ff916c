/** What the sheet and its engine say to each other: plain data, so that it can cross to a worker. */
import type {
  AnalysisSpec,
  Changes,
  EngineLine,
  Figure,
  FormulaParts,
  LineId,
  LineResult,
  Presentation,
  QuoteResult,
  Quantity,
} from '@shared/engine/contracts'

export interface NomenclatureEntry {
  symbol: string
  lineId: LineId
  value?: Quantity
  usedIn: LineId[]
}

/** A line that is being typed in a paragraph: it is tried beside the sheet and leaves no trace in it. */
export interface Trial {
  result: LineResult
  presentation?: Presentation
}

/** A figure, and for every station of its reading the sentence that says it. */
export interface DrawnFigure {
  figure: Figure
  readings: string[]
}

/** One step of an analysis' working as a line of mathematics. */
export interface ShownStep {
  parts: FormulaParts
  speech: string
  note?: string
  source?: string
}

/** Running text, or a formula within it. */
export interface MethodPiece {
  text: string
  tex?: string
}

export interface ShownWorking {
  steps: ShownStep[]
  /** Paragraphs of the method statement. */
  method: MethodPiece[][]
}

/** A wanted figure of an analysis. While it is not solved, `unsolved` is sketched: usual proportions, no values. */
export interface Drawing {
  id: LineId
  width: number
  /** Input whose mark is drawn with a thicker stroke. */
  focused?: string | undefined
  unsolved?: { kind: string; inputs: Record<string, unknown> } | undefined
}

export type EngineRequest =
  | { ask: 'apply'; number: number; changes: Changes }
  /** These lines are in view now: their mathematics is wanted. */
  | { ask: 'show'; ids: LineId[] }
  | { ask: 'hide'; ids: LineId[] }
  | { ask: 'try'; number: number; after: LineId | null; line: EngineLine }
  | ({ ask: 'draw'; number: number } & Drawing)
  | { ask: 'working'; number: number; id: LineId }
  | { ask: 'specs'; number: number }

export type EngineAnswer =
  | {
      answer: 'results'
      number: number
      lines: LineResult[]
      quotes: QuoteResult[]
      presentations: Presentation[]
      nomenclature: NomenclatureEntry[]
    }
  | { answer: 'presentations'; presentations: Presentation[] }
  | { answer: 'trial'; number: number; trial: Trial | null }
  | { answer: 'figure'; number: number; figure: DrawnFigure | null }
  | { answer: 'working'; number: number; working: ShownWorking | null }
  | { answer: 'specs'; number: number; specs: AnalysisSpec[] }
  /** A fault of the program, never of what a person wrote. */
  | { answer: 'fault'; message: string }
