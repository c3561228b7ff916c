/** The engine of a sheet: takes changes of lines, answers what differs. */
import type { Analysis, LibraryFunction, SheetEngine } from '../contracts'

export interface EngineParts {
  analyses: ReadonlyMap<string, Analysis>
  functions: readonly LibraryFunction[]
}

export const createEngine = (_parts: EngineParts): SheetEngine => ({
  apply: () => ({ lines: [], quotes: [] }),
  result: () => undefined,
  results: () => [],
  present: () => undefined,
  nomenclature: () => [],
})
