/**
 * What display is told of a line: checked trees, texts as typed, and values. It computes nothing.
 * The functions of `index.ts` that take these:
 *
 *     presentGiven(view: GivenView): Presentation
 *     presentFormula(view: FormulaView): Presentation
 *     presentCriterion(view: CriterionView): Presentation
 *     presentStep(step: StepView): Presentation            a step of an analysis' working
 *     presentValue(id, symbol, quantity): Presentation     an output of an analysis, the nomenclature
 *     presentExpression(expression, substitute?): Drawn       `{ tex, print, speech }`
 *     presentEquality(sides): Drawn                        `$tau = T*r/J$` of a method statement
 *     presentSymbol(name): Drawn
 *     presentQuantity(quantity): Drawn
 *     formatNumber(value, { digits }): string              `84.2`, `84.2×10⁶`
 *     formatQuantity(number, unit, digits): string         `84.2 MPa`
 */
import type { CriterionResult, EngineLine, LineId, Quantity } from '../contracts'
import type { Expression } from '../parse/expression'

/** What a symbol stands for; undefined while it waits: then the symbol itself stays in the substituted form. */
export type Substitution = (symbol: string) => Quantity | undefined

export interface GivenView {
  id: LineId
  symbol: string
  /** Number, unit and tolerance as typed. */
  value: string
  unit: string
  tolerance?: Extract<EngineLine, { kind: 'given' }>['tolerance']
}

export interface FormulaView {
  id: LineId
  symbol: string
  /** Absent while the text cannot be read. */
  expression?: Expression
  substitute: Substitution
  result?: Quantity
  /** Symbols that it waits for; spoken. */
  waitsFor?: readonly string[]
}

export interface CriterionView {
  id: LineId
  symbol: string
  demand?: Expression
  relation: Extract<EngineLine, { kind: 'criterion' }>['relation']
  limit?: Expression
  upper?: Expression
  substitute: Substitution
  result?: CriterionResult
  waitsFor?: readonly string[]
}

export interface StepView {
  id: LineId
  symbol: string
  /** The step's `expression`, parsed. */
  expression?: Expression
  /** The step's `values`, shown in units of the sheet's system. */
  values: Record<string, Quantity>
  result: Quantity
}
