/**
 * What the rules of one check share: the expression, what is known of its symbols, and what was found. Every rule
 * is a function of it; `of` leads from a rule back to the dimension of a part, so that no rule imports another's.
 */
import type { LooseProblem } from '../../errors/problem'
import type { Expression, ParsedExpression, UnitPhrase } from '../parse/expression'
import { mismatch } from '../problems'
import type { DimensionContext } from './context'
import type { Dimension } from './dimension'

/** The literal 0 has any dimension; a condition has none; undefined is not known or not right. */
export type Sort = Dimension | 'any' | 'truth' | undefined

/** The unit asked for where an expression as a whole answers it. */
export interface Wanted {
  dimension: Dimension
  unit: UnitPhrase
}

export const isDimension = (sort: Sort): sort is Dimension => typeof sort === 'object'

type DimensionOf = (checking: Checking, node: Expression, wanted?: Wanted) => Sort

export class Checking {
  readonly problems: LooseProblem[] = []
  /** Whether `numerical_value` stands in it. */
  empirical = false
  readonly field: string
  readonly unitOfName = (name: string): UnitPhrase | undefined => this.context.unitOfSymbol(name)

  constructor(
    readonly parsed: ParsedExpression,
    readonly context: DimensionContext,
    private readonly dimensionOf: DimensionOf,
  ) {
    this.field = context.field ?? 'expression'
  }

  /** The sort of a part; problems found on the way are noted. */
  of(node: Expression, wanted?: Wanted): Sort {
    return this.dimensionOf(this, node, wanted)
  }

  /** Notes a problem; what it stands in has no dimension. */
  note(problem: LooseProblem): undefined {
    this.problems.push(problem)
    return undefined
  }

  /** As typed. */
  shown(node: Expression): string {
    return this.parsed.text.slice(node.range.from, node.range.to)
  }

  span(node: Expression): { field: string; from: number; to: number } {
    return { field: this.field, from: node.range.from, to: node.range.to }
  }

  /** The unit that a literal or a symbol was given in. */
  unitOf(node: Expression): UnitPhrase | undefined {
    if (node.type === 'group') return this.unitOf(node.inner)
    if (node.type === 'quantity') return node.unit
    return node.type === 'symbol' ? this.context.unitOfSymbol(node.name) : undefined
  }

  /** A condition stands where a value is needed. */
  notValue(node: Expression): undefined {
    return this.note(
      mismatch(`${this.shown(node)} is a condition, and a value is needed here.`, this.span(node)),
    )
  }
}
