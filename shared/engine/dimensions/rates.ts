import type { LooseProblem } from '../../errors/problem'
import type { UnitPhrase } from '../parse/expression'
import { dimensionOfUnit } from '../units/unit'
import { dimension, sameDimension } from './dimension'

const perTime = dimension({ time: -1 })

/** `ambiguous-rate` of a given typed in `1/s`, `s^-1`, `1/min`; undefined where there is nothing to ask. */
export const ambiguousRate = (unit: UnitPhrase): LooseProblem | undefined => {
  const [only] = unit.factors
  if (unit.factors.length !== 1 || only === undefined || !sameDimension(dimensionOfUnit(unit), perTime))
    return undefined
  const turning = only.unit === 'min' ? 'rpm' : `rev/${only.unit}`
  return {
    code: 'ambiguous-rate',
    message: `${unit.text} leaves open what is counted: turns, radians, or something else.`,
    span: { field: 'unit' },
    repairs: [
      { label: `Turns: ${turning}`, fields: { unit: turning } },
      { label: `Radians: rad/${only.unit}`, fields: { unit: `rad/${only.unit}` } },
      { label: 'A plain rate', fields: { plainRate: 'true' } },
    ],
  }
}
