/** An analysis: inputs by its spec, one call of its pure `solve`, outputs as members of the line's symbol. */
import {
  MethodProblem,
  type Analysis,
  type AnalysisResult,
  type AnalysisSpec,
  type EngineLine,
  type LooseProblem,
  type Settings,
  type Solution,
} from '../../contracts'
import { dimensionless } from '../../dimensions/dimension'
import { canonicalName } from '../../parse/symbolName'
import type { UnitPhrase } from '../../parse/expression'
import { readUnit } from '../../units/unit'
import { applies, readInputs, type InputReading, type InputsReading } from '../analysis/inputs'
import { analysisFailed, outputNotFinite, unknownKind } from '../analysis/problems'
import { checkInputs, type CheckedInputs } from '../analysis/solvedInputs'
import { isError, referencesOf } from '../expressionReading'
import { quantityOf } from '../quantity'
import {
  withoutReferences,
  type Checked,
  type CheckScope,
  type Outcome,
  type QuantityType,
  type ReadScope,
  type Reading,
} from '../stages'

type AnalysisLine = Extract<EngineLine, { kind: 'analysis' }>
type OutputSpec = AnalysisSpec['outputs'][number]

export const readAnalysis = (line: AnalysisLine, { analyses, vocabulary }: ReadScope): Reading => {
  const analysis = analyses.get(line.analysis.trim())
  if (!analysis) return unreadable(unknownKind(line.analysis, analyses.keys()))
  const reading = readInputs(analysis.spec.inputs, line.inputs, vocabulary)
  const problems = [...reading.problems, ...reading.inputs.flatMap(problemsOf)]
  return {
    ...withLineReferences(reading.inputs),
    problems,
    check: (scope) => check(line, analysis, reading, problems.some(isError), scope),
  }
}

const unreadable = (problem: LooseProblem): Reading => ({
  ...withoutReferences,
  problems: [problem],
  check: () => ({ problems: [] }),
})

const cellsOf = (input: InputReading) =>
  input.type === 'table' ? input.rows.flatMap((row) => row.cells) : [input]

const problemsOf = (input: InputReading): LooseProblem[] =>
  input.type === 'table'
    ? [...input.problems, ...cellsOf(input).flatMap((cell) => cell.problems)]
    : input.problems

/** Symbols in expressions, and other analyses that inputs name. */
const withLineReferences = (inputs: InputReading[]) => {
  const cells = inputs.flatMap(cellsOf)
  const fromExpressions = referencesOf(
    cells.flatMap((cell) => (cell.type === 'quantity' && cell.expression ? [cell.expression] : [])),
  )
  const lines = new Map(
    cells.flatMap((cell) =>
      cell.type === 'reference' && cell.symbol !== undefined
        ? [[cell.symbol, { field: `inputs.${cell.path}` }] as const]
        : [],
    ),
  )
  return {
    ...fromExpressions,
    reads: [...new Set([...fromExpressions.reads, ...lines.keys()])],
    whole: new Set(lines.keys()),
    where: (name: string) => fromExpressions.where(name) ?? lines.get(name),
  }
}

const unitOf = (unit: { SI: string; US: string }, settings: Settings): UnitPhrase =>
  readUnit(unit[settings.unitSystem]).phrase ?? { text: '', factors: [] }

/** The outputs that apply, with the member names of their rows. */
const outputsOf = (spec: AnalysisSpec, { inputs, choices }: InputsReading): [string, OutputSpec][] =>
  spec.outputs
    .filter((output) => applies(output.when, choices))
    .flatMap((output): [string, OutputSpec][] => {
      if (output.perRow === undefined) return [[output.name, output]]
      const table = inputs.find((input) => input.spec.name === output.perRow)
      if (table?.type !== 'table') return []
      return table.rows.map((row) => [output.name.replace(/<[^>]*>/, row.name), output])
    })

const typeOf = (
  { dimension, unit, sign }: Pick<OutputSpec, 'dimension' | 'unit' | 'sign'>,
  settings: Settings,
): QuantityType => ({ dimension, unit: unitOf(unit, settings), sign })

