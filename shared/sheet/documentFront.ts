import * as Y from 'yjs'
import type { Problem } from '../errors/problem'
import type { Front } from './sheet'
import { frontSchema, sourceSchema } from './sheet'

const sourcesOf = (front: Y.Map<unknown>): Y.Map<unknown> | undefined => {
  const sources = front.get('sources')
  return sources instanceof Y.Map ? sources : undefined
}

export const writeFront = (map: Y.Map<unknown>, front: Front): void => {
  for (const [key, value] of Object.entries(front)) {
    if (key !== 'sources' && value !== undefined) map.set(key, value)
  }
  const sources = new Y.Map<unknown>()
  for (const [key, source] of Object.entries(front.sources)) sources.set(key, withoutUndefined(source))
  map.set('sources', sources)
}

/** Sets one source, or removes it where `source` is null. */
export const writeSource = (
  map: Y.Map<unknown>,
  key: string,
  source: Front['sources'][string] | null,
): void => {
  let sources = sourcesOf(map)
  if (!sources) {
    sources = new Y.Map<unknown>()
    map.set('sources', sources)
  }
  if (source === null) sources.delete(key)
  else sources.set(key, withoutUndefined(source))
}

/** Reads the front; what cannot be read gets its default and a problem. */
export const readFront = (map: Y.Map<unknown>): { front: Front; problems: Problem[] } => {
  const problems: Problem[] = []
  const unreadable = (field: string) =>
    problems.push({
      code: 'invalid-field',
      severity: 'error',
      message: `The document's ${field} could not be read and is shown as empty. Write it again.`,
      span: { field },
    })
  const authored: Record<string, unknown> = {}
  for (const key of Object.keys(frontSchema.shape) as (keyof Front)[]) {
    if (key === 'sources') continue
    const value = map.get(key)
    if (value === undefined) continue
    if (frontSchema.shape[key].safeParse(value).success) authored[key] = value
    else unreadable(key)
  }
  const sources: Record<string, unknown> = {}
  for (const [key, value] of sourcesOf(map)?.entries() ?? []) {
    const readable = sourceSchema.safeParse(value)
    if (readable.success && frontSchema.shape.sources.safeParse({ [key]: readable.data }).success) {
      Object.defineProperty(sources, key, {
        value: readable.data,
        enumerable: true,
        writable: true,
        configurable: true,
      })
    } else unreadable(`sources.${key}`)
  }
  return { front: frontSchema.parse({ ...authored, sources }), problems }
}

const withoutUndefined = (value: object): object =>
  Object.fromEntries(Object.entries(value).filter(([, member]) => member !== undefined))
