/**
 * The dimension of an expression before any number is computed, with every rule of sums, powers, comparisons
 * and turns. What does not fit is a problem in words.
 */
import type { LooseProblem, Repair } from '../../errors/problem'
import type { Expression, ParsedExpression, UnitPhrase } from '../parse/expression'
import { isCaseMember } from '../parse/specialForms'
import { ambiguousDivision, mismatch, repairOf } from '../problems'
import { unitNamed } from '../units/registry'
import { countsTurns as unitCountsTurns, dimensionOfUnit, namesAngle } from '../units/unit'
import type { DimensionContext, DimensionResult } from './context'
import {
  dimension,
  dimensionless,
  isDimensionless,
  quotient,
  sameDimension,
  turns,
  type Dimension,
} from './dimension'
import { constantOf, countsTurns, holdsTwoPi, isProduct, tally, withTurns, type Factor } from './factors'
import { differenceInOffset, offsetInProduct, offsetUnitOf, sumOfTemperatures } from './temperature'
import {
  doubleTurn,
  handbookConstant,
  handbookFactor,
  turnsLeftOver,
  turnsMissing,
  type TurnCase,
} from './turns'
import { inWords } from './words'

export type { DimensionContext, DimensionResult } from './context'
export { ambiguousRate } from './rates'

/** The literal 0 has any dimension; a condition has none; undefined is not known or not right. */
type Sort = Dimension | 'any' | 'truth' | undefined

/** The unit asked for where an expression as a whole answers it. */
interface Wanted {
  dimension: Dimension
  unit: UnitPhrase
}

type Call = Extract<Expression, { type: 'call' }>
type Binary = Extract<Expression, { type: 'binary' }>

const perTime = dimension({ time: -1 })
const torque = dimension({ mass: 1, length: 2, time: -2 })
const massTimesLength = dimension({ mass: 1, length: 1 })

const isDimension = (sort: Sort): sort is Dimension => typeof sort === 'object'

/** The factor that would mend it, in words. */
const mending = (own: Dimension, wanted: Dimension): string => {
  if (isDimensionless(own)) return ' A bare number needs a unit there.'
  if (isDimensionless(wanted)) return ''
  const surplus = inWords(quotient(own, wanted))
  if (!surplus.startsWith('a quantity in')) return ` Divided by ${surplus}, it would be ${inWords(wanted)}.`
  const missing = inWords(quotient(wanted, own))
  return missing.startsWith('a quantity in') ? '' : ` Times ${missing}, it would be ${inWords(wanted)}.`
}

class Check {
  readonly problems: LooseProblem[] = []
  empirical = false
  private readonly field: string
  private readonly target: UnitPhrase | undefined
  private readonly unitOfName = (name: string): UnitPhrase | undefined => this.context.unitOfSymbol(name)

  constructor(
    private readonly parsed: ParsedExpression,
    private readonly context: DimensionContext,
  ) {
    this.field = context.field ?? 'expression'
    const unit = parsed.to ?? context.unit
    this.target = unit !== undefined && (unit.text !== '' || parsed.to !== undefined) ? unit : undefined
  }

  result(): DimensionResult {
    const { parsed, target, problems } = this
    const wanted = target && dimensionOfUnit(target)
    const sort = this.of(parsed.root, target && wanted && { dimension: wanted, unit: target })
    let own = sort === 'any' ? (wanted ?? dimensionless) : isDimension(sort) ? sort : undefined
    let scale = 1
    if (sort === 'truth') {
      const message = 'This is a condition, and a value is needed. Write condition ? value : other value.'
      problems.push(mismatch(message, this.span(parsed.root)))
    }
    if (own !== undefined && wanted !== undefined && target !== undefined) {
      scale = this.againstTarget(own, wanted, target)
      own = problems.length > 0 ? undefined : wanted
    }
    return {
      scale,
      empirical: this.empirical,
      problems,
      ...(own === undefined ? {} : { dimension: own }),
      ...(target === undefined ? {} : { unit: target }),
    }
  }

