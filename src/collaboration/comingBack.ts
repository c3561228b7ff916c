/**
 * Coming back with something unsent: three versions (last acknowledged base, mine, theirs) and one update
 * that merges mine into theirs. Prose merges character by character. A line that both changed keeps
 * theirs; mine is handed back, to be shown to its author.
 */
import * as Y from 'yjs'
import { penOfFront, frontTexts } from '@shared/protocol'
import { contestedKeys, differingFields, differingKeys, type DifferingField } from './differences'

const docOf = (updates: readonly Uint8Array[]): Y.Doc => {
  const doc = new Y.Doc()
  for (const update of updates) Y.applyUpdate(doc, update)
  return doc
}

export interface Versions {
  base: Y.Doc
  mine: Y.Doc
  theirs: Y.Doc
  unsent: readonly Uint8Array[]
}

/** True where the document has everything that the update would bring; an update of deletions alone cannot tell. */
const isContained = (update: Uint8Array, doc: Y.Doc): boolean => {
  const { to } = Y.parseUpdateMeta(update)
  return to.size > 0 && [...to].every(([client, clock]) => clock <= Y.getState(doc.store, client))
}

/**
 * Versions from what was kept; to be ended after use. What was stored although its acknowledgement never
 * came belongs to the base: it is no change of a colleague's.
 */
export const versionsOf = (
  acknowledged: readonly Uint8Array[],
  unsent: readonly Uint8Array[],
  theirs: Y.Doc,
): Versions => {
  const stored = unsent.findLastIndex((update) => isContained(update, theirs)) + 1
  return {
    base: docOf([...acknowledged, ...unsent.slice(0, stored)]),
    mine: docOf([...acknowledged, ...unsent]),
    theirs: docOf([Y.encodeStateAsUpdate(theirs)]),
    unsent: unsent.slice(stored),
  }
}

export const endVersions = ({ base, mine, theirs }: Versions): void => {
  for (const doc of [base, mine, theirs]) doc.destroy()
}

/** Keys whose pens mine needs: what it changed and what stands in theirs, without what is contested anyway. */
export const pensToTake = ({ base, mine, theirs }: Versions): string[] => {
  const contested = contestedKeys(base, mine, theirs)
  const lines = theirs.getMap('lines')
  const fronts = new Set<string>(frontTexts.map(penOfFront))
  return [...differingKeys(base, mine)].filter(
    (key) => !contested.has(key) && (lines.has(key) || fronts.has(key)),
  )
}

export interface Merged {
  /** Undefined where nothing is to be sent. */
  update: Uint8Array | undefined
  /** What could not be merged safely: fields of mine. */
  left: DifferingField[]
}

/**
 * @param withheld keys whose pens are a colleague's now: they keep theirs, too
 * Undefined where mine builds on something that the stored document does not have.
 */
export const mergeMine = (versions: Versions, withheld: Iterable<string>): Merged | undefined => {
  const { base, mine, theirs, unsent } = versions
  const keepsTheirs = new Set([...contestedKeys(base, mine, theirs), ...withheld])
  const merged = docOf([Y.encodeStateAsUpdate(theirs), ...unsent])
  try {
    if (merged.store.pendingStructs !== null || merged.store.pendingDs !== null) return undefined
    merged.transact(() => {
      for (const key of keepsTheirs) putBack(merged, theirs, key)
    })
    const update = Y.encodeStateAsUpdate(merged, Y.encodeStateVector(theirs))
    const isSomething = unsent.length > 0
    return { update: isSomething ? update : undefined, left: differingFields(base, mine, keepsTheirs) }
  } finally {
    merged.destroy()
  }
}

const copied = (value: unknown): unknown => (value instanceof Y.AbstractType ? value.clone() : value)

const putBackFields = (target: Y.Map<unknown>, source: Y.Map<unknown>): void => {
  const json = (value: unknown) => JSON.stringify(value instanceof Y.AbstractType ? value.toJSON() : value)
  for (const field of new Set([...target.keys(), ...source.keys()])) {
    if (!source.has(field)) target.delete(field)
    else if (json(target.get(field)) !== json(source.get(field))) target.set(field, copied(source.get(field)))
  }
}

/** Makes one line or front text what it is in theirs. */
const putBack = (merged: Y.Doc, theirs: Y.Doc, key: string): void => {
  const field = frontTexts.find((name) => penOfFront(name) === key)
  if (field !== undefined) {
    const front = theirs.getMap('front')
    if (front.has(field)) merged.getMap('front').set(field, copied(front.get(field)))
    else merged.getMap('front').delete(field)
    return
  }
  const lines = merged.getMap('lines')
  const line = lines.get(key)
  const source = theirs.getMap('lines').get(key)
  if (source === undefined) lines.delete(key)
  else if (line instanceof Y.Map && source instanceof Y.Map) putBackFields(line, source)
  else lines.set(key, copied(source))
}
