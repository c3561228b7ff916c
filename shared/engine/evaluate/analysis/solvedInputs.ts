/** From readings of inputs to what `solve` gets: dimensions first, then SI numbers within their limits. */
import type { LooseProblem, SolvedInput, SolvedReference } from '../../contracts'
import { sameDimension } from '../../dimensions/dimension'
import { formatNumber, formatQuantity } from '../../display/number'
import type { Expression } from '../../parse/expression'
import { fromSI, readUnit } from '../../units/unit'
import { checkExpression, withoutFault, type CheckedExpression } from '../expressionReading'
import type { CheckScope } from '../stages'
import type { CellReading, InputReading } from './inputs'
import { limitProblem } from './limits'
import { notAnAnalysis, wrongDimension } from './problems'

/** A default that was used: it prints among the assumptions. */
export interface UsedDefault {
  input: string
  label: string
  shown: string
  basis: string
}

interface CheckedCell {
  problems: LooseProblem[]
  /** False while something waits or is wrong. */
  isReady: boolean
  evaluate(): { value?: number | string | SolvedReference; shown?: string; problem?: LooseProblem }
}

export interface CheckedInputs {
  problems: LooseProblem[]
  empirical: boolean
  isReady: boolean
  evaluate(): { inputs: Record<string, SolvedInput>; defaults: UsedDefault[]; problems: LooseProblem[] }
}

export const checkInputs = (readings: readonly InputReading[], scope: CheckScope): CheckedInputs => {
  const problems: LooseProblem[] = []
  let isReady = true
  let empirical = false
  const check = (reading: CellReading) => {
    const checked = checkCell(reading, scope)
    problems.push(...checked.problems)
    isReady &&= checked.isReady
    empirical ||= checked.empirical ?? false
    return { reading, checked }
  }
  const checkedInputs = readings.map((input) =>
    input.type === 'table'
      ? {
          table: input.spec.name,
          rows: input.rows.map(({ name, cells }) => ({ name, cells: cells.map(check) })),
        }
      : check(input),
  )

  const evaluate = () => {
    const found = {
      inputs: {} as Record<string, SolvedInput>,
      defaults: [] as UsedDefault[],
      problems: [] as LooseProblem[],
    }
    const take = ({ reading, checked }: ReturnType<typeof check>) => {
      const { value, shown, problem } = checked.evaluate()
      if (problem) found.problems.push(problem)
      if (reading.default !== undefined) {
        found.defaults.push({
          input: reading.path,
          label: reading.spec.label,
          shown: shown ?? String(value),
          basis: reading.default,
        })
      }
      return value
    }
    for (const input of checkedInputs) {
      if ('table' in input) {
        found.inputs[input.table] = input.rows.map(({ name, cells }) => ({
          ...Object.fromEntries(cells.map((cell) => [cell.reading.spec.name, take(cell)])),
          name,
        }))
      } else found.inputs[input.reading.spec.name] = take(input)
    }
    return found
  }
  return { problems, empirical, isReady, evaluate }
}

const checkCell = (reading: CellReading, scope: CheckScope): CheckedCell & { empirical?: boolean } => {
  switch (reading.type) {
    case 'quantity':
      return checkQuantity(reading, scope)
    case 'integer': {
      const { value, spec, path } = reading
      const show = (number: number) => formatNumber(number, { digits: 12 })
      const problem =
        value === undefined ? undefined : limitProblem(path, spec.label, value, spec.limits, show)
      return { problems: problem ? [problem] : [], isReady: !problem, evaluate: () => ({ value }) }
    }
    case 'choice': {
      const label = reading.spec.choices.find(({ value }) => value === reading.value)?.label
      return { problems: [], isReady: true, evaluate: () => ({ value: reading.value, shown: label }) }
    }
    case 'text':
      return { problems: [], isReady: true, evaluate: () => ({ value: reading.value }) }
    case 'reference':
      return checkReference(reading, scope)
  }
}

const isZero = (expression: Expression | undefined): boolean =>
  expression?.type === 'number' && expression.value === 0

const checkQuantity = (
  reading: Extract<CellReading, { type: 'quantity' }>,
  scope: CheckScope,
): CheckedCell & { empirical?: boolean } => {
  const { expression, spec, path } = reading
  if (!expression) return { problems: [], isReady: reading.problems.length === 0, evaluate: () => ({}) }
  const checked = checkExpression(expression, scope)
  const found = checked.type?.dimension
  const isZeroOfAnyKind = isZero(expression.parsed?.root)
  const mismatch =
    found && !isZeroOfAnyKind && !sameDimension(found, spec.dimension)
      ? wrongDimension(path, spec.label, spec.dimension, found)
      : undefined
  return {
    problems: mismatch ? [...checked.problems, mismatch] : checked.problems,
    empirical: checked.empirical,
    isReady: found !== undefined && !mismatch,
    evaluate: () => evaluateQuantity(reading, checked, scope),
  }
}

const evaluateQuantity = (
  { spec, path }: Extract<CellReading, { type: 'quantity' }>,
  checked: CheckedExpression,
  scope: CheckScope,
): ReturnType<CheckedCell['evaluate']> => {
  const { result, problem } = withoutFault(`inputs.${path}`, () => checked.evaluate())
  if (problem || result === undefined) return { problem }
  const own =
    checked.type && sameDimension(checked.type.dimension, spec.dimension) ? checked.type.unit : undefined
  const unit = own ?? readUnit(spec.unit[scope.settings.unitSystem]).phrase
  const show = (si: number) =>
    unit ? formatQuantity(fromSI(si, unit), unit.text, scope.settings.digits) : formatNumber(si)
  return {
    value: result,
    shown: show(result),
    problem: limitProblem(path, spec.label, result, spec.limits, show),
  }
}

const checkReference = (
  reading: Extract<CellReading, { type: 'reference' }>,
  scope: CheckScope,
): CheckedCell => {
  const { symbol, spec, path } = reading
  if (symbol === undefined)
    return { problems: [], isReady: reading.problems.length === 0, evaluate: () => ({}) }
  const publication = scope.publication(symbol)
  const isWrong =
    publication && !(publication.type === 'analysis' && spec.analysisKinds.includes(publication.kind))
  return {
    problems: isWrong ? [notAnAnalysis(path, spec.label, symbol, spec.analysisKinds)] : [],
    isReady: publication !== undefined && !isWrong,
    evaluate: () => ({ value: scope.solved(symbol) }),
  }
}