  private shown(node: Expression): string {
    return this.parsed.text.slice(node.range.from, node.range.to)
  }

  private span(node: Expression): { field: string; from: number; to: number } {
    return { field: this.field, from: node.range.from, to: node.range.to }
  }

  private unitOf(node: Expression): UnitPhrase | undefined {
    if (node.type === 'group') return this.unitOf(node.inner)
    if (node.type === 'quantity') return node.unit
    return node.type === 'symbol' ? this.context.unitOfSymbol(node.name) : undefined
  }

  private of(node: Expression, wanted?: Wanted): Sort {
    if (isProduct(node)) return this.product(node, wanted)
    switch (node.type) {
      case 'number':
        return node.value === 0 ? 'any' : dimensionless
      case 'quantity':
        return dimensionOfUnit(node.unit)
      case 'symbol':
        return node.name === 'pi' ? dimensionless : this.context.dimensionOfSymbol(node.name)
      case 'group':
        return this.of(node.inner, wanted)
      case 'unary': {
        const sort = this.of(node.operand, wanted)
        if (node.operator === 'not') return this.condition(node.operand, sort, 'not')
        return sort === 'truth' ? this.notValue(node.operand) : sort
      }
      case 'binary':
        return this.binary(node, wanted)
      case 'conditional': {
        const test = this.condition(node.test, this.of(node.test), '?')
        const then = this.of(node.then, wanted)
        const otherwise = this.of(node.otherwise, wanted)
        const both = this.alike(
          node,
          node.then,
          then,
          node.otherwise,
          otherwise,
          'The value before :',
          'the value after it',
        )
        return test && both
      }
      case 'call':
        return this.call(node)
      default:
        return undefined
    }
  }

  private notValue(node: Expression): undefined {
    this.problems.push(
      mismatch(`${this.shown(node)} is a condition, and a value is needed here.`, this.span(node)),
    )
    return undefined
  }

  private condition(node: Expression, sort: Sort, word: string): 'truth' | undefined {
    if (sort === 'truth' || sort === undefined) return sort
    const message = `${word} takes a condition, and ${this.shown(node)} is a value. Write the comparison in brackets: ${word === '?' ? '(a < b) ?' : `${word} (a < b)`}.`
    this.problems.push(mismatch(message, this.span(node)))
    return undefined
  }

  private binary(node: Binary, wanted: Wanted | undefined): Sort {
    const { operator, left, right } = node
    if (operator === 'and' || operator === 'or') {
      const before = this.condition(left, this.of(left), operator)
      const after = this.condition(right, this.of(right), operator)
      return before && after
    }
    const isSum = operator === '+' || operator === '-'
    const before = this.of(left, isSum ? wanted : undefined)
    const after = this.of(right, isSum ? wanted : undefined)
    const both = this.alike(
      node,
      left,
      before,
      right,
      after,
      `The left side of ${operator}`,
      'the right side',
    )
    if (isSum) {
      if (operator === '+' && offsetUnitOf(left, this.unitOfName) && offsetUnitOf(right, this.unitOfName)) {
        this.problems.push(sumOfTemperatures(node, this.field))
        return undefined
      }
      return both
    }
    return both === undefined ? undefined : 'truth'
  }

  private alike(
    whole: Expression,
    left: Expression,
    before: Sort,
    right: Expression,
    after: Sort,
    leftWords: string,
    rightWords: string,
  ): Sort {
    if (before === 'truth') return this.notValue(left)
    if (after === 'truth') return this.notValue(right)
    if (before === undefined || after === undefined) return undefined
    if (before === 'any') return after
    if (after === 'any' || sameDimension(before, after)) return before
    const repairs: Repair[] = []
    let hint = ''
    if (sameDimension(withTurns(before, 0), withTurns(after, 0))) {
      const turning = turns(before) !== 0 ? left : right
      hint = ` ${this.shown(turning)} counts turns; an angular speed is 2π times the rotational frequency.`
      const own = turning === left ? before : after
      if (turns(own) === 1) {
        const call = `angular_speed(${this.shown(turning.type === 'group' ? turning.inner : turning)})`
        const { text } = this.parsed
        const mended = text.slice(0, turning.range.from) + call + text.slice(turning.range.to)
        repairs.push(repairOf(`Write ${call}`, this.field, mended))
      }
    } else hint = mending(after, before).replace(', it would', ', the right side would')
    this.problems.push(
      mismatch(
        `${leftWords} is ${inWords(before)}, ${rightWords} ${inWords(after)}.${hint}`,
        this.span(whole),
        repairs,
      ),
    )
    return undefined
  }

