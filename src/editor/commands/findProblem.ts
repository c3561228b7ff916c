import type { LineId, LineResult, Problem } from '@shared/engine/contracts'

/** Problems of the sheet in reading order, each with its line. */
export const problemsInOrder = (
  order: readonly LineId[],
  results: ReadonlyMap<LineId, LineResult>,
  fieldProblems: ReadonlyMap<LineId, readonly Problem[]>,
): { lineId: LineId; problem: Problem }[] =>
  order.flatMap((lineId) =>
    [...(fieldProblems.get(lineId) ?? []), ...(results.get(lineId)?.problems ?? [])].map((problem) => ({
      lineId,
      problem,
    })),
  )

/**
 * The next line with a problem after (or before) `from`, going round at the end; undefined where the
 * sheet has none. Errors come before advisories only in the sense that both are found.
 */
export const findProblem = (
  order: readonly LineId[],
  troubled: ReadonlySet<LineId>,
  from: LineId | undefined,
  by: 1 | -1,
): LineId | undefined => {
  if (troubled.size === 0) return undefined
  const start = from === undefined ? (by > 0 ? -1 : order.length) : order.indexOf(from)
  for (let step = 1; step <= order.length; step += 1) {
    const at = (((start + by * step) % order.length) + order.length) % order.length
    const id = order[at]
    if (id !== undefined && troubled.has(id)) return id
  }
  return undefined
}
