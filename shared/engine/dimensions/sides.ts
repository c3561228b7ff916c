/** Two parts that must be alike: the sides of a sum or comparison, the values of a condition; and conditions. */
import type { Repair } from '../../errors/problem'
import type { Expression } from '../parse/expression'
import { mismatch, repairOf } from '../problems'
import type { Checking, Sort, Wanted } from './checking'
import { sameDimension, turns, type Dimension } from './dimension'
import { withTurns } from './factors'
import { mending } from './mending'
import { differenceAgainstScale, offsetUnitOf, sumOfTemperatures, temperatureKind } from './temperature'
import { inWords } from './words'

type Binary = Extract<Expression, { type: 'binary' }>
type Conditional = Extract<Expression, { type: 'conditional' }>

interface Side {
  node: Expression
  sort: Sort
  /** As a message begins: `The left side of +`. */
  words: string
}

/** Says so where a value stands for a condition; `word` is what takes it. */
export const asCondition = (
  checking: Checking,
  node: Expression,
  sort: Sort,
  word: string,
): 'truth' | undefined => {
  if (sort === 'truth' || sort === undefined) return sort
  const example = word === '?' ? '(a < b) ?' : `${word} (a < b)`
  return checking.note(
    mismatch(
      `${word} takes a condition, and ${checking.shown(node)} is a value. Write the comparison in brackets: ${example}.`,
      checking.span(node),
    ),
  )
}

/** `angular_speed(n)` in the place of n, which counts turns. */
const angularSpeedRepair = (checking: Checking, turning: Expression): Repair => {
  const call = `angular_speed(${checking.shown(turning.type === 'group' ? turning.inner : turning)})`
  const { text } = checking.parsed
  const mended = text.slice(0, turning.range.from) + call + text.slice(turning.range.to)
  return repairOf(`Write ${call}`, checking.field, mended)
}

/** Why two dimensions differ, to stand behind what they are, and what mends it. */
const difference = (
  checking: Checking,
  left: Expression,
  before: Dimension,
  right: Expression,
  after: Dimension,
): { hint: string; repairs: Repair[] } => {
  if (!sameDimension(withTurns(before, 0), withTurns(after, 0))) {
    const hint = mending(after, before).replace(', it would', ', the right side would')
    return { hint, repairs: [] }
  }
  const [turning, own] = turns(before) !== 0 ? [left, before] : [right, after]
  const hint = ` ${checking.shown(turning)} counts turns; an angular speed is 2π times the rotational frequency.`
  return { hint, repairs: turns(own) === 1 ? [angularSpeedRepair(checking, turning)] : [] }
}

/** The sort of both sides; `whole` is marked where they differ. */
const alike = (checking: Checking, whole: Expression, left: Side, right: Side): Sort => {
  const { sort: before } = left
  const { sort: after } = right
  if (before === 'truth') return checking.notValue(left.node)
  if (after === 'truth') return checking.notValue(right.node)
  if (before === undefined || after === undefined) return undefined
  if (before === 'any') return after
  if (after === 'any' || sameDimension(before, after)) return before
  const { hint, repairs } = difference(checking, left.node, before, right.node, after)
  const message = `${left.words} is ${inWords(before)}, ${right.words} ${inWords(after)}.${hint}`
  return checking.note(mismatch(message, checking.span(whole), repairs))
}

const comparesDifference = ({ unitOfName }: Checking, left: Expression, right: Expression): boolean => {
  const kinds = [temperatureKind(left, unitOfName), temperatureKind(right, unitOfName)]
  return kinds.includes('difference') && kinds.includes('absolute')
}

/** A sum, a difference, a comparison, or conditions joined by `and` or `or`. */
export const ofBinary = (checking: Checking, node: Binary, wanted: Wanted | undefined): Sort => {
  const { operator, left, right } = node
  if (operator === 'and' || operator === 'or') {
    const before = asCondition(checking, left, checking.of(left), operator)
    const after = asCondition(checking, right, checking.of(right), operator)
    return before && after
  }
  const isSum = operator === '+' || operator === '-'
  const asked = isSum ? wanted : undefined
  const both = alike(
    checking,
    node,
    { node: left, sort: checking.of(left, asked), words: `The left side of ${operator}` },
    { node: right, sort: checking.of(right, asked), words: 'the right side' },
  )
  if (!isSum) {
    if (both !== undefined && comparesDifference(checking, left, right)) {
      return checking.note({ ...differenceAgainstScale(checking.field), span: checking.span(node) })
    }
    return both === undefined ? undefined : 'truth'
  }
  const isAbsolute = (side: Expression): boolean => offsetUnitOf(side, checking.unitOfName) !== undefined
  return operator === '+' && isAbsolute(left) && isAbsolute(right)
    ? checking.note(sumOfTemperatures(node, checking.field))
    : both
}

/** `test ? then : otherwise` */
export const ofConditional = (checking: Checking, node: Conditional, wanted: Wanted | undefined): Sort => {
  const test = asCondition(checking, node.test, checking.of(node.test), '?')
  const both = alike(
    checking,
    node,
    { node: node.then, sort: checking.of(node.then, wanted), words: 'The value before :' },
    { node: node.otherwise, sort: checking.of(node.otherwise, wanted), words: 'the value after it' },
  )
  return test && both
}
