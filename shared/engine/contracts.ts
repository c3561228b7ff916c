/**
 * One long file on purpose: whoever adds an analysis, a line kind or a reader of results finds every type here.
 * What the engine asks of others and gives to others. The engine knows no analysis and no library
 * function by name: it gets them through these types (see shared/pipeline), and everything outside
 * reads its results through them.
 */
import type { LineId, LooseProblem, Problem } from '../errors/problem'
import type { Dimension } from './dimensions/dimension'

export type { Dimension, LineId, LooseProblem, Problem }

// ---------------------------------------------------------------- quantities

export type Sign = 'signed' | 'magnitude'

/** A computed value. `si` is in coherent SI (rad, K, turns per second, fractions for percent). */
export interface Quantity {
  si: number
  dimension: Dimension
  /** Display unit as typed (`N m`); empty for a bare number. */
  unit: string
  /** The number in `unit`, in full double precision. */
  number: number
  /** Number and unit as shown: `84.2 MPa`. */
  shown: string
}

// ---------------------------------------------------------------- functions for expressions

/** An argument as a function sees it: a value, or a bare word or unit where it takes one. */
export type ArgumentKind = 'value' | 'series' | 'grade' | 'fit' | 'unit'

/**
 * A function of the library (`J_round`, `K_ts_fillet`, `sqrt`, …).
 * `dimension` gets the arguments' dimensions (`null` for words and units) and answers the result's, or says
 * what is wrong with which argument. `evaluate` gets SI numbers and answers one, or throws `MethodProblem`;
 * a word arrives as its text, and a unit as the SI value of one of it (`mm` as 0.001). An optional unit that
 * was left out is the display unit of the first value, so that `preferred(d, R40)` can count in millimetres.
 * `input` of the `MethodProblem` is the parameter's name.
 */
export interface LibraryFunction {
  name: string
  parameters: { name: string; meaning: string; kind?: ArgumentKind; optional?: boolean }[]
  /** True where any number of further arguments may follow (`min`, `max`). */
  variadic?: boolean
  dimension(args: (Dimension | null)[]): Dimension | { argument: number; message: string }
  evaluate(args: (number | string)[]): number
  /** `formula` is in the expression language (`pi/32*(d^4 - d_i^4)`); display draws it. */
  help: { title: string; formula?: string; source: string; range?: string; section?: string }
}

/** Thrown by `solve` and by functions: a named problem with the input it concerns; never for programming errors. */
export class MethodProblem extends Error {
  constructor(
    readonly code:
      'out-of-range' | 'domain' | 'not-finite' | 'missing-input' | 'limit-exceeded' | 'invalid-field',
    message: string,
    /** Path of the input, `outer` or `segments.2.length` with the row's name; the whole line where absent. */
    readonly input?: string,
  ) {
    super(message)
  }
}

// ---------------------------------------------------------------- analyses

/** Which value of which earlier input makes another one apply: `{ shape: ['rectangle', 'square'] }`. */
export type When = Record<string, readonly string[]>

interface InputBase {
  /** Name in the text form and in `inputs`: `outer`. */
  name: string
  /** Its symbol, in the expression language: `d_o`, `tau_y`. Absent for choices and texts. */
  symbol?: string
  label: string
  help: string
  /** At most six inputs share a group. */
  group: string
  when?: When
  /** False for inputs that have a default or may stay empty; these are folded away in the form. */
  essential: boolean
  /** Number of the dimension mark in the figure that belongs to this input. */
  figureMark?: number
}

/** Bounds in SI; the message is made from them and from the label. */
export interface Limits {
  above?: number
  atLeast?: number
  below?: number
  atMost?: number
}

