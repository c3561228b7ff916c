/** A formula, a step of an analysis' working, and a bare value: symbol = symbolic = substituted = result. */
import type { LineId, Presentation, Quantity } from '../contracts'
import { drawExpression } from './expression'
import { present, withoutRepetition, type DrawnParts } from './parts'
import { drawQuantity } from './quantity'
import { drawSymbol } from './symbol'
import type { FormulaView, StepView } from './views'

/** While something is waited for, what has a value is substituted already and the rest stays symbols. */
export const presentFormula = (view: FormulaView): Presentation => {
  const { id, symbol, expression, substitute, result, waitsFor = [] } = view
  const parts: DrawnParts = {
    symbol: drawSymbol(symbol),
    ...(expression && {
      symbolic: drawExpression(expression),
      substituted: drawExpression(expression, substitute),
    }),
    ...(result && { result: drawQuantity(result) }),
  }
  return present(id, withoutRepetition(parts), { equals: true, waitsFor: waitsFor.map(drawSymbol) })
}

/** A step without an expression (a solved system, an integral) shows its value; its note says how it was found. */
export const presentStep = ({ id, symbol, expression, values, result }: StepView): Presentation =>
  presentFormula({
    id,
    symbol,
    ...(expression && { expression }),
    substitute: (name) => (Object.hasOwn(values, name) ? values[name] : undefined),
    result,
  })

/** A symbol and its value: an output of an analysis (`S1.tau_max`), a row of the nomenclature. */
export const presentValue = (id: LineId, symbol: string, value?: Quantity): Presentation =>
  present(id, { symbol: drawSymbol(symbol), ...(value && { result: drawQuantity(value) }) }, { equals: true })