  // -------------------------------------------------------------- calls

  private call(node: Call): Sort {
    if (node.name === 'numerical_value') return this.numericalValue(node)
    const { functions, dimensionOfForm } = this.context
    if (isCaseMember(node.name)) return this.form(dimensionOfForm?.call(this.context, node, []))
    const sorts = node.arguments.map((argument) =>
      argument.type === 'word' || argument.type === 'unit' ? null : this.of(argument),
    )
    const truth = sorts.indexOf('truth')
    if (truth >= 0) return this.notValue(node.arguments[truth] ?? node)
    const library = functions.get(node.name)
    if (library === undefined) {
      const known = sorts.map((sort) => (sort === null || !isDimension(sort) ? undefined : sort))
      return this.form(dimensionOfForm?.call(this.context, node, known))
    }
    if (sorts.includes(undefined)) return undefined
    const takesAny = node.name === 'min' || node.name === 'max' || node.name === 'atan2'
    const kind = sorts.find((sort): sort is Dimension => sort !== null && isDimension(sort))
    const given = sorts.map((sort) =>
      sort === 'any' ? (takesAny ? (kind ?? dimensionless) : dimensionless) : (sort as Dimension | null),
    )
    const answer = library.dimension(given)
    if (!('message' in answer)) return answer
    this.problems.push(mismatch(answer.message, this.span(node.arguments[answer.argument] ?? node)))
    return undefined
  }

  private form(answer: Dimension | LooseProblem | undefined): Sort {
    if (answer === undefined || !('code' in answer)) return answer
    this.problems.push(answer)
    return undefined
  }

  private numericalValue(node: Call): Sort {
    this.empirical = true
    const [value, unit] = node.arguments
    if (value === undefined || unit?.type !== 'unit') return undefined
    const wanted = dimensionOfUnit(unit.unit)
    const own = this.of(value, { dimension: wanted, unit: unit.unit })
    if (own === 'truth') return this.notValue(value)
    if (own === undefined) return undefined
    if (own === 'any' || sameDimension(own, wanted)) return dimensionless
    this.problems.push(this.targetProblem(value, own, wanted, unit.unit))
    return undefined
  }

  // -------------------------------------------------------------- products

  private product(node: Expression, wanted: Wanted | undefined): Sort {
    const factors: Factor[] = []
    const known = this.problems.length
    this.flatten(node, 1, factors)
    if (this.problems.length > known) return undefined
    const sums = tally(factors)
    const at: TurnCase = {
      parsed: this.parsed,
      field: this.field,
      node,
      factors,
      target: wanted?.dimension,
      unit: wanted?.unit,
    }
    const problem = this.offsetFactor(factors) ?? this.turnProblem(at, sums.pi !== 0)
    if (problem) {
      this.problems.push(problem)
      return undefined
    }
    const own = sums.dimension
    if (own === undefined) return undefined
    const asked = wanted === undefined ? 0 : turns(wanted.dimension)
    const need = turns(own) - asked
    if (need === 0) return own
    if (holdsTwoPi(sums, need)) return withTurns(own, asked)
    if (wanted === undefined && sums.pi !== 0 && factors.some(countsTurns)) {
      this.problems.push(turnsLeftOver(at))
      return undefined
    }
    return own
  }

