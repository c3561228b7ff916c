/**
 * The live document of a sheet: one Y.Doc with three parts. Fields live in `lines` under the line's
 * id and not on the page, because what the editor binding merges by position ends up on a neighbour.
 */
import * as Y from 'yjs'
import { writeFields } from './documentFields'
import { writeFront } from './documentFront'
import { writeBlocks } from './pageWriting'
import type { Sheet } from './sheet'

export interface DocumentParts {
  /** The page: prose, and for every line an atom `line` with its id. */
  page: Y.XmlFragment
  /** Line id → its kind and authored fields, one key each (see documentFields). */
  lines: Y.Map<Y.Map<unknown>>
  /** Purpose, method, conclusion …, one key each; `sources` is a map of its own. */
  front: Y.Map<unknown>
}

export const documentParts = (doc: Y.Doc): DocumentParts => ({
  page: doc.getXmlFragment('page'),
  lines: doc.getMap<Y.Map<unknown>>('lines'),
  front: doc.getMap('front'),
})

/**
 * Writes a sheet into an empty document, in one transaction. Only the server does this, once:
 * a document that two parties fill has everything twice.
 * @throws Error where the document already has content: the caller has mixed up two documents.
 */
export const writeSheet = (doc: Y.Doc, sheet: Sheet, origin?: unknown): void => {
  const { page, lines, front } = documentParts(doc)
  if (page.length > 0 || lines.size > 0 || front.size > 0)
    throw new Error('writeSheet: the document is not empty')
  doc.transact(() => {
    writeFront(front, sheet.front)
    for (const block of sheet.blocks) {
      if (block.type === 'line') lines.set(block.line.id, writeFields(block.line))
    }
    // An empty page gets one empty paragraph, so that there is a place for the caret.
    writeBlocks(page, sheet.blocks.length > 0 ? sheet.blocks : [{ type: 'paragraph', content: [] }])
  }, origin)
}

/** A sheet as the first update of a new document. */
export const encodeSheet = (sheet: Sheet): Uint8Array => {
  const doc = new Y.Doc()
  writeSheet(doc, sheet)
  const update = Y.encodeStateAsUpdate(doc)
  doc.destroy()
  return update
}
