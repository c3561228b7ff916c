import type { LineId, LineResult } from '@shared/engine/contracts'

const counted = (count: number, one: string, many: string): string => `${count} ${count === 1 ? one : many}`

const valueOf = (result: LineResult | undefined): string => {
  if (!result || result.state !== 'value') return ''
  const { value, criterion, analysis } = result
  if (value) return value.shown
  if (criterion) return `${criterion.demand.shown}|${criterion.limit.shown}|${criterion.satisfied}`
  return analysis ? JSON.stringify(analysis.outputs) : ''
}

/**
 * What differs between the results that were there and those that come: the lines whose value changed,
 * and one sentence. Lines that had no value before are not changes: they are being written.
 */
export const summariseChanges = (
  before: ReadonlyMap<LineId, LineResult>,
  after: readonly LineResult[],
): { sentence: string; ids: LineId[] } => {
  const ids = after
    .filter(
      (result) => valueOf(before.get(result.id)) !== '' && valueOf(before.get(result.id)) !== valueOf(result),
    )
    .map(({ id }) => id)
  const failed = after.filter(({ criterion }) => criterion && !criterion.satisfied).length
  const problems = after.filter((result) =>
    result.problems.some(({ severity }) => severity === 'error'),
  ).length
  const parts = [
    ids.length > 0 && counted(ids.length, 'value changed', 'values changed'),
    failed > 0 && counted(failed, 'criterion not satisfied', 'criteria not satisfied'),
    problems > 0 && counted(problems, 'line has a problem', 'lines have problems'),
  ].filter(Boolean)
  return { sentence: parts.join(', '), ids }
}
