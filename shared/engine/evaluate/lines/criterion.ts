/**
 * A criterion: demand against limit. Equality counts as satisfied within 1e-9 of the larger side, so
 * that a size found from the limit itself passes.
 */
import type { CriterionResult, EngineLine, LooseProblem, Quantity } from '../../contracts'
import { sameDimension } from '../../dimensions/dimension'
import { differenceAgainstScale, temperatureKind } from '../../dimensions/temperature'
import type { Expression } from '../../parse/expression'
import {
  checkExpression,
  isError,
  readExpression,
  referencesOf,
  withoutFault,
  type CheckedExpression,
  type ExpressionReading,
} from '../expressionReading'
import { boundsCrossed, incomparable, missingText, negativeDemand, signedDemand } from '../problems'
import type { Checked, CheckScope, Outcome, ReadScope, Reading } from '../stages'

type CriterionLine = Extract<EngineLine, { kind: 'criterion' }>
type Side = 'demand' | 'limit' | 'upper'

const names: Record<Side, string> = { demand: 'demand', limit: 'limit', upper: 'upper bound' }

export const readCriterion = (line: CriterionLine, scope: ReadScope): Reading => {
  const sides: Side[] = line.relation === 'within' ? ['demand', 'limit', 'upper'] : ['demand', 'limit']
  const vocabulary = { ...scope.vocabulary, onlyUnit: true }
  const readings = sides.map((side): ExpressionReading => {
    const text = line[side] ?? ''
    if (text.trim() !== '') return readExpression(text, side, vocabulary)
    return { field: side, text, problems: [missingText(side, `This criterion has no ${names[side]} yet.`)] }
  })
  const problems = readings.flatMap((reading) => reading.problems)
  return {
    ...referencesOf(readings),
    problems,
    check: (checkScope) => check(line, readings, problems.some(isError), checkScope),
  }
}

const check = (
  line: CriterionLine,
  readings: ExpressionReading[],
  isUnreadable: boolean,
  scope: CheckScope,
): Checked => {
  const [demand, limit, upper] = readings.map((reading) => checkExpression(reading, scope))
  const sides = [demand, limit, upper].filter((side) => side !== undefined)
  const problems = [
    ...sides.flatMap((side) => side.problems),
    ...comparisonProblems(readings, sides),
    ...temperatureProblems(readings, scope),
    ...(demand ? signAdvisory(line, demand) : []),
  ]
  const publication = { type: 'nothing', what: 'a criterion' } as const
  const empirical = sides.some((side) => side.empirical)
  const isComplete = !isUnreadable && sides.every((side) => side.type) && !problems.some(isError)
  if (!isComplete || !demand || !limit) return { problems, publication, empirical }
  return {
    problems,
    publication,
    empirical,
    evaluate: () => evaluate(line, { demand, limit, ...(upper && { upper }) }, scope.settings.digits),
  }
}

const isZero = (expression: Expression | undefined): boolean => {
  if (expression?.type === 'group') return isZero(expression.inner)
  return expression?.type === 'number' && expression.value === 0
}

/** The literal 0 takes any dimension. */
const comparisonProblems = (readings: ExpressionReading[], sides: CheckedExpression[]): LooseProblem[] => {
  const demand = sides[0]?.type
  if (!demand || isZero(readings[0]?.parsed?.root)) return []
  return readings.slice(1).flatMap((reading, i) => {
    const type = sides[i + 1]?.type
    if (!type || isZero(reading.parsed?.root) || sameDimension(demand.dimension, type.dimension)) return []
    return [incomparable(demand.dimension, type.dimension, reading.field, names[reading.field as Side])]
  })
}

/** A difference of temperatures has no place on the scale that its limit is given in. */
const temperatureProblems = (readings: ExpressionReading[], scope: CheckScope): LooseProblem[] => {
  const [demand, ...bounds] = readings.map(
    ({ parsed }) => parsed && temperatureKind(parsed.root, (name) => scope.typeOf(name)?.unit),
  )
  return bounds.flatMap((bound, i) =>
    demand && bound && demand !== bound ? [differenceAgainstScale(readings[i + 1]?.field ?? 'limit')] : [],
  )
}

