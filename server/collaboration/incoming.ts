/**
 * What an update would do to a document, found out without applying it: a refused update must leave no
 * trace. Works on what Yjs decodes: new structs, and ranges of deletions.
 */
import * as Y from 'yjs'

export type DecodedUpdate = ReturnType<typeof Y.decodeUpdate>

/** The parts of the document's shape; an update to any other root is refused. */
const roots: ReadonlySet<string> = new Set(['page', 'lines', 'front'])

/** @throws when the bytes are no update, or hold what no sheet holds (another root, a document within) */
export const decodeIncoming = (update: Uint8Array): DecodedUpdate => {
  const decoded = Y.decodeUpdate(update)
  for (const struct of decoded.structs) {
    if (!(struct instanceof Y.Item)) continue
    if (struct.content instanceof Y.ContentDoc) throw new Error('a document within the document')
    const parent: unknown = struct.parent
    if (typeof parent === 'string' && !roots.has(parent)) throw new Error('an unknown part of the document')
  }
  return decoded
}

const end = (struct: Y.Item | Y.GC | Y.Skip): number => struct.id.clock + struct.length

/** Clients of which the update brings structs that the document does not have yet. */
export const newWriters = (doc: Y.Doc, { structs }: DecodedUpdate): Set<number> => {
  const writers = new Set<number>()
  for (const struct of structs) {
    if (struct instanceof Y.Skip) continue
    if (end(struct) > Y.getState(doc.store, struct.id.client)) writers.add(struct.id.client)
  }
  return writers
}

const deletesSomething = (doc: Y.Doc, { ds }: DecodedUpdate): boolean => {
  for (const [client, ranges] of ds.clients) {
    const state = Y.getState(doc.store, client)
    const structs = doc.store.clients.get(client) ?? []
    for (const { clock, len } of ranges) {
      if (clock + len > state) return true
      for (let at = Y.findIndexSS(structs, clock); at < structs.length; at++) {
        const struct = structs[at]
        if (struct === undefined || struct.id.clock >= clock + len) break
        if (!struct.deleted) return true
      }
    }
  }
  return false
}

/** False for what an up-to-date reader sends: known structs and deletions that were done long ago. */
export const wouldChange = (doc: Y.Doc, decoded: DecodedUpdate): boolean =>
  newWriters(doc, decoded).size > 0 || deletesSomething(doc, decoded)

/**
 * True where the update builds on something that neither the document nor the update itself has: Yjs
 * would keep it pending, silently, and everything after it.
 */
export const missesSomething = (doc: Y.Doc, { structs, ds }: DecodedUpdate): boolean => {
  const reach = new Map<number, number>()
  const known = (client: number): number => reach.get(client) ?? Y.getState(doc.store, client)
  const sorted = structs.filter((struct) => !(struct instanceof Y.Skip))
  sorted.sort((a, b) => a.id.clock - b.id.clock)
  for (const struct of sorted) {
    if (struct.id.clock > known(struct.id.client)) return true
    reach.set(struct.id.client, Math.max(known(struct.id.client), end(struct)))
  }
  const lacks = (id: Y.ID | null): boolean => id !== null && id.clock >= known(id.client)
  for (const struct of sorted) {
    if (!(struct instanceof Y.Item)) continue
    const parent: unknown = struct.parent
    if (lacks(struct.origin) || lacks(struct.rightOrigin)) return true
    if (parent instanceof Y.ID && lacks(parent)) return true
  }
  for (const [client, ranges] of ds.clients) {
    if (ranges.some(({ clock, len }) => clock + len > known(client))) return true
  }
  return false
}