export type InputSpec =
  | (InputBase & {
      type: 'quantity'
      dimension: Dimension
      /** Unit proposed by the form, per unit system. */
      unit: { SI: string; US: string }
      limits?: Limits
      /** An expression, and why it may be assumed; shown as *default* and printed among the assumptions. */
      default?: { text: string; basis: string }
      /** May be left empty, with no default (the spec says in `help` what that means). */
      optional?: boolean
    })
  | (InputBase & { type: 'integer'; limits?: Limits; default?: { text: string; basis: string } })
  | (InputBase & {
      type: 'choice'
      choices: { value: string; label: string }[]
      default?: { text: string; basis: string }
    })
  | (InputBase & { type: 'text'; maxLength: number })
  /** Another line of the sheet: an analysis of one of these kinds, by its symbol. */
  | (InputBase & { type: 'reference'; analysisKinds: readonly string[]; optional?: boolean })
  | (InputBase & { type: 'table'; columns: ColumnSpec[]; minRows: number; maxRows: number })

/** A column of an input table: any input type but a table; `group` and `figureMark` are the table's. */
export type ColumnSpec = Exclude<InputSpec, { type: 'table' }>

export interface OutputSpec {
  /** Member name; a name with `<row>` stands for one output per row of `perRow`: `tau_<segment>`. */
  name: string
  perRow?: string
  symbol: string
  dimension: Dimension
  sign: Sign
  meaning: string
  unit: { SI: string; US: string }
  /** Output only where these inputs say so. */
  when?: When
}

export interface SourceReference {
  text: string
  clause?: string
}

export interface AnalysisSpec {
  kind: string
  /** Raised whenever a number may change; enters fingerprints. */
  version: number
  title: string
  /** One sentence. */
  purpose: string
  inputs: readonly InputSpec[]
  outputs: readonly OutputSpec[]
  /** Quantities along the member that answer `at(S1.T, x)`. */
  along?: readonly {
    name: string
    symbol: string
    dimension: Dimension
    sign: Sign
    meaning: string
    unit: { SI: string; US: string }
  }[]
  assumptions: readonly string[]
  validity: readonly string[]
  cautions: readonly string[]
  sources: readonly SourceReference[]
}

/** Inputs after units and dimensions are checked: SI numbers, choices as text, tables as rows with their name. */
export type SolvedInput =
  | number
  | string
  | SolvedReference
  | { name: string; [column: string]: number | string | SolvedReference | undefined }[]
  | undefined

/** What a reference hands over: the outputs of the other analysis, in SI, and its inputs as solved. */
export interface SolvedReference {
  symbol: string
  kind: string
  outputs: Record<string, number>
  inputs: Record<string, SolvedInput>
}

/** One step of `working`: printed like a formula, so that a checker can follow without the program. */
export interface WorkingStep {
  /** Plain symbol, Greek spelled: `tau_1`. */
  symbol: string
  /**
   * Right side in the expression language, symbols only: `pi/32*(d_o^4 - d_i^4)`. Display draws it and
   * substitutes `values`; a test evaluates it and compares with `value`. Absent for a value that no
   * closed expression gives (a solved system, an integral): then `note` says how it was found.
   */
  expression?: string
  /** What the symbols of `expression` stand for, in SI. */
  values: Record<string, { si: number; dimension: Dimension; unit: { SI: string; US: string } }>
  /** SI. */
  value: number
  dimension: Dimension
  unit: { SI: string; US: string }
  note?: string
  source?: string
  clause?: string
}

export interface Solution {
  /** SI, by member name; every output of the spec that applies, no other: what is left out cannot be read. */
  outputs: Record<string, number>
  /** Where a `_max` occurs, in words: `tau_max` → `segment 2`. */
  places?: Record<string, string>
  working: WorkingStep[]
  /** Anything the analysis' own `figure` needs; plain JSON. */
  figure: unknown
  /** Interpolants for `at()`: value of each `along` quantity at a station, SI; throws `MethodProblem` outside. */
  along?: Record<string, (x: number) => number>
  /** Advisories: valid, but to be looked at. */
  advisories?: { message: string; input?: string }[]
}

export interface Analysis {
  spec: AnalysisSpec
  solve(inputs: Record<string, SolvedInput>): Solution
  /** Method statement: paragraphs of text, formulas between dollar signs in the expression language (`$tau = T*r/J$`). */
  method(inputs: Record<string, SolvedInput>): string[]
  figure(solution: { figure: unknown; outputs: Record<string, number> }, frame: FigureFrame): Figure
  /** The figure while nothing can be solved yet: usual proportions for the choices made so far, no values. */
  sketch(inputs: Record<string, unknown>, frame: FigureFrame): Figure
}