  private offsetFactor(factors: readonly Factor[]): LooseProblem | undefined {
    if (factors.length === 1 && factors[0]?.exponent === 1) return undefined
    for (const { node, dimension: own } of factors) {
      if (own === undefined || own[4] === 0) continue
      const unit = offsetUnitOf(node, this.unitOfName)
      if (unit !== undefined) return offsetInProduct(this.shown(node), unit, node, this.field)
    }
    return undefined
  }

  private turnProblem(at: TurnCase, besidePi: boolean): LooseProblem | undefined {
    const { factors } = at
    const asksTurns = at.target !== undefined && turns(at.target) !== 0
    const turning = factors.some((factor) => factor.kind === 'quantity' && countsTurns(factor))
    if (turning || asksTurns) {
      const constant = handbookFactor(factors)
      if (constant) return handbookConstant(at, constant)
      if (turning) return undefined
    }
    return besidePi ? this.countedTwice(at) : undefined
  }

  /** `2*pi` beside rad/s, `180/pi` beside deg: what the units do already. */
  private countedTwice(at: TurnCase): LooseProblem | undefined {
    const { factors } = at
    const literal = (value: number, sign: 1 | -1): Factor | undefined =>
      factors.find(
        (factor) => factor.kind === 'literal' && factor.value === value && factor.exponent === sign,
      )
    const pi = (sign: 1 | -1): Factor | undefined =>
      factors.find((factor) => factor.kind === 'pi' && factor.exponent === sign)
    const two = literal(2, 1)
    const over = pi(1)
    const under = pi(-1)
    const speed = factors.find(
      (factor) => factor.kind === 'quantity' && factor.exponent > 0 && this.isAngularSpeed(factor),
    )
    if (two && over && speed && !isCircumference(two, over, speed, factors)) {
      const message = `${this.shown(speed.node)} is an angular speed, so 2*pi counts the turn twice. Where 2*pi belongs to a circumference, put it in brackets with the radius: (2*pi*r).`
      return doubleTurn(at, message, [two, over])
    }
    const degrees = at.unit?.factors.some(({ unit, exponent }) => unit === 'deg' && exponent > 0) === true
    const half = literal(180, 1)
    if (degrees && half && under) {
      return doubleTurn(at, `${at.unit?.text} converts the angle already, so 180/pi converts it twice.`, [
        half,
        under,
      ])
    }
    const halfUnder = literal(180, -1)
    const angle = factors.find(
      (factor) => factor.exponent > 0 && this.unitOf(factor.node)?.factors.some(({ unit }) => unit === 'deg'),
    )
    if (over && halfUnder && angle) {
      return doubleTurn(at, `${this.shown(angle.node)} carries its unit deg, so pi/180 converts it twice.`, [
        over,
        halfUnder,
      ])
    }
    return undefined
  }

  private isAngularSpeed({ node, dimension: own }: Factor): boolean {
    if (own === undefined || !sameDimension(own, perTime)) return false
    if (node.type === 'call') return node.name === 'angular_speed'
    return this.unitOf(node)?.factors.some(({ unit }) => unitNamed(unit).namesAngle) === true
  }

  private flatten(node: Expression, exponent: number, factors: Factor[], bracket?: Expression): void {
    if (node.type === 'symbol' && node.name !== 'pi') {
      factors.push(this.factor(node, exponent, this.context.dimensionOfSymbol(node.name), bracket))
      return
    }
    if (node.type === 'unary' && node.operator !== 'not')
      return this.flatten(node.operand, exponent, factors, bracket)
    if (node.type === 'group' && (isProduct(node.inner) || isLeaf(node.inner))) {
      return this.flatten(node.inner, exponent, factors, bracket ?? node)
    }
    if (node.type === 'binary') {
      const { operator, left, right } = node
      if (operator === '*' || operator === '/') {
        const first = factors.length
        this.flatten(left, exponent, factors, bracket)
        if (operator === '/' && right.type === 'quantity')
          this.checkDivision(node, tally(factors.slice(first)).dimension)
        return this.flatten(right, operator === '*' ? exponent : -exponent, factors, bracket)
      }
      if (operator === '^') {
        const raised = constantOf(right)
        if (raised !== undefined) return this.flatten(left, exponent * raised, factors, bracket)
        factors.push(this.factor(node, exponent, this.raised(left, right), bracket))
        return
      }
    }
    if (node.type === 'number') {
      factors.push({
        ...this.factor(node, exponent, dimensionless, bracket),
        kind: 'literal',
        value: node.value,
      })
      return
    }
    if (node.type === 'symbol' && node.name === 'pi') {
      factors.push({ ...this.factor(node, exponent, dimensionless, bracket), kind: 'pi' })
      return
    }
    const sort = this.of(node)
    if (sort === 'truth') this.notValue(node)
    factors.push(
      this.factor(
        node,
        exponent,
        sort === 'any' ? dimensionless : isDimension(sort) ? sort : undefined,
        bracket,
      ),
    )
  }

