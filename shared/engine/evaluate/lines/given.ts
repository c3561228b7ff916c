/** A given: a number as typed, in its unit, within its range of validity. */
import type { EngineLine, LooseProblem } from '../../contracts'
import { ambiguousRate } from '../../dimensions/check'
import { readAuthoredNumber } from '../../parse/authoredNumber'
import type { UnitPhrase } from '../../parse/expression'
import { dimensionOfUnit, readUnit, toSI } from '../../units/unit'
import { givenOutOfRange, givenWithoutValue, invalidFit } from '../problems'
import { quantityAsTyped } from '../quantity'
import { withoutReferences, type Outcome, type Reading } from '../stages'

type GivenLine = Extract<EngineLine, { kind: 'given' }>

export const readGiven = (line: GivenLine): Reading => {
  const unit = readUnit(line.unit, 'unit')
  const problems: LooseProblem[] = unit.problem ? [unit.problem] : rateProblems(line, unit.phrase)
  const number = readNumberOf(line)
  const { value } = number
  if (number.problem) problems.push(number.problem)
  problems.push(...toleranceProblems(line), ...rangeProblems(line, value))
  const isSound = !problems.some((problem) => problem.severity !== 'advisory')
  return {
    ...withoutReferences,
    problems,
    check: () => {
      if (!unit.phrase || unit.phrase !== soundUnit(unit.phrase, problems)) return { problems: [] }
      const dimension = dimensionOfUnit(unit.phrase)
      return {
        problems: [],
        publication: { type: 'quantity', quantity: { dimension, unit: unit.phrase } },
        ...(isSound && value !== undefined && { evaluate: () => outcome(line, value, unit.phrase) }),
      }
    },
  }
}

/** A unit that the author must still choose between readings is none yet. */
const soundUnit = (unit: UnitPhrase, problems: LooseProblem[]): UnitPhrase | undefined =>
  problems.some((problem) => problem.code === 'ambiguous-rate') ? undefined : unit

const outcome = (line: GivenLine, number: number, unit: UnitPhrase): Outcome => {
  const si = toSI(number, unit)
  return {
    problems: [],
    value: quantityAsTyped(si, dimensionOfUnit(unit), unit, number, line.value.trim()),
    numbers: { '': si },
  }
}

const readNumberOf = (line: GivenLine): { value?: number; problem?: LooseProblem } =>
  line.value.trim() === '' ? { problem: givenWithoutValue } : readAuthoredNumber(line.value, 'value')

const rateProblems = (line: GivenLine, unit: UnitPhrase): LooseProblem[] => {
  const problem = line.plainRate ? undefined : ambiguousRate(unit)
  return problem ? [problem] : []
}

const toleranceProblems = ({ tolerance }: GivenLine): LooseProblem[] => {
  if (!tolerance) return []
  if ('fit' in tolerance)
    return /^[A-Za-z]{1,2}\d{1,2}$/.test(tolerance.fit.trim()) ? [] : [invalidFit(tolerance.fit)]
  return (['plus', 'minus'] as const).flatMap((side) => {
    const { problem } = readAuthoredNumber(tolerance[side].trim().replace(/^\+/, ''), `tolerance.${side}`)
    return problem ? [problem] : []
  })
}

/** A bound that cannot be read is a problem, too: it would guard nothing. */
const rangeProblems = (line: GivenLine, value: number | undefined): LooseProblem[] => {
  const bound = (side: 'from' | 'to'): { value?: number; problem?: LooseProblem } => {
    const text = line.range?.[side]?.trim() ?? ''
    return text === '' ? {} : readAuthoredNumber(text, `range.${side}`)
  }
  const [from, to] = [bound('from'), bound('to')]
  const unreadable = [from, to].flatMap(({ problem }) => (problem ? [problem] : []))
  if (unreadable.length > 0 || value === undefined) return unreadable
  const isBelow = from.value !== undefined && value < from.value
  const isAbove = to.value !== undefined && value > to.value
  return isBelow || isAbove ? [givenOutOfRange(line.value, line.unit, line.range ?? {})] : []
}
