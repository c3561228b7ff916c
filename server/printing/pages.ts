/**
 * What the fixed Typst program draws: a document as data, every number already in words. Authored text
 * stands here as strings and mathematics as trees; neither is ever read as markup.
 */
import type { Figure, FigureElement, MathNode } from '@shared/engine/contracts'

export type Paper = 'A4' | 'Letter'

/** Running text: plain pieces, mathematics (a quoted value), a reference to a line by its number. */
export type Piece =
  | { is: 'text'; text: string; bold?: boolean; italic?: boolean; code?: boolean; href?: string }
  | { is: 'break' }
  | { is: 'math'; math: MathNode }
  | { is: 'reference'; number: string }
  /** A quoted value or a reference that stands for nothing. */
  | { is: 'missing'; text: string }

export type Row = Piece[][]

export interface PrintedTable {
  head: Row
  rows: Row[]
  /** Widths as parts of the whole, one a column. */
  parts: number[]
}

export interface Parts {
  symbolic?: MathNode
  substituted?: MathNode
  result?: MathNode
}

export interface PrintedStep {
  symbol: MathNode
  parts: Parts
  note: string
  source: string
}

export interface PrintedVerdict {
  satisfied: boolean
  word: string
  /** Absent where signs differ or the limit is zero. */
  utilisation?: number
  shown?: string
  /** *Within* has a lower limit, too: no bar, the number only. */
  hasBar: boolean
}

export type PrintedFigureElement =
  | Exclude<FigureElement, { draw: 'symbol' }>
  | (Omit<Extract<FigureElement, { draw: 'symbol' }>, 'symbol'> & { symbol: MathNode })

export interface PrintedFigure extends Pick<Figure, 'width' | 'height' | 'description'> {
  elements: PrintedFigureElement[]
  /** Drawn across the text and the source column. */
  isWide: boolean
}

export interface PrintedAnalysis {
  title: string
  purpose: string
  figure?: PrintedFigure
  inputs: PrintedTable[]
  method: Piece[][]
  working: PrintedStep[]
  outputs?: PrintedTable
  /** Values along the member, as the figure's table. */
  along?: PrintedTable
  defaults?: PrintedTable
  assumptions: string[]
  validity: string[]
  cautions: string[]
}

export interface PrintedLine {
  is: 'line'
  number: string
  symbol?: MathNode
  title: string
  parts: Parts
  note: string
  source: string
  /** Said in words under the line: *assumption: …*, *to confirm by …*. */
  remarks: Piece[][]
  /** What stands in the way of a value, or wants to be looked at. */
  problems: { severity: 'error' | 'advisory'; message: string }[]
  verdict?: PrintedVerdict
  analysis?: PrintedAnalysis
  table?: PrintedTable
}

export type PrintedBlock =
  | { is: 'heading'; level: number; number: string; content: Piece[] }
  | { is: 'paragraph'; content: Piece[] }
  | { is: 'bullets'; items: PrintedBlock[][] }
  | { is: 'numbers'; start: number; items: PrintedBlock[][] }
  | { is: 'grid'; columns: number; rows: { head: boolean; content: Piece[] }[][] }
  | PrintedLine

export interface TitleBlock {
  firm: string
  number: string
  title: string
  revision: string
  state: string
  project: string
  prepared: string
  checked: string
  approved: string
  /** Day and time of the print, in the firm's time zone. */
  printed: string
}

/** A part behind the sheet: nomenclature, sources, … */
export interface Appendix {
  title: string
  paragraphs: string[]
  table?: PrintedTable
  list?: string[]
}

export interface Pages {
  paper: Paper
  language: string
  titleBlock: TitleBlock
  /** On every page; `lead` stands out. */
  mark: { lead: string; detail: string }
  /** At the top of the first page. */
  notices: { severity: 'error' | 'advisory'; text: string }[]
  purpose: string[]
  method: string[]
  blocks: PrintedBlock[]
  summary: Appendix[]
  conclusion: string[]
  appendices: Appendix[]
  cautions: string[]
  program: string
}
