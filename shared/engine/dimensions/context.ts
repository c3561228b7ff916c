import type { LibraryFunction } from '../contracts'
import type { LooseProblem } from '../../errors/problem'
import type { Expression, UnitPhrase } from '../parse/expression'
import type { Dimension } from './dimension'

export interface DimensionContext {
  dimensionOfSymbol(name: string): Dimension | undefined
  /** The unit that the symbol's own line asks for or was typed with, where it has one. */
  unitOfSymbol(name: string): UnitPhrase | undefined
  functions: ReadonlyMap<string, LibraryFunction>
  /** Unit asked for by the line's `unit` field; a trailing `to` of the expression goes before it. */
  unit?: UnitPhrase
  /** Dimension of a special form (`at`, `interpolate`, `entry`, `C.max`), which only the graph knows. */
  dimensionOfForm?(
    call: Extract<Expression, { type: 'call' }>,
    argumentDimensions: (Dimension | undefined)[],
  ): Dimension | LooseProblem | undefined
  /** Field named by spans and repairs; `expression` unless told otherwise. */
  field?: string
}

export interface DimensionResult {
  /** Absent where a symbol's dimension is unknown (it waits) or a problem stands in the way. */
  dimension?: Dimension
  /** The computed number times this is the value in SI: 2π for `n to rad/s`; else 1. */
  scale: number
  /** The unit asked for, where one is. */
  unit?: UnitPhrase
  /** `numerical_value` makes it so: the checker must see that. */
  empirical: boolean
  problems: LooseProblem[]
}
