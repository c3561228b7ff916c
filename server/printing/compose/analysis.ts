/** An analysis as it prints: figure, inputs, method, working, outputs, and what it takes for granted. */
import { analyses } from '@shared/analyses/registry'
import type { AnalysisResult, LineId } from '@shared/engine/contracts'
import { presentStep } from '@shared/engine/display'
import type { AnalysisLine } from '@shared/sheet/kinds'
import type { PrintedAnalysis, PrintedStep, PrintedTable } from '../pages'
import { alongTable, figureOf, printedFigure } from './figure'
import { inputTables } from './inputs'
import {
  cell,
  expressionOf,
  heads,
  math,
  piecesOfStatement,
  printedParts,
  quantityIn,
  quantityNode,
  symbolNode,
} from './shown'
import type { UnitSystem } from './shown'

const sourceOf = ({ source, clause }: { source?: string; clause?: string }): string =>
  [source, clause].filter((part) => part !== undefined && part !== '').join(', ')

const printedStep = (
  id: LineId,
  step: AnalysisResult['working'][number],
  system: UnitSystem,
): PrintedStep => {
  const expression = step.expression === undefined ? undefined : expressionOf(step.expression)
  const values = Object.fromEntries(
    Object.entries(step.values).map(([name, value]) => [name, quantityIn(value.si, value, system)]),
  )
  const { print } = presentStep({
    id,
    symbol: step.symbol,
    ...(expression && { expression }),
    values,
    result: step.quantity,
  })
  const { symbol, ...parts } = print
  return { symbol, parts: printedParts(parts), note: step.note ?? '', source: sourceOf(step) }
}

const outputsTable = (symbol: string, members: AnalysisResult['members']): PrintedTable => ({
  head: heads('Output', 'Meaning', 'Value', ''),
  parts: [1.3, 3, 1.5, 1.3],
  rows: Object.entries(members).map(([name, member]) => [
    [math(symbolNode(symbol === '' ? name : `${symbol}.${name}`))],
    cell(member.meaning),
    [math(quantityNode(member))],
    cell([member.sign, member.place].filter((part) => part !== undefined).join(', at ')),
  ]),
})

const defaultsTable = (defaults: AnalysisResult['defaults']): PrintedTable | undefined =>
  defaults.length === 0
    ? undefined
    : {
        head: heads('Default', 'Value', 'Basis'),
        parts: [2, 1, 3],
        rows: defaults.map(({ label, shown, basis }) => [cell(label), cell(shown), cell(basis)]),
      }

/** Undefined for a kind that this version does not know; its line says so among its problems. */
export const printedAnalysis = (
  line: AnalysisLine,
  result: AnalysisResult | undefined,
  system: UnitSystem,
): PrintedAnalysis | undefined => {
  const analysis = analyses.get(line.analysis.trim())
  if (!analysis) return undefined
  const { spec } = analysis
  const figure = result && figureOf(analysis, result, system)
  const along = figure && alongTable(figure)
  const defaults = result && defaultsTable(result.defaults)
  return {
    title: spec.title,
    purpose: spec.purpose,
    ...(figure && { figure: printedFigure(figure) }),
    inputs: inputTables(spec, line.inputs, result?.inputs, system),
    method: result ? analysis.method(result.inputs).map(piecesOfStatement) : [],
    working: result ? result.working.map((step) => printedStep(line.id, step, system)) : [],
    ...(result && { outputs: outputsTable(line.symbol, result.members) }),
    ...(along && { along }),
    ...(defaults && { defaults }),
    assumptions: [...spec.assumptions],
    validity: [...spec.validity],
    cautions: [...spec.cautions],
  }
}