const isUpperLimit = (line: CriterionLine): boolean => line.relation === '<=' || line.relation === '<'

const signAdvisory = (line: CriterionLine, demand: CheckedExpression): LooseProblem[] =>
  isUpperLimit(line) && !line.signed && demand.type?.sign === 'signed' ? [signedDemand(line.demand)] : []

interface Sides<T> {
  demand: T
  limit: T
  upper?: T
}

const evaluate = (line: CriterionLine, sides: Sides<CheckedExpression>, digits: number): Outcome => {
  const demand = withoutFault('demand', () => sides.demand.quantityAsWritten(digits))
  const limit = withoutFault('limit', () => sides.limit.quantityAsWritten(digits))
  const upper =
    sides.upper && withoutFault('upper', () => (sides.upper as CheckedExpression).quantityAsWritten(digits))
  const problems = [demand, limit, upper].flatMap((side) => (side?.problem ? [side.problem] : []))
  if (!demand.result || !limit.result || (upper && !upper.result)) return { problems }

  const values = { demand: demand.result, limit: limit.result, ...(upper?.result && { upper: upper.result }) }
  const refused = refusal(line, values)
  if (refused) return { problems: [refused] }
  return { problems: [], criterion: judge(line.relation, values) }
}

/** A reversed torque must not pass by its sign, and a pair of bounds must leave room between. */
const refusal = (
  line: CriterionLine,
  { demand, limit, upper }: Sides<Quantity>,
): LooseProblem | undefined => {
  if (upper && limit.si > upper.si) return boundsCrossed(limit.shown, upper.shown)
  const passesBySign = isUpperLimit(line) && !line.signed && demand.si < 0 && limit.si > 0
  return passesBySign ? negativeDemand(line.demand, demand.shown, limit.shown) : undefined
}

const judge = (relation: CriterionLine['relation'], values: Sides<Quantity>): CriterionResult => {
  const utilisation = utilisationOf(relation, values.demand.si, values.limit.si, values.upper?.si)
  return {
    ...values,
    satisfied: isSatisfied(relation, values.demand.si, values.limit.si, values.upper?.si),
    ...(utilisation !== undefined && { utilisation }),
  }
}

const isAtMost = (a: number, b: number): boolean => a - b <= 1e-9 * Math.max(Math.abs(a), Math.abs(b))

const isSatisfied = (
  relation: CriterionLine['relation'],
  demand: number,
  limit: number,
  upper = limit,
): boolean => {
  switch (relation) {
    case '<=':
      return isAtMost(demand, limit)
    case '<':
      return !isAtMost(limit, demand)
    case '>=':
      return isAtMost(limit, demand)
    case '>':
      return !isAtMost(demand, limit)
    case 'within':
      return isAtMost(limit, demand) && isAtMost(demand, upper)
  }
}

/** How much of a limit away from zero is used: 1 at the limit; absent where the signs differ or one is zero. */
const towards = (demand: number, limit: number): number | undefined =>
  demand / limit >= 0 && limit !== 0 ? demand / limit : undefined

/** How close a demand has come to a limit on the side of zero. */
const downTo = (demand: number, limit: number): number | undefined =>
  demand !== 0 && limit / demand >= 0 ? limit / demand : undefined

/** Demand over limit for an upper limit, limit over demand for a lower one, the worse side for *within*. */
const utilisationOf = (
  relation: CriterionLine['relation'],
  demand: number,
  limit: number,
  upper: number | undefined,
): number | undefined => {
  const atMost = (bound: number) => (bound > 0 ? towards(demand, bound) : downTo(demand, bound))
  const atLeast = (bound: number) => (bound < 0 ? towards(demand, bound) : downTo(demand, bound))
  if (relation === '<=' || relation === '<') return limit === 0 ? undefined : atMost(limit)
  if (relation === '>=' || relation === '>') return limit === 0 ? undefined : atLeast(limit)
  const sides = [limit, upper].flatMap((bound, i) => {
    const used = bound === undefined || bound === 0 ? undefined : i === 0 ? atLeast(bound) : atMost(bound)
    return used === undefined ? [] : [used]
  })
  return sides.length === 0 ? undefined : Math.max(...sides)
}
