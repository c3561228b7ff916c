/** The baseline of the first two rows: the same formulas, compiled before, evaluated by mathjs with its own units. */
import { all, create, type EvalFunction, type Unit } from 'mathjs'
import { formulasOf, shared } from './shaftGroups'

const math = create(all ?? {}, {})

interface Compiled {
  symbol: string
  code: EvalFunction
  unit: string
}

export const compiledGroup = (k: number): Compiled[] =>
  formulasOf(k).map(({ symbol, text, unit }) => ({ symbol, code: math.compile(text), unit }))

export const scopeOf = (groups: number): Map<string, unknown> => {
  const scope = new Map<string, unknown>()
  for (const { symbol, value, unit } of shared)
    scope.set(symbol, quantity(Number(value), unit.replace(' ', '*')))
  for (let k = 0; k < groups; k += 1) setDiameter(scope, k, 40 + (k % 50))
  return scope
}

export const setDiameter = (scope: Map<string, unknown>, k: number, value: number): void => {
  scope.set(`d_${k}`, quantity(value, 'mm'))
}

const quantity = (value: number, unit: string): unknown => (unit === '' ? value : math.unit(value, unit))

/** Evaluates lines in order; with `normalise`, results are brought to the display unit. */
export const evaluateGroup = (
  group: Compiled[],
  scope: Map<string, unknown>,
  normalise: boolean,
): unknown => {
  let last: unknown
  for (const { symbol, code, unit } of group) {
    const value: unknown = code.evaluate(scope)
    last = normalise && unit !== '' ? (value as Unit).to(unit.replace(' ', '*')) : value
    scope.set(symbol, last)
  }
  return last
}
