/**
 * A document as it is stored, read into memory. It fails as a whole: what was not read completely is
 * never served, and nothing is ever stored from it.
 */
import * as Y from 'yjs'
import {
  readDocument,
  readState,
  updatesAfter,
  type DocumentRow,
  type StoredUpdate,
} from '@server/repositories/documentUpdates'
import type { FirmTransaction } from '@server/repositories/transaction'

export class DocumentGone extends Error {}
export class DocumentBroken extends Error {}

export interface LoadedDocument {
  row: DocumentRow
  doc: Y.Doc
  /** Head of the merged state: what compaction has done so far. */
  stateHead: number
  /** Bytes that were read: merged state and updates since. */
  bytes: number
}

/**
 * Updates with numbers in (after, upTo]; where compaction has dropped some of them, the merged state
 * stands first in their place.
 * @throws {DocumentBroken} when numbers are missing that no merged state contains
 */
export const updatesBetween = async (
  tx: FirmTransaction,
  id: string,
  after: number,
  upTo: number,
): Promise<StoredUpdate[]> => {
  const updates = await updatesAfter(tx, id, after, upTo)
  if (updates.length === upTo - after) return updates
  const state = await readState(tx, id)
  const rest = updates.filter((update) => update.head > (state?.head ?? 0))
  if (state === undefined || state.head < after || rest.length !== Math.max(0, upTo - state.head))
    throw new DocumentBroken(`Updates of document ${id} are missing between ${after} and ${upTo}.`)
  return [state, ...rest]
}

export const loadDocument = async (tx: FirmTransaction, id: string): Promise<LoadedDocument> => {
  const row = await readDocument(tx, id)
  if (row === undefined) throw new DocumentGone(`There is no document ${id}.`)
  const state = await readState(tx, id)
  const stateHead = state?.head ?? 0
  const updates = stateHead < row.head ? await updatesBetween(tx, id, stateHead, row.head) : []
  const parts = state === undefined ? updates : [state, ...updates]
  const doc = new Y.Doc()
  try {
    // One by one would run the observers' machinery for each of them; merged first, opening stays fast.
    if (parts.length > 0) Y.applyUpdate(doc, Y.mergeUpdates(parts.map((part) => new Uint8Array(part.bytes))))
    if (doc.store.pendingStructs !== null || doc.store.pendingDs !== null)
      throw new DocumentBroken(`Document ${id} builds on updates that are not stored.`)
  } catch (error) {
    doc.destroy()
    throw error
  }
  return { row, doc, stateHead, bytes: parts.reduce((sum, part) => sum + part.bytes.length, 0) }
}
