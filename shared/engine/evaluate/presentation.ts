/** The three forms of a line, made when somebody asks: what display wants to know of it. */
import type { Presentation, Quantity } from '../contracts'
import { presentCriterion, presentFormula, presentGiven, presentValue } from '../display'
import { memberOf, ownerOf, type SymbolTable } from '../graph/symbolTable'
import type { SheetNode } from './sheetNode'

export const presentationOf = (node: SheetNode, symbols: SymbolTable<SheetNode>): Presentation => {
  const { id, line, result, reading } = node
  const { symbol, waitsFor } = result
  const substitute = (name: string): Quantity | undefined => {
    const definer = symbols.get(ownerOf(name))?.definers[0]
    const member = memberOf(name)
    return member === '' ? definer?.result.value : definer?.result.analysis?.members[member]
  }
  switch (line.kind) {
    case 'given':
      return presentGiven({ id, symbol, value: line.value, unit: line.unit, tolerance: line.tolerance })
    case 'formula':
      return presentFormula({
        id,
        symbol,
        expression: reading.expressions['expression'],
        substitute,
        result: result.value,
        waitsFor,
      })
    case 'criterion': {
      const { demand, limit, upper } = reading.expressions
      return presentCriterion({
        id,
        symbol,
        relation: line.relation,
        demand,
        limit,
        upper,
        substitute,
        result: result.criterion,
        waitsFor,
      })
    }
    case 'analysis':
    case 'inert':
      return presentValue(id, symbol)
  }
}
