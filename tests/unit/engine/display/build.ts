/** Expression trees in few words, as the parser would make them. */
import type { Quantity } from '@shared/engine/contracts'
import { dimensionless } from '@shared/engine/dimensions/dimension'
import type { BinaryOperator, Expression } from '@shared/engine/parse/expression'

const range = { from: 0, to: 0 }

export const number = (text: string): Expression => ({ type: 'number', value: Number(text), text, range })
export const quantity = (text: string, unit: string): Expression => ({
  type: 'quantity',
  value: Number(text),
  text,
  unit: { text: unit, factors: [] },
  range,
})
export const symbol = (name: string): Expression => ({ type: 'symbol', name, range })
export const unit = (text: string): Expression => ({ type: 'unit', unit: { text, factors: [] }, range })
export const word = (text: string): Expression => ({ type: 'word', text, range })
export const group = (inner: Expression): Expression => ({ type: 'group', inner, range })
export const unary = (operator: '-' | '+' | 'not', operand: Expression): Expression => ({
  type: 'unary',
  operator,
  operand,
  range,
})
export const call = (name: string, ...args: Expression[]): Expression => ({
  type: 'call',
  name,
  arguments: args,
  range,
})
export const conditional = (test: Expression, then: Expression, otherwise: Expression): Expression => ({
  type: 'conditional',
  test,
  then,
  otherwise,
  range,
})
export const binary = (operator: BinaryOperator, left: Expression, right: Expression): Expression => ({
  type: 'binary',
  operator,
  left,
  right,
  range,
})

const chain =
  (operator: BinaryOperator) =>
  (first: Expression, ...others: Expression[]): Expression =>
    others.reduce((left, right) => binary(operator, left, right), first)

export const times = chain('*')
export const over = chain('/')
export const plus = chain('+')
export const less = chain('-')
export const power = (base: Expression, exponent: Expression): Expression => binary('^', base, exponent)

/** A value as the engine hands it over; only what is shown matters here. */
export const value = (shown: string, unitText = '', si = 0): Quantity => ({
  si,
  dimension: dimensionless,
  unit: unitText,
  number: 0,
  shown,
})
