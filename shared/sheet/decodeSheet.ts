import * as Y from 'yjs'
import { readSheet } from './readSheet'
import type { ReadSheet } from './readSheet'

/**
 * Stored updates of a live document, oldest first, as a sheet.
 * @throws Error where one of them cannot be decoded, or builds on one that is missing
 */
export const decodeSheet = (updates: readonly Uint8Array[]): ReadSheet => {
  const doc = new Y.Doc()
  try {
    for (const update of updates) Y.applyUpdate(doc, update)
    if (doc.store.pendingStructs !== null || doc.store.pendingDs !== null)
      throw new Error('decodeSheet: an update builds on one that is missing')
    return readSheet(doc)
  } finally {
    doc.destroy()
  }
}
