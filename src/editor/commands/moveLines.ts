import type * as Y from 'yjs'
import type { LineId } from '@shared/errors/problem'
import { documentParts } from '@shared/sheet/document'
import { asOneStep, moveLine, placeOfLine } from '@shared/sheet/edits'

/**
 * Moves lines one block up or down, together, whatever they pass: another line or a paragraph.
 * Answers whether anything moved; at the page's end nothing does.
 */
export const moveLines = (doc: Y.Doc, ids: readonly LineId[], by: 1 | -1, origin: unknown): boolean => {
  const places = ids.map((id) => placeOfLine(doc, id)).filter((place) => place >= 0)
  const first = Math.min(...places)
  const last = Math.max(...places)
  if (places.length === 0) return false
  if (by < 0 ? first === 0 : last >= documentParts(doc).page.length - 1) return false
  const inOrder = [...ids].sort((a, b) => placeOfLine(doc, a) - placeOfLine(doc, b))
  asOneStep(doc, origin, () => {
    // Away from the edge first, or one would jump over its neighbour.
    for (const id of by < 0 ? inOrder : inOrder.reverse()) {
      const at = placeOfLine(doc, id)
      moveLine(doc, id, { index: by < 0 ? at - 1 : at + 2 }, origin)
    }
  })
  return true
}
