/** One authored expression through the three stages: every field that takes one goes this way. */
import type { Dimension, LooseProblem, Quantity, Sign } from '../contracts'
import { inWords } from '../dimensions/words'
import { checkDimensions, type DimensionResult } from '../dimensions/check'
import { sameDimension } from '../dimensions/dimension'
import { memberOf, ownerOf } from '../graph/symbolTable'
import type { Expression, ParsedExpression, UnitPhrase } from '../parse/expression'
import { parseExpression } from '../parse/parse'
import type { Vocabulary } from '../parse/vocabulary'
import { factorOf } from '../units/unit'
import type { Call } from './compileContext'
import { displayUnit } from './displayUnit'
import { Fault } from './fault'
import { quantityOf } from './quantity'
import { compileScalar, type Scalar } from './scalar'
import { withoutReferences, type CheckScope, type QuantityType, type Reading } from './stages'
import { alongName, alongNames, firstPlace } from './walk'

export interface ExpressionReading {
  field: string
  text: string
  parsed?: ParsedExpression
  problems: LooseProblem[]
}

export const readExpression = (text: string, field: string, vocabulary: Vocabulary): ExpressionReading => {
  const { parsed, problems } = parseExpression(text, vocabulary, field)
  return parsed ? { field, text, parsed, problems } : { field, text, problems }
}

export interface CheckedExpression {
  problems: LooseProblem[]
  empirical: boolean
  /** Absent while something waits or is wrong. */
  type?: QuantityType
  /** SI; throws `Fault`. */
  evaluate: Scalar
  quantity(digits: number): Quantity
  /** The same, but a bare symbol or literal looks as it does where it was written: 60 MPa, not 60.0 MPa. */
  quantityAsWritten(digits: number): Quantity
}

const unavailable = (): never => {
  throw new Error('An expression with problems has no number')
}

const withoutNumber = { evaluate: unavailable, quantity: unavailable, quantityAsWritten: unavailable }

/** @param unit the unit that the line asks for, where it has one */
export const checkExpression = (
  reading: ExpressionReading,
  scope: CheckScope,
  unit?: UnitPhrase,
): CheckedExpression => {
  const { parsed, field, text } = reading
  if (!parsed) {
    return { problems: [], empirical: false, ...withoutNumber }
  }
  const result: DimensionResult = checkDimensions(parsed, {
    dimensionOfSymbol: scope.dimensionOfSymbol,
    unitOfSymbol: scope.unitOfSymbol,
    functions: scope.functions,
    dimensionOfForm: (call, dimensions) => formDimension(call, dimensions, scope, field),
    field,
    unit,
  })
  const { problems, empirical, dimension } = result
  if (!dimension || problems.some(isError)) {
    return { problems, empirical, ...withoutNumber }
  }
  const sign = signOf(parsed.root, scope)
  const type: QuantityType = { dimension, unit: result.unit ?? displayUnit(parsed.root, dimension, scope) }
  if (sign) type.sign = sign
  const evaluate = scaled(compile(parsed.root, text, scope), result.scale)
  const quantity = (digits: number) => quantityOf(evaluate(), dimension, type.unit, digits)
  return {
    problems,
    empirical,
    type,
    evaluate,
    quantity,
    quantityAsWritten: (digits) => asWritten(parsed.root, quantity(digits), scope),
  }
}

const asWritten = (root: Expression, value: Quantity, scope: CheckScope): Quantity => {
  if (root.type === 'group') return asWritten(root.inner, value, scope)
  if (root.type === 'number' && value.unit === '') return { ...value, shown: root.text.trim() }
  if (root.type === 'quantity' && value.unit === root.unit.text) {
    return { ...value, number: root.value, shown: `${root.text} ${value.unit}` }
  }
  const own = root.type === 'symbol' ? scope.shownValue(root.name) : undefined
  return own?.unit === value.unit ? { ...value, number: own.number, shown: own.shown } : value
}

export const isError = (problem: LooseProblem): boolean => problem.severity !== 'advisory'

const scaled = (evaluate: Scalar, scale: number): Scalar =>
  scale === 1 ? evaluate : () => evaluate() * scale

const compile = (root: Expression, text: string, scope: CheckScope): Scalar =>
  compileScalar(root, {
    text,
    functions: scope.functions,
    register: scope.register,
    along: scope.along,
    displayFactor: (part) => factorOf(displayUnitOfPart(part, scope)),
  })