const check = (
  line: AnalysisLine,
  analysis: Analysis,
  reading: InputsReading,
  isUnreadable: boolean,
  scope: CheckScope,
): Checked => {
  const { spec } = analysis
  const inputs = checkInputs(reading.inputs, scope)
  const outputs = outputsOf(spec, reading)
  const publication = {
    type: 'analysis',
    kind: spec.kind,
    members: new Map(outputs.map(([name, output]) => [name, typeOf(output, scope.settings)])),
    along: new Map((spec.along ?? []).map((along) => [along.name, typeOf(along, scope.settings)])),
  } as const
  const { problems, empirical } = inputs
  if (isUnreadable || !inputs.isReady || problems.some(isError)) return { problems, empirical, publication }
  return {
    problems,
    empirical,
    publication,
    evaluate: () => evaluate(line, analysis, inputs, outputs, scope.settings),
  }
}

const evaluate = (
  line: AnalysisLine,
  analysis: Analysis,
  checked: CheckedInputs,
  outputs: [string, OutputSpec][],
  settings: Settings,
): Outcome => {
  const { inputs, defaults, problems } = checked.evaluate()
  if (problems.length > 0) return { problems }
  const { solution, problem } = solved(analysis, inputs)
  if (!solution) return { problems: problem ? [problem] : [] }
  const symbol = canonicalName(line.symbol.trim())
  // An output may be left out where it does not apply: no torque, no stress; no fillet, no peak.
  const found = outputs.filter(([name]) => name in solution.outputs)
  const missing = found.filter(([name]) => !Number.isFinite(solution.outputs[name]))
  if (missing.length > 0) return { problems: missing.map(([name]) => outputNotFinite(symbol, name)) }
  const numbers = Object.fromEntries(found.map(([name]) => [name, solution.outputs[name] as number]))
  return {
    problems: (solution.advisories ?? []).map(({ message, input }) => ({
      code: 'out-of-range',
      severity: 'advisory',
      message,
      ...(input !== undefined && { span: { field: `inputs.${input}` } }),
    })),
    analysis: { ...resultOf(analysis.spec, solution, found, settings), inputs, defaults },
    numbers,
    solved: { symbol, kind: analysis.spec.kind, outputs: numbers, inputs },
    ...(solution.along && { alongFunctions: solution.along }),
  }
}

const solved = (
  analysis: Analysis,
  inputs: Parameters<Analysis['solve']>[0],
): { solution?: Solution; problem?: LooseProblem } => {
  try {
    return { solution: analysis.solve(inputs) }
  } catch (error) {
    if (error instanceof MethodProblem) {
      const { code, message, input } = error
      return {
        problem: { code, message, ...(input !== undefined && { span: { field: `inputs.${input}` } }) },
      }
    }
    // A sheet must survive a fault of one method; what is said makes it known.
    return {
      problem: analysisFailed(analysis.spec.title, error instanceof Error ? error.message : String(error)),
    }
  }
}

const resultOf = (
  spec: AnalysisSpec,
  solution: Solution,
  outputs: [string, OutputSpec][],
  settings: Settings,
): Omit<AnalysisResult, 'inputs' | 'defaults'> => ({
  kind: spec.kind,
  version: spec.version,
  members: Object.fromEntries(
    outputs.map(([name, output]) => {
      const place = solution.places?.[name]
      const quantity = quantityOf(
        solution.outputs[name] ?? NaN,
        output.dimension,
        unitOf(output.unit, settings),
        settings.digits,
      )
      return [
        name,
        { ...quantity, sign: output.sign, meaning: output.meaning, ...(place !== undefined && { place }) },
      ]
    }),
  ),
  working: solution.working.map((step) => ({
    ...step,
    quantity: quantityOf(
      step.value,
      step.dimension ?? dimensionless,
      unitOf(step.unit, settings),
      settings.digits,
    ),
  })),
  figure: solution.figure,
  outputs: solution.outputs,
})
