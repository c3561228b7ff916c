import type { LineId, LineResult } from '@shared/engine/contracts'

const ownerOf = (symbol: string): string => symbol.split('.')[0] ?? symbol

/** The lines themselves and all that read them, directly or through others. */
export const waitingOn = (ids: readonly LineId[], results: ReadonlyMap<LineId, LineResult>): Set<LineId> => {
  const readers = new Map<string, LineId[]>()
  for (const { id, reads } of results.values()) {
    for (const symbol of reads) readers.set(ownerOf(symbol), [...(readers.get(ownerOf(symbol)) ?? []), id])
  }
  const reached = new Set<LineId>()
  const open = [...ids]
  for (let id = open.pop(); id !== undefined; id = open.pop()) {
    if (reached.has(id)) continue
    reached.add(id)
    const symbol = results.get(id)?.symbol
    if (symbol) open.push(...(readers.get(symbol) ?? []))
  }
  return reached
}

/** How many other lines use this one directly. */
export const usedBy = (symbol: string, results: ReadonlyMap<LineId, LineResult>): LineId[] =>
  symbol === ''
    ? []
    : [...results.values()]
        .filter(({ reads }) => reads.some((name) => ownerOf(name) === symbol))
        .map(({ id }) => id)
