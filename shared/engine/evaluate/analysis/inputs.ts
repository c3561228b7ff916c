/** Reads the authored inputs of an analysis by its spec: which apply, which are missing, which are defaults. */
import type { AuthoredInput, ColumnSpec, InputSpec, LooseProblem, When } from '../../contracts'
import { readAuthoredNumber } from '../../parse/authoredNumber'
import { canonicalName } from '../../parse/symbolName'
import type { Vocabulary } from '../../parse/vocabulary'
import { readExpression, type ExpressionReading } from '../expressionReading'
import {
  missingInput,
  notAChoice,
  notAnInteger,
  notASingleValue,
  notATable,
  repeatedRow,
  tooFewRows,
  tooLong,
  tooManyRows,
  unknownInput,
} from './problems'

export type TableSpec = Extract<InputSpec, { type: 'table' }>
export type SpecOf<T extends ColumnSpec['type']> = Extract<ColumnSpec, { type: T }>

interface ValueReading {
  path: string
  /** The basis, where the value is the spec's default. */
  default?: string
  problems: LooseProblem[]
}

/** One cell or input. A value that is missing though it may be has no `expression`, `value` or `symbol`. */
export type CellReading =
  | (ValueReading & { type: 'quantity'; spec: SpecOf<'quantity'>; expression?: ExpressionReading })
  | (ValueReading & { type: 'integer'; spec: SpecOf<'integer'>; value?: number })
  | (ValueReading & { type: 'choice'; spec: SpecOf<'choice'>; value?: string })
  | (ValueReading & { type: 'text'; spec: SpecOf<'text'>; value?: string })
  | (ValueReading & { type: 'reference'; spec: SpecOf<'reference'>; symbol?: string })

export interface TableReading {
  type: 'table'
  spec: TableSpec
  path: string
  problems: LooseProblem[]
  rows: { name: string; cells: CellReading[] }[]
}

export type InputReading = CellReading | TableReading

/** Values of choices and whole numbers so far, by input: what `when` asks for. */
type Choices = ReadonlyMap<string, string>

export const applies = (when: When | undefined, choices: Choices): boolean =>
  Object.entries(when ?? {}).every(([input, values]) => values.includes(choices.get(input) ?? ''))

export interface InputsReading {
  inputs: InputReading[]
  choices: Choices
  problems: LooseProblem[]
}

export const readInputs = (
  specs: readonly InputSpec[],
  authored: Record<string, AuthoredInput>,
  vocabulary: Vocabulary,
): InputsReading => {
  const choices = new Map<string, string>()
  const inputs: InputReading[] = []
  for (const spec of specs) {
    if (!applies(spec.when, choices)) continue
    const value = Object.hasOwn(authored, spec.name) ? authored[spec.name] : undefined
    const input =
      spec.type === 'table'
        ? readTable(spec, value, choices, vocabulary)
        : Array.isArray(value)
          ? misplacedRows(spec)
          : readCell(spec, spec.name, value ?? '', vocabulary)
    inputs.push(input)
    remember(input, choices)
  }
  return { inputs, choices, problems: unknownNames(specs, authored, '') }
}

const remember = (input: InputReading, choices: Map<string, string>): void => {
  if ((input.type === 'choice' || input.type === 'integer') && input.value !== undefined) {
    choices.set(input.spec.name, String(input.value))
  }
}

const unknownNames = (specs: readonly { name: string }[], authored: object, path: string): LooseProblem[] => {
  const known = specs.map(({ name }) => name)
  return Object.keys(authored)
    .filter((name) => !known.includes(name))
    .map((name) => unknownInput(`${path}${name}`, known))
}

/** Rows where a single value belongs: nothing of them can be read. */
const misplacedRows = (spec: ColumnSpec): CellReading =>
  ({
    type: spec.type,
    spec,
    path: spec.name,
    problems: [notASingleValue(spec.name, spec.label)],
  }) as CellReading

