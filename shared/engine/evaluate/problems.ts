/** What can be wrong with a line once its texts are read: said once, in words. */
import type { Dimension, LooseProblem } from '../contracts'
import { inWords } from '../dimensions/words'

export const missingText = (field: string, message: string): LooseProblem => ({
  code: 'missing-input',
  message,
  span: { field },
})

export const givenWithoutValue = missingText('value', 'This given has no value yet.')

export const twoUnits = (asked: string, unit: string): LooseProblem => ({
  code: 'unit-mismatch',
  message: `The expression asks for ${asked}, and this formula's unit is ${unit}. Keep one of them.`,
  span: { field: 'unit' },
  repairs: [{ label: `Show it in ${asked}`, fields: { unit: '' } }],
})

export const invalidFit = (fit: string): LooseProblem => ({
  code: 'invalid-field',
  message: `${fit} is no ISO 286 fit: a fit has letters and a grade, as in k6 or H7.`,
  span: { field: 'tolerance.fit' },
})

const withUnit = (number: string, unit: string): string =>
  unit.trim() === '' ? number.trim() : `${number.trim()} ${unit.trim()}`

export const givenOutOfRange = (
  value: string,
  unit: string,
  range: { from?: string; to?: string },
): LooseProblem => {
  const from = range.from?.trim() ? `from ${withUnit(range.from, unit)} ` : ''
  const to = range.to?.trim() ? `up to ${withUnit(range.to, unit)}` : ''
  return {
    code: 'out-of-range',
    message: `${withUnit(value, unit)} is outside the range in which this calculation is valid: ${`${from}${to}`.trim()}.`,
    span: { field: 'value' },
  }
}

export const incomparable = (
  demand: Dimension,
  other: Dimension,
  field: string,
  name: string,
): LooseProblem => ({
  code: 'dimension-mismatch',
  message: `The demand is ${inWords(demand)}, the ${name} is ${inWords(other)}: they cannot be compared.`,
  span: { field },
})

const signRepairs = (demand: string): LooseProblem['repairs'] => [
  { label: `Compare the magnitude: abs(${demand})`, fields: { demand: `abs(${demand})` } },
  { label: 'The sign has a meaning: mark this criterion signed', fields: { signed: 'true' } },
]

export const negativeDemand = (demand: string, shown: string, limit: string): LooseProblem => ({
  code: 'signed-demand',
  message: `The demand is negative (${shown}) against an upper limit of ${limit}: it must not pass by its sign.`,
  span: { field: 'demand' },
  repairs: signRepairs(demand.trim()),
})

export const signedDemand = (demand: string): LooseProblem => ({
  code: 'signed-demand',
  severity: 'advisory',
  message: `${demand.trim()} has a sign: in the other direction it would pass any upper limit.`,
  span: { field: 'demand' },
  repairs: signRepairs(demand.trim()),
})

export const boundsCrossed = (lower: string, upper: string): LooseProblem => ({
  code: 'out-of-range',
  message: `The lower bound (${lower}) is above the upper bound (${upper}).`,
  span: { field: 'limit' },
})