// ---------------------------------------------------------------- figures

export interface FigureFrame {
  /** Width to lay out for, in CSS pixels; print uses 416 for a column and 640 for a page. */
  width: number
  /** Shows an SI number in a unit of the sheet's system. */
  show(si: number, dimension: Dimension, unit: { SI: string; US: string }): string
  /** Input whose mark is drawn with a thicker stroke. */
  focused?: string
}

/** Names of strokes and fills; the screen takes colours from the palette, print draws in ink. */
export type FigureInk =
  | 'outline'
  | 'axis'
  | 'hairline'
  | 'dimension'
  | 'load'
  | 'support'
  | 'curve-1'
  | 'curve-2'
  | 'curve-3'
  | 'curve-4'
  | 'material'
  | 'void'
  | 'extreme'

/** Drawing primitives, y downward, in CSS pixels. `symbol` draws a symbol with its index: `d_o`, `tau_max`. */
export type FigureElement =
  | {
      draw: 'path'
      ink: FigureInk
      points: [number, number][]
      closed?: boolean
      fill?: FigureInk
      mark?: number
    }
  | {
      draw: 'circle'
      ink: FigureInk
      centre: [number, number]
      radius: number
      fill?: FigureInk
      mark?: number
    }
  | {
      draw: 'arc'
      ink: FigureInk
      centre: [number, number]
      radius: number
      from: number
      to: number
      arrow?: boolean
    }
  | {
      draw: 'arrow'
      ink: FigureInk
      from: [number, number]
      to: [number, number]
      heads?: 1 | 2
      mark?: number
    }
  | {
      draw: 'text'
      ink: FigureInk
      at: [number, number]
      text: string
      anchor: 'start' | 'middle' | 'end'
      small?: boolean
      italic?: boolean
      mark?: number
    }
  | {
      draw: 'symbol'
      ink: FigureInk
      at: [number, number]
      symbol: string
      anchor: 'start' | 'middle' | 'end'
      mark?: number
    }

export interface Figure {
  width: number
  height: number
  elements: FigureElement[]
  /** One sentence for those who cannot see it. */
  description: string
  /** Readings under a pointer or the arrow keys: the shared x axis and the curves above it. */
  reading?: {
    label: string
    /** Pixels of the first and last station. */
    from: number
    to: number
    stations: number[]
    curves: { label: string; values: number[]; dimension: Dimension; unit: { SI: string; US: string } }[]
    stationDimension: Dimension
    stationUnit: { SI: string; US: string }
  }
  /** The same as a table, for *Show values* and for print. */
  table?: { head: string[]; rows: string[][] }
}

// ---------------------------------------------------------------- lines as the engine reads them

interface EngineLineBase {
  id: LineId
  symbol: string
  contested?: boolean
  /** The id under which this line stands in the sheet, where an earlier line has the same one. */
  repeats?: LineId
}

/** A cell or an input as authored: an expression, a choice or a word; empty where nothing was entered. */
export type AuthoredInput = string | AuthoredRow[]
export interface AuthoredRow {
  name: string
  cells: Record<string, string>
}

export type EngineLine =
  | (EngineLineBase & {
      kind: 'given'
      /** As typed. */
      value: string
      unit: string
      /** In the unit of the given: plus and minus as typed. */
      tolerance?: { plus: string; minus: string } | { fit: string }
      range?: { from?: string; to?: string }
      /** The author has said that a rate in `1/s` is a plain rate. */
      plainRate?: boolean
    })
  | (EngineLineBase & { kind: 'formula'; expression: string; unit: string; digits?: number })
  | (EngineLineBase & {
      kind: 'criterion'
      demand: string
      relation: '<=' | '<' | '>=' | '>' | 'within'
      limit: string
      upper?: string
      signed?: boolean
    })
  | (EngineLineBase & { kind: 'analysis'; analysis: string; inputs: Record<string, AuthoredInput> })
  /** A line that takes part in numbering and checking but has nothing to compute. */
  | (EngineLineBase & { kind: 'inert'; note?: string })

