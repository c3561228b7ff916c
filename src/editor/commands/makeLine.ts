import type * as Y from 'yjs'
import { documentParts } from '@shared/sheet/document'
import { asOneStep, insertLine } from '@shared/sheet/edits'
import type { Line } from '@shared/sheet/kinds'
import { blockElement } from '@shared/sheet/pageWriting'

/**
 * Puts a line where a paragraph stands, as one step, and an empty paragraph after it where none follows,
 * so that the next line can be typed. Answers the line's id and the index of that next block.
 */
export const replaceBlockByLine = (
  doc: Y.Doc,
  index: number,
  line: Line,
  origin: unknown,
): { id: string; next: number } =>
  asOneStep(doc, origin, () => {
    const { page } = documentParts(doc)
    const id = insertLine(doc, line, { index }, origin)
    page.delete(index + 1)
    page.insert(index + 1, [blockElement({ type: 'paragraph', content: [] })])
    return { id, next: index + 1 }
  })

/** Puts the text back that a line was made of, as one step. */
export const keepAsText = (doc: Y.Doc, lineIndex: number, text: string, origin: unknown): void =>
  asOneStep(doc, origin, () => {
    const { page } = documentParts(doc)
    page.delete(lineIndex)
    page.insert(lineIndex, [blockElement({ type: 'paragraph', content: [{ type: 'text', text }] })])
  })
