/** Builders for the `working` of an analysis: the steps that print like formulas. */
import type { Dimension, WorkingStep } from '../engine/contracts'

/** A dimension with its usual units, as `quantities.ts` names them. */
export interface QuantityKind {
  dimension: Dimension
  unit: { SI: string; US: string }
}

/** A value with its kind, for the symbols of a step. */
export const of = (kind: QuantityKind, si: number) => ({ si, ...kind })

/**
 * One step: `symbol` is `value` (SI), by an expression of the symbols in `values`. Without an expression,
 * `note` says how the value was found.
 */
export const step = (
  symbol: string,
  kind: QuantityKind,
  value: number,
  how: Omit<WorkingStep, 'symbol' | 'value' | 'dimension' | 'unit' | 'values'> & {
    values?: WorkingStep['values']
  },
): WorkingStep => ({ symbol, value, ...kind, values: {}, ...how })