const readTable = (
  spec: TableSpec,
  authored: AuthoredInput | undefined,
  outer: Choices,
  vocabulary: Vocabulary,
): TableReading => {
  const problems: LooseProblem[] = []
  if (typeof authored === 'string' && authored.trim() !== '') problems.push(notATable(spec.name, spec.label))
  const authoredRows = Array.isArray(authored) ? authored : []
  if (problems.length === 0 && authoredRows.length < spec.minRows) {
    problems.push(tooFewRows(spec.name, spec.label, spec.minRows))
  }
  if (authoredRows.length > spec.maxRows) problems.push(tooManyRows(spec.name, spec.label, spec.maxRows))
  const seen = new Set<string>()
  const rows = authoredRows.slice(0, spec.maxRows).map(({ name, cells }) => {
    const path = `${spec.name}.${name}`
    if (seen.has(name)) problems.push(repeatedRow(path, spec.label, name))
    seen.add(name)
    problems.push(...unknownNames(spec.columns, cells, `${path}.`))
    return { name, cells: readCells(spec, path, cells, outer, vocabulary) }
  })
  return { type: 'table', spec, path: spec.name, problems, rows }
}

const readCells = (
  spec: TableSpec,
  path: string,
  authored: Record<string, string>,
  outer: Choices,
  vocabulary: Vocabulary,
): CellReading[] => {
  const choices = new Map(outer)
  const cells: CellReading[] = []
  for (const column of spec.columns) {
    if (!applies(column.when, choices)) continue
    const text = Object.hasOwn(authored, column.name) ? (authored[column.name] ?? '') : ''
    const cell = readCell(column, `${path}.${column.name}`, text, vocabulary)
    cells.push(cell)
    remember(cell, choices)
  }
  return cells
}

const nothingDefined = (vocabulary: Vocabulary): Vocabulary => ({ ...vocabulary, isDefined: () => false })

const readCell = (spec: ColumnSpec, path: string, authored: string, vocabulary: Vocabulary): CellReading => {
  const byDefault = authored.trim() === '' && 'default' in spec ? spec.default : undefined
  const text = (byDefault?.text ?? authored).trim()
  const base = { path, problems: [] as LooseProblem[], ...(byDefault && { default: byDefault.basis }) }
  if (text === '') {
    if (spec.essential) base.problems.push(missingInput(path, spec.label))
    return { ...base, type: spec.type, spec } as CellReading
  }
  switch (spec.type) {
    case 'quantity': {
      const words = { ...(byDefault ? nothingDefined(vocabulary) : vocabulary), onlyUnit: true }
      const expression = readExpression(text, `inputs.${path}`, words)
      return { ...base, type: 'quantity', spec, expression, problems: expression.problems }
    }
    case 'integer':
      return { ...base, type: 'integer', spec, ...readInteger(spec, path, text) }
    case 'choice': {
      const choices = spec.choices.map(({ value }) => value)
      if (choices.includes(text)) return { ...base, type: 'choice', spec, value: text }
      return { ...base, type: 'choice', spec, problems: [notAChoice(path, spec.label, text, choices)] }
    }
    case 'text':
      if (text.length <= spec.maxLength) return { ...base, type: 'text', spec, value: text }
      return { ...base, type: 'text', spec, problems: [tooLong(path, spec.label, spec.maxLength)] }
    case 'reference':
      return { ...base, type: 'reference', spec, symbol: canonicalName(text) }
  }
}

const readInteger = (
  spec: SpecOf<'integer'>,
  path: string,
  text: string,
): { value?: number; problems: LooseProblem[] } => {
  const { value, problem } = readAuthoredNumber(text, `inputs.${path}`)
  if (problem) return { problems: [problem] }
  return Number.isInteger(value)
    ? { value, problems: [] }
    : { problems: [notAnInteger(path, spec.label, text)] }
}
