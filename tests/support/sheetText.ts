/** Sheets from the text form, so that a test shows the sheet it is about. */
import type { EngineLine, LineResult } from '@shared/engine/contracts'
import { engineLines, evaluateSheet, type SheetEngineOptions } from '@shared/pipeline'
import type { Sheet } from '@shared/sheet/sheet'
import { importText } from '@shared/sheet/text'

/** A sheet whose text must be readable; a problem in it is a fault of the test. */
export const sheetOf = (text: string): Sheet => {
  const { sheet, problems } = importText(text)
  const errors = problems.filter(({ severity }) => severity === 'error')
  if (!sheet || errors.length > 0)
    throw new Error(`The test's text cannot be read: ${JSON.stringify(problems)}`)
  return sheet
}

export const linesOf = (text: string): EngineLine[] => engineLines(sheetOf(text))

/** Results of a sheet by symbol. */
export const evaluated = (text: string, options?: SheetEngineOptions): Map<string, LineResult> =>
  new Map(evaluateSheet(sheetOf(text), options).lines.map((line) => [line.symbol, line]))