  private factor(
    node: Expression,
    exponent: number,
    own: Dimension | undefined,
    bracket?: Expression,
  ): Factor {
    return {
      node,
      exponent,
      kind: 'quantity',
      value: Number.NaN,
      dimension: own,
      bracket,
    }
  }

  /** A power whose exponent is no constant. */
  private raised(base: Expression, exponent: Expression): Dimension | undefined {
    const own = this.of(base)
    const count = this.of(exponent)
    if (own === 'truth') return this.notValue(base)
    if (count === 'truth') return this.notValue(exponent)
    if (isDimension(count) && !isDimensionless(count)) {
      this.problems.push(
        mismatch(
          `An exponent is a bare number; ${this.shown(exponent)} is ${inWords(count)}.`,
          this.span(exponent),
        ),
      )
      return undefined
    }
    if (isDimension(own) && !isDimensionless(own)) {
      const message = `${this.shown(base)} is ${inWords(own)}, and its exponent ${this.shown(exponent)} is no constant: the result would have no fixed dimension. Divide ${this.shown(base)} by a reference first.`
      this.problems.push(mismatch(message, this.span(base)))
      return undefined
    }
    return own === undefined || count === undefined ? undefined : dimensionless
  }

  /** `1/2 m` after something dimensionless: both readings. */
  private checkDivision({ left, right }: Binary, before: Dimension | undefined): void {
    if (
      right.type !== 'quantity' ||
      before === undefined ||
      !isDimensionless(before) ||
      right.unit.factors.length === 0
    )
      return
    const { text } = this.parsed
    const over = this.shown(left)
    const whole = (reading: string): string =>
      text.slice(0, left.range.from) + reading + text.slice(right.range.to)
    const unit = text.slice(right.range.from + right.text.length, right.range.to).trim()
    const readings = [`${over}/(${this.shown(right)})`, `${over}/${right.text}*1 ${unit}`]
    this.problems.push(
      ambiguousDivision(
        `${over}/${this.shown(right)}`,
        readings.map((reading) => ({ shown: reading, text: whole(reading) })),
        { field: this.field, from: left.range.from, to: right.range.to },
      ),
    )
  }

  // -------------------------------------------------------------- the unit asked for

  /** Answers the scale; pushes what does not fit. */
  private againstTarget(own: Dimension, wanted: Dimension, target: UnitPhrase): number {
    const { root } = this.parsed
    if (sameDimension(own, wanted)) {
      const subtracts = root.type === 'binary' && root.operator === '-'
      if (
        subtracts &&
        offsetUnitOf(root.right, this.unitOfName) &&
        target.factors.some(({ unit }) => unitNamed(unit).zero !== undefined)
      ) {
        this.problems.push(differenceInOffset(target, root, this.field))
      }
      return 1
    }
    if (sameDimension(withTurns(own, 0), withTurns(wanted, 0))) {
      const scale = this.conversion(root, own, wanted, target)
      if (scale !== undefined) return scale
    }
    this.problems.push(this.targetProblem(root, own, wanted, target))
    return 1
  }

