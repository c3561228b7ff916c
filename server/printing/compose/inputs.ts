/** Inputs of an analysis as tables: as typed, and with the value where that is not the same. */
import type {
  AnalysisSpec,
  AuthoredInput,
  ColumnSpec,
  InputSpec,
  SolvedInput,
} from '@shared/engine/contracts'
import { applies } from '@shared/engine/evaluate/analysis/inputs'
import type { Piece, PrintedTable } from '../pages'
import {
  cell,
  expressionNode,
  heads,
  inputExpression,
  math,
  quantityIn,
  quantityNode,
  symbolNode,
  text,
} from './shown'
import type { UnitSystem } from './shown'

type Inputs = Record<string, AuthoredInput>
type Solved = Record<string, SolvedInput> | undefined
type TableSpec = Extract<InputSpec, { type: 'table' }>

/** Columns that fit side by side. */
const COLUMNS = 6

const choicesOf = (spec: AnalysisSpec, authored: Inputs, solved: Solved): Map<string, string> => {
  const choices = new Map<string, string>()
  for (const input of spec.inputs) {
    if (input.type !== 'choice' && input.type !== 'integer') continue
    const typed = authored[input.name]
    const value =
      solved?.[input.name] ?? (typeof typed === 'string' && typed !== '' ? typed : input.default?.text)
    if (value !== undefined) choices.set(input.name, String(value))
  }
  return choices
}

const asTyped = (spec: ColumnSpec, typed: string): Piece[] => {
  if (spec.type === 'choice') return cell(spec.choices.find(({ value }) => value === typed)?.label ?? typed)
  if (spec.type === 'reference') return [math(symbolNode(typed))]
  if (spec.type !== 'quantity') return cell(typed)
  const expression = inputExpression(typed)
  return expression ? [math(expressionNode(expression))] : [{ is: 'text', text: typed, code: true }]
}

const isBare = (typed: string): boolean => {
  const type = inputExpression(typed)?.type
  return type === 'quantity' || type === 'number'
}

/** The value, where it says more than what was typed. */
const valueOf = (spec: ColumnSpec, typed: string, solved: unknown, system: UnitSystem): Piece[] => {
  if (spec.type !== 'quantity' || typeof solved !== 'number' || (typed !== '' && isBare(typed))) return []
  return [math(quantityNode(quantityIn(solved, spec, system)))]
}

const together = (typed: Piece[], value: Piece[]): Piece[] =>
  typed.length > 0 && value.length > 0 ? [...typed, text(' = '), ...value] : [...typed, ...value]

const printedCell = (spec: ColumnSpec, typed: string, solved: unknown, system: UnitSystem): Piece[] => {
  if (typed !== '') return together(asTyped(spec, typed), valueOf(spec, typed, solved, system))
  const value =
    spec.type === 'quantity'
      ? valueOf(spec, '', solved, system)
      : typeof solved === 'string' || typeof solved === 'number'
        ? asTyped(spec, String(solved))
        : []
  return value.length > 0 && 'default' in spec && spec.default ? [...value, text(' (default)')] : value
}

const symbolCell = (symbol: string | undefined): Piece[] => (symbol ? [math(symbolNode(symbol))] : [])

/** Rows of an input table, its columns in groups that fit side by side. */
const rowsTable = (
  spec: TableSpec,
  authored: AuthoredInput | undefined,
  solved: SolvedInput,
  system: UnitSystem,
) => {
  if (!Array.isArray(authored) || authored.length === 0) return []
  const solvedRows = Array.isArray(solved) ? solved : []
  const columns = spec.columns.map((column) => ({
    head:
      column.symbol && column.symbol !== column.label
        ? [text(`${column.label} `), math(symbolNode(column.symbol))]
        : cell(column.label),
    cells: authored.map(({ cells }, index) =>
      printedCell(column, cells[column.name]?.trim() ?? '', solvedRows[index]?.[column.name], system),
    ),
  }))
  const used = columns.filter(({ cells }) => cells.some((pieces) => pieces.length > 0))
  const tables: PrintedTable[] = []
  for (let from = 0; from < used.length; from += COLUMNS) {
    const shown = used.slice(from, from + COLUMNS)
    tables.push({
      head: [cell(spec.label), ...shown.map(({ head }) => head)],
      parts: [0.6, ...shown.map(() => 1)],
      rows: authored.map(({ name }, index) => [cell(name), ...shown.map(({ cells }) => cells[index] ?? [])]),
    })
  }
  return tables
}

/** One table of the single inputs, then one or more for each table among them. */
export const inputTables = (
  spec: AnalysisSpec,
  authored: Inputs,
  solved: Solved,
  system: UnitSystem,
): PrintedTable[] => {
  const choices = choicesOf(spec, authored, solved)
  const shown = spec.inputs.filter((input) => applies(input.when, choices))
  const single = shown.flatMap((input) => {
    if (input.type === 'table') return []
    const typed = authored[input.name]
    const pieces = printedCell(
      input,
      typeof typed === 'string' ? typed.trim() : '',
      solved?.[input.name],
      system,
    )
    return pieces.length === 0 ? [] : [[cell(input.label), symbolCell(input.symbol), pieces]]
  })
  const tables = shown.flatMap((input) =>
    input.type === 'table' ? rowsTable(input, authored[input.name], solved?.[input.name], system) : [],
  )
  const first: PrintedTable[] =
    single.length === 0 ? [] : [{ head: heads('Input', '', 'Value'), parts: [2, 0.7, 3], rows: single }]
  return [...first, ...tables]
}
