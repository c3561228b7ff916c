import type {
  Analysis,
  AnalysisResult,
  LibraryFunction,
  Quantity,
  WorkingStep,
} from '@shared/engine/contracts'
import { presentEquality, presentStep } from '@shared/engine/display'
import { formatQuantity } from '@shared/engine/display/number'
import { builtins } from '@shared/engine/evaluate/builtins'
import { parseExpression } from '@shared/engine/parse/parse'
import { fromSI, readUnit } from '@shared/engine/units/unit'
import { libraryFunctions } from '@shared/mechanics/library'
import type { MethodPiece, ShownStep, ShownWorking } from './engineMessages'

const functions: ReadonlyMap<string, LibraryFunction> = new Map([
  ...builtins,
  ...libraryFunctions.map((one) => [one.name, one] as const),
])
/** Steps name symbols only; nothing in them reads as a unit of the sheet. */
const vocabulary = { isDefined: () => true, functions }

const parsed = (text: string) => parseExpression(text, vocabulary).parsed?.root

const quantity = (value: WorkingStep['values'][string], system: 'SI' | 'US'): Quantity => {
  const unit = value.unit[system]
  const { phrase } = readUnit(unit)
  const number = phrase ? fromSI(value.si, phrase) : value.si
  return { si: value.si, dimension: value.dimension, unit, number, shown: formatQuantity(number, unit, 4) }
}

const stepShown = (
  step: AnalysisResult['working'][number],
  index: number,
  system: 'SI' | 'US',
): ShownStep => {
  const expression = step.expression === undefined ? undefined : parsed(step.expression)
  const values = Object.fromEntries(
    Object.entries(step.values).map(([name, value]) => [name, quantity(value, system)]),
  )
  const { screen, speech } = presentStep({
    id: String(index),
    symbol: step.symbol,
    ...(expression ? { expression } : {}),
    values,
    result: step.quantity,
  })
  return {
    parts: screen,
    speech,
    note: step.note,
    source: [step.source, step.clause].filter(Boolean).join(', ') || undefined,
  }
}

/** A paragraph of the method statement in pieces: running text, and formulas between dollar signs. */
const methodPieces = (paragraph: string): MethodPiece[] =>
  paragraph.split('$').flatMap((piece, index): MethodPiece[] => {
    if (piece === '') return []
    if (index % 2 === 0) return [{ text: piece }]
    const sides = piece.split('=').map((side) => parsed(side.trim()))
    const [first, ...others] = sides
    if (!first || others.some((side) => !side)) return [{ text: piece }]
    return [{ text: piece, tex: presentEquality(first, ...others.flatMap((side) => side ?? [])).tex }]
  })

/** How an analysis came to its values: its steps as lines of mathematics, and its method in words. */
export const presentWorking = (
  analysis: Analysis,
  solved: AnalysisResult,
  system: 'SI' | 'US',
): ShownWorking => ({
  steps: solved.working.map((step, index) => stepShown(step, index, system)),
  method: analysis.method(solved.inputs).map(methodPieces),
})
