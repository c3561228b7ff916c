import { MethodProblem, type LooseProblem } from '../contracts'
import type { Expression, TextRange } from '../parse/expression'

/** Thrown inside compiled expressions: no number comes out, and this is why and where. */
export class Fault extends Error {
  constructor(
    readonly code:
      'domain' | 'not-finite' | 'out-of-range' | 'limit-exceeded' | 'missing-input' | 'invalid-field',
    message: string,
    readonly range?: TextRange,
  ) {
    super(message)
  }

  asProblem(field: string): LooseProblem {
    return { code: this.code, message: this.message, span: { field, ...this.range } }
  }
}

/** The text of a part of an expression, as typed. */
const typed = (text: string, { range }: Expression): string => text.slice(range.from, range.to).trim()

export const divisionByZero = (text: string, divisor: Expression): Fault =>
  new Fault('domain', `Division by zero: ${typed(text, divisor)} is zero.`, divisor.range)

export const rootOfNegative = (text: string, base: Expression): Fault =>
  new Fault(
    'domain',
    `${typed(text, base)} is negative: a power that is no whole number has no value.`,
    base.range,
  )

export const zeroToNegativePower = (text: string, base: Expression): Fault =>
  new Fault('domain', `Division by zero: ${typed(text, base)} is zero and its power is negative.`, base.range)

export const notFinite = (text: string, part: Expression): Fault =>
  new Fault('not-finite', `${typed(text, part)} is too large to be a number.`, part.range)

/** What a function threw, with the place of the argument that it names. */
export const faultOfCall = (
  error: unknown,
  call: Expression & { type: 'call' },
  parameters: readonly { name: string }[],
): Fault => {
  if (error instanceof Fault) return error
  if (!(error instanceof MethodProblem)) throw error
  const argument = call.arguments[parameters.findIndex((parameter) => parameter.name === error.input)]
  return new Fault(error.code, error.message, (argument ?? call).range)
}