  /** `n to rad/s`, `omega to rpm`: a single symbol or unit phrase whose own unit is a turn or names rad. */
  private conversion(
    root: Expression,
    own: Dimension,
    wanted: Dimension,
    target: UnitPhrase,
  ): number | undefined {
    const single = root.type === 'group' ? root.inner : root
    if (single.type !== 'symbol' && single.type !== 'quantity') return undefined
    const unit = this.unitOf(single)
    const leaves = turns(own)
    const arrives = turns(wanted)
    if (leaves !== 0 && arrives === 0 && namesAngle(target)) return (2 * Math.PI) ** leaves
    if (leaves === 0 && arrives !== 0 && unit && namesAngle(unit) && unitCountsTurns(target))
      return (2 * Math.PI) ** -arrives
    return undefined
  }

  private targetProblem(node: Expression, own: Dimension, wanted: Dimension, unit: UnitPhrase): LooseProblem {
    if (sameDimension(withTurns(own, 0), withTurns(wanted, 0))) {
      const factors: Factor[] = []
      if (isProduct(node)) this.flatten(node, 1, factors)
      else factors.push(this.factor(node, 1, own))
      const at: TurnCase = { parsed: this.parsed, field: this.field, node, factors, target: wanted, unit }
      return turns(own) === 0 ? turnsMissing(at, own) : turnsLeftOver(at)
    }
    const repairs = this.poundInch(node, own, wanted, unit)
    const hint = repairs.length > 0 ? ' lb is a mass; the force is lbf.' : mending(own, wanted)
    const message = `${this.shown(node)} is ${inWords(own)}; ${unit.text} is a unit of ${withoutArticle(wanted)}.${hint}`
    return mismatch(message, this.span(node), repairs)
  }

  /** `lb in` is mass times length; where a torque is expected, `lbf in` is meant. */
  private poundInch(node: Expression, own: Dimension, wanted: Dimension, unit: UnitPhrase): Repair[] {
    const { text } = this.parsed
    const typed = (phrase: UnitPhrase): string => phrase.text.replace(/\blbm?\b/, 'lbf')
    if (sameDimension(own, massTimesLength) && sameDimension(wanted, torque) && node.type === 'quantity') {
      const mended = this.shown(node).replace(node.unit.text, typed(node.unit))
      return [
        repairOf(
          `Write ${mended}`,
          this.field,
          text.slice(0, node.range.from) + mended + text.slice(node.range.to),
        ),
      ]
    }
    if (!sameDimension(own, torque) || !sameDimension(wanted, massTimesLength)) return []
    if (this.parsed.to === undefined) return [repairOf(`Show it in ${typed(unit)}`, 'unit', typed(unit))]
    const asked = text.lastIndexOf(unit.text)
    return [
      repairOf(
        `Show it in ${typed(unit)}`,
        this.field,
        text.slice(0, asked) + typed(unit) + text.slice(asked + unit.text.length),
      ),
    ]
  }
}

const withoutArticle = (wanted: Dimension): string => inWords(wanted).replace(/^an? (?!quantity in)/, '')

const isLeaf = (node: Expression): boolean =>
  node.type === 'number' ||
  node.type === 'quantity' ||
  node.type === 'symbol' ||
  (node.type === 'unary' && node.operator !== 'not' && isLeaf(node.operand)) ||
  (node.type === 'group' && isLeaf(node.inner))

/** `(2*pi*r)`: a bracket of its own, with another quantity and without the angular speed. */
const isCircumference = (two: Factor, pi: Factor, speed: Factor, factors: readonly Factor[]): boolean =>
  two.bracket !== undefined &&
  two.bracket === pi.bracket &&
  speed.bracket !== two.bracket &&
  factors.some((factor) => factor.kind === 'quantity' && factor.bracket === two.bracket)

/** Checks an expression against its symbols and the unit asked for. Never throws for what a person wrote. */
export const checkDimensions = (parsed: ParsedExpression, context: DimensionContext): DimensionResult =>
  new Check(parsed, context).result()