const displayUnitOfPart = (part: Expression, scope: CheckScope): UnitPhrase => {
  const parsed = { text: '', root: part, reads: [] }
  const { dimension } = checkDimensions(parsed, {
    dimensionOfSymbol: scope.dimensionOfSymbol,
    unitOfSymbol: scope.unitOfSymbol,
    functions: scope.functions,
    dimensionOfForm: (call, dimensions) => formDimension(call, dimensions, scope, ''),
  })
  return displayUnit(part, dimension ?? [0, 0, 0, 0, 0, 0, 0, 0], scope)
}

/** The sign of a bare output of an analysis, also through brackets and `at()`. */
const signOf = (expression: Expression, scope: CheckScope): Sign | undefined => {
  if (expression.type === 'group') return signOf(expression.inner, scope)
  if (expression.type === 'symbol') return scope.typeOf(expression.name)?.sign
  const name = expression.type === 'call' ? alongName(expression) : undefined
  return name === undefined ? undefined : alongType(name, scope)?.sign
}

const alongType = (name: string, scope: CheckScope): QuantityType | undefined => {
  const publication = scope.publication(ownerOf(name))
  return publication?.type === 'analysis' ? publication.along.get(memberOf(name)) : undefined
}

const length: Dimension = [1, 0, 0, 0, 0, 0, 0, 0]

const formDimension = (
  call: Call,
  dimensions: (Dimension | undefined)[],
  scope: CheckScope,
  field: string,
): Dimension | LooseProblem | undefined => {
  // Data tables and load cases have no values yet; their symbols say so where they are read.
  if (call.name !== 'at') return undefined
  const [, station] = dimensions
  const place = call.arguments[1]
  const name = alongName(call)
  if (name === undefined || !place || call.arguments.length !== 2) {
    return {
      code: 'syntax',
      message: 'at() takes a quantity along a member and a station: at(S1.T, 250 mm).',
      span: { field, ...call.range },
    }
  }
  if (station && !sameDimension(station, length)) {
    return {
      code: 'dimension-mismatch',
      message: `The station of at() must be a length; this is ${inWords(station)}.`,
      span: { field, ...place.range },
    }
  }
  const publication = scope.publication(ownerOf(name))
  if (publication && publication.type !== 'analysis') {
    return {
      code: 'unknown-symbol',
      message: `at() reads what varies along a member, as S1.T of an analysis; ${name} has one value only.`,
      span: { field, ...call.range },
    }
  }
  return alongType(name, scope)?.dimension
}

type References = Pick<Reading, 'reads' | 'along' | 'whole' | 'where' | 'expressions'>

/** What a reading of expressions says of symbols: which it reads, where, and in which manner. */
export const referencesOf = (readings: readonly ExpressionReading[]): References => {
  const trees: { root: Expression; field: string }[] = []
  const reads: string[] = []
  let along: Set<string> | undefined
  const expressions: Record<string, Expression> = {}
  for (const { parsed, field } of readings) {
    if (!parsed) continue
    trees.push({ root: parsed.root, field })
    expressions[field] = parsed.root
    for (const name of parsed.reads) if (!reads.includes(name)) reads.push(name)
    // Only `at()` asks for quantities along a member, and these have a member's name.
    if (!parsed.reads.some((name) => name.includes('.'))) continue
    for (const name of alongNames(parsed.root)) along = (along ?? new Set()).add(name)
  }
  const where = (name: string) => {
    for (const { root, field } of trees) {
      const place = firstPlace(root, name)
      if (place) return { field, ...place }
    }
    return undefined
  }
  const { whole } = withoutReferences
  return { reads, where, expressions, whole, along: along ?? withoutReferences.along }
}

/** Runs an evaluation; a fault becomes a problem of the field. */
export const withoutFault = <R>(field: string, evaluate: () => R): { result?: R; problem?: LooseProblem } => {
  try {
    return { result: evaluate() }
  } catch (error) {
    if (error instanceof Fault) return { problem: error.asProblem(field) }
    throw error
  }
}

export const quantityOrProblem = (
  field: string,
  checked: CheckedExpression,
  digits: number,
): { result?: Quantity; problem?: LooseProblem } => {
  try {
    return { result: checked.quantity(digits) }
  } catch (error) {
    if (error instanceof Fault) return { problem: error.asProblem(field) }
    throw error
  }
}
