import type { Problem } from '../errors/problem'
import { lineSchema } from './kinds'
import type { Line } from './kinds'

type Container = Record<PropertyKey, unknown>

const isContainer = (value: unknown): value is Container => typeof value === 'object' && value !== null

/**
 * Takes away what is at the path: the member of a record, else the entry of a list that it is in
 * (noted in `leaving`, removed by the caller). Answers whether there was anything to take.
 */
const takeAway = (
  root: Container,
  path: readonly PropertyKey[],
  leaving: Map<unknown[], Set<number>>,
): boolean => {
  const trail: Container[] = [root]
  for (const key of path.slice(0, -1)) {
    const next = trail.at(-1)?.[key]
    if (!isContainer(next)) break
    trail.push(next)
  }
  for (let depth = trail.length - 1; depth >= 0; depth--) {
    const parent = trail[depth]
    const key = path[depth]
    if (parent === undefined || key === undefined) continue
    if (Array.isArray(parent)) {
      const entries = leaving.get(parent) ?? new Set()
      leaving.set(parent, entries.add(Number(key)))
      return true
    }
    if (depth === path.length - 1 && Object.hasOwn(parent, key)) return Reflect.deleteProperty(parent, key)
  }
  return false
}

/**
 * Validates what a document or a text says of a line. Fields that cannot be read become problems and
 * get their default; the rest of the line stays. Without a readable kind or id there is no line.
 */
export const readLine = (authored: Record<string, unknown>): { line?: Line; problems: Problem[] } => {
  const problems: Problem[] = []
  const lineId = typeof authored.id === 'string' ? authored.id : undefined
  const kept: Container = { ...authored }
  let copied = false
  for (let pass = 0; pass < 8; pass++) {
    const read = lineSchema.safeParse(kept)
    if (read.success) return { line: read.data, problems }
    if (!copied) {
      for (const [key, value] of Object.entries(kept))
        kept[key] = isContainer(value) ? structuredClone(value) : value
      copied = true
    }
    const leaving = new Map<unknown[], Set<number>>()
    for (const issue of read.error.issues.slice(0, 50)) {
      const field = issue.path.map(String).join('.') || 'line'
      problems.push({
        ...(lineId === undefined ? {} : { lineId }),
        code: 'invalid-field',
        severity: 'error',
        message:
          field === 'kind'
            ? `“${String(authored.kind)}” is no kind of line that this program knows. Remove the line or write it again.`
            : `The field “${field}” could not be read (${issue.message}). It counts as empty: write it again.`,
        span: { field },
      })
      if (field === 'kind' || field === 'id' || field === 'line') return { problems }
      if (pass > 2 || !takeAway(kept, issue.path, leaving))
        Reflect.deleteProperty(kept, issue.path[0] as string)
    }
    for (const [list, entries] of leaving)
      list.splice(0, list.length, ...list.filter((_, index) => !entries.has(index)))
  }
  return { problems }
}
