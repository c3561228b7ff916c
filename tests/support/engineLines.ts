/** Engine lines by hand, for tests of the engine alone. */
import type { EngineLine, SheetEngine } from '@shared/engine/contracts'
import { createSheetEngine, insertions, type SheetEngineOptions } from '@shared/pipeline'

export const engineWith = (lines: readonly EngineLine[], options?: SheetEngineOptions): SheetEngine => {
  const engine = createSheetEngine(options)
  engine.apply({ changes: insertions(lines) })
  return engine
}

export const given = (symbol: string, value: string, unit = '', id = symbol): EngineLine => ({
  id,
  kind: 'given',
  symbol,
  value,
  unit,
})

export const formula = (symbol: string, expression: string, unit = '', id = symbol): EngineLine => ({
  id,
  kind: 'formula',
  symbol,
  expression,
  unit,
})

export const criterion = (
  symbol: string,
  demand: string,
  limit: string,
  relation: '<=' | '<' | '>=' | '>' | 'within' = '<=',
  more: Partial<Extract<EngineLine, { kind: 'criterion' }>> = {},
): EngineLine => ({ id: symbol, kind: 'criterion', symbol, demand, relation, limit, ...more })
