/**
 * The one place that knows sheet, engine, analyses and mechanics together. Browser, server, command
 * line and tests make their engine here, so that a value is the same everywhere.
 */
import { analyses } from '../analyses/registry'
import type {
  Analysis,
  EngineLine,
  LibraryFunction,
  LineResult,
  QuoteResult,
  SheetEngine,
} from '../engine/contracts'
import { createEngine } from '../engine/evaluate/engine'
import { libraryFunctions } from '../mechanics/library'
import type { Sheet } from '../sheet/sheet'
import { engineLines, quotesOf, settingsOf } from './engineLines'

export { DEFAULT_DIGITS, engineLine, engineLines, quotesOf, settingsOf } from './engineLines'

export interface SheetEngineOptions {
  /** In place of the registry; tests use it. */
  analyses?: ReadonlyMap<string, Analysis>
  /** In place of the mechanics library; the built-in functions are always there. */
  functions?: readonly LibraryFunction[]
}

/** An engine with no lines yet; `apply()` gives it some. */
export const createSheetEngine = (options: SheetEngineOptions = {}): SheetEngine =>
  createEngine({
    analyses: options.analyses ?? analyses,
    functions: options.functions ?? libraryFunctions,
  })

/** Changes that put `lines`, in this order, into an engine that has none. */
export const insertions = (lines: readonly EngineLine[]) =>
  lines.map((line, index) => ({ id: line.id, after: lines[index - 1]?.id ?? null, line }))

export interface Evaluation {
  /** In reading order. */
  lines: LineResult[]
  quotes: QuoteResult[]
  engine: SheetEngine
}

/** The whole sheet at once, from nothing. */
export const evaluateSheet = (sheet: Sheet, options: SheetEngineOptions = {}): Evaluation => {
  const engine = createSheetEngine(options)
  const { quotes } = engine.apply({
    settings: settingsOf(sheet),
    quotes: quotesOf(sheet),
    changes: insertions(engineLines(sheet)),
  })
  return { lines: engine.results(), quotes, engine }
}