export interface Settings {
  unitSystem: 'SI' | 'US'
  /** Significant digits of results. */
  digits: number
}

/** A quoted value in the prose, by the place where it stands. */
export interface Quote {
  id: string
  symbol: string
  unit?: string
  digits?: number
}

export interface Change {
  id: LineId
  /** The line that it follows; null for the first. */
  after: LineId | null
  /** Null when the line is gone. */
  line: EngineLine | null
}

export interface Changes {
  settings?: Settings
  /** All quoted values of the prose, whenever any of them changed. */
  quotes?: Quote[]
  changes: Change[]
}

// ---------------------------------------------------------------- results

export interface CriterionResult {
  demand: Quantity
  limit: Quantity
  upper?: Quantity
  satisfied: boolean
  /** Demand over limit (the worse side for *within*); absent where signs differ or the limit is zero. */
  utilisation?: number
}

export interface AnalysisResult {
  kind: string
  version: number
  members: Record<string, Quantity & { sign: Sign; meaning: string; place?: string }>
  working: (WorkingStep & { quantity: Quantity })[]
  figure: unknown
  /** Outputs in SI, as `figure` wants them. */
  outputs: Record<string, number>
  defaults: { input: string; label: string; shown: string; basis: string }[]
  inputs: Record<string, SolvedInput>
}

export interface LineResult {
  id: LineId
  symbol: string
  state: 'value' | 'waits' | 'problem' | 'inert'
  /** Symbols that it waits for, where it waits. */
  waitsFor: string[]
  problems: Problem[]
  /** Symbols that it reads, as defined in this sheet. */
  reads: string[]
  value?: Quantity
  criterion?: CriterionResult
  analysis?: AnalysisResult
  /** True where `numerical_value` makes it empirical: the checker must see that. */
  empirical?: boolean
}

export interface QuoteResult {
  id: string
  state: 'value' | 'waits' | 'problem'
  value?: Quantity
  problem?: Problem
}

/** The three forms of one line; made only for lines that are shown. */
export interface Presentation {
  id: LineId
  screen: FormulaParts
  print: PrintParts
  /** The line as one would say it. */
  speech: string
}

/** TeX for the screen; parts that do not apply are absent. */
export interface FormulaParts {
  symbol: string
  symbolic?: string
  substituted?: string
  result?: string
}

/** The same as trees that a fixed print program draws. */
export interface PrintParts {
  symbol: MathNode
  symbolic?: MathNode
  substituted?: MathNode
  result?: MathNode
}

/** Mathematics as data, for print. */
export type MathNode =
  | { math: 'row'; items: MathNode[] }
  | { math: 'fraction'; over: MathNode; under: MathNode }
  | { math: 'root'; radicand: MathNode; index?: MathNode }
  | { math: 'script'; base: MathNode; sub?: MathNode; sup?: MathNode; primes?: number }
  | { math: 'brackets'; inner: MathNode; open: string; close: string }
  | { math: 'number'; text: string }
  /** Upright: units, function names, words. */
  | { math: 'upright'; text: string }
  /** Italic: one letter or Greek letter of a symbol. */
  | { math: 'letter'; text: string }
  | { math: 'operator'; text: string }
  | { math: 'space' }

export interface SheetEngine {
  /**
   * Takes changes and answers the results of the lines that differ now, in reading order: only what
   * depends on the changes is parsed, checked or evaluated again.
   */
  apply(changes: Changes): { lines: LineResult[]; quotes: QuoteResult[] }
  result(id: LineId): LineResult | undefined
  results(): LineResult[]
  present(id: LineId): Presentation | undefined
  /** Every symbol of the sheet, in reading order of definition. */
  nomenclature(): { symbol: string; lineId: LineId; value?: Quantity; usedIn: LineId[] }[]
}
