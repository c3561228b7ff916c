import type { Change, LineId } from '@shared/engine/contracts'
import { engineLine } from '@shared/pipeline/engineLines'
import type { Line } from '@shared/sheet/kinds'

/** What the engine has been told so far: its lines in its order. */
export interface Told {
  order: LineId[]
  lines: Map<LineId, Line>
}

/**
 * The changes that lead the engine from what it was told to what stands in the sheet now, and only those:
 * lines that are gone, lines that are new, have moved or were written in. `told` is brought up to date.
 */
export const changesSince = (
  told: Told,
  order: readonly LineId[],
  lines: ReadonlyMap<LineId, Line>,
): Change[] => {
  const target = order.filter((id) => lines.has(id))
  const wanted = new Set(target)
  const changes: Change[] = []

  for (const id of told.order) if (!wanted.has(id)) changes.push({ id, after: null, line: null })
  const standing = told.order.filter((id) => wanted.has(id))

  target.forEach((id, index) => {
    const line = lines.get(id)
    if (!line) return
    const isInPlace = standing[index] === id
    if (isInPlace && told.lines.get(id) === line) return
    changes.push({ id, after: target[index - 1] ?? null, line: engineLine(line) })
    if (isInPlace) return
    const before = standing.indexOf(id, index)
    if (before >= 0) standing.splice(before, 1)
    standing.splice(index, 0, id)
  })

  told.order = target
  told.lines = new Map(target.flatMap((id) => (lines.has(id) ? [[id, lines.get(id) as Line] as const] : [])))
  return changes
}
