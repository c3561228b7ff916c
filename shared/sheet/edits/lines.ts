import * as Y from 'yjs'
import { documentParts } from '../document'
import { readFields, writeFields } from '../documentFields'
import type { Line } from '../kinds'
import { lineAtom, writeBlocks } from '../pageWriting'
import { readLine } from '../readLine'
import type { Block } from '../sheet'
import { asOneStep, newId, ownEdit } from './transaction'
import type { Place } from './transaction'

const isAtomOf = (node: unknown, lineId: string): boolean =>
  node instanceof Y.XmlElement && node.nodeName === 'line' && node.getAttribute('id') === lineId

/** Index of the line among the page's blocks, or -1. */
export const placeOfLine = (doc: Y.Doc, lineId: string): number =>
  documentParts(doc)
    .page.toArray()
    .findIndex((node) => isAtomOf(node, lineId))

const indexOf = (doc: Y.Doc, place: Place): number => {
  const end = documentParts(doc).page.length
  if (place === 'end') return end
  if ('index' in place) return Math.min(Math.max(place.index, 0), end)
  const beside = placeOfLine(doc, 'after' in place ? place.after : place.before)
  if (beside < 0) return end
  return 'after' in place ? beside + 1 : beside
}

/** Puts a new line on the page. An id that is taken is replaced by a new one; answers the id it got. */
export const insertLine = (doc: Y.Doc, line: Line, at: Place, origin: unknown = ownEdit): string => {
  const { page, lines } = documentParts(doc)
  const id = lines.has(line.id) ? newId() : line.id
  asOneStep(doc, origin, () => {
    lines.set(id, writeFields(line))
    page.insert(indexOf(doc, at), [lineAtom(id)])
  })
  return id
}

/** Puts blocks of a text or of a clipboard on the page, lines and prose, as one step. Ids must be new. */
export const insertBlocks = (
  doc: Y.Doc,
  blocks: readonly Block[],
  at: Place,
  origin: unknown = ownEdit,
): void =>
  asOneStep(doc, origin, () => {
    const { page, lines } = documentParts(doc)
    for (const block of blocks) if (block.type === 'line') lines.set(block.line.id, writeFields(block.line))
    writeBlocks(page, blocks, indexOf(doc, at))
  })

const takeOffPage = (doc: Y.Doc, lineId: string): boolean => {
  const { page } = documentParts(doc)
  let found = false
  for (let at = placeOfLine(doc, lineId); at >= 0; at = placeOfLine(doc, lineId)) {
    page.delete(at)
    found = true
  }
  return found
}

/** Takes a line off the page. Its fields stay, set aside: a colleague may be writing in them. */
export const removeLine = (doc: Y.Doc, lineId: string, origin: unknown = ownEdit): void =>
  asOneStep(doc, origin, () => void takeOffPage(doc, lineId))

/** Puts a line that was set aside back on the page. */
export const restoreLine = (doc: Y.Doc, lineId: string, at: Place, origin: unknown = ownEdit): void => {
  const { page, lines } = documentParts(doc)
  if (!lines.has(lineId) || placeOfLine(doc, lineId) >= 0) return
  asOneStep(doc, origin, () => page.insert(indexOf(doc, at), [lineAtom(lineId)]))
}

/** Moves a line: only its place on the page; its fields stay where they are. */
export const moveLine = (doc: Y.Doc, lineId: string, to: Place, origin: unknown = ownEdit): void => {
  const from = placeOfLine(doc, lineId)
  if (from < 0) return
  const target = indexOf(doc, to)
  if (target === from || target === from + 1) return
  asOneStep(doc, origin, () => {
    takeOffPage(doc, lineId)
    documentParts(doc).page.insert(target > from ? target - 1 : target, [lineAtom(lineId)])
  })
}

/** A copy right below the line, under a symbol of its own; answers its id. */
export const duplicateLine = (
  doc: Y.Doc,
  lineId: string,
  symbol: string,
  origin: unknown = ownEdit,
): string | undefined => {
  const copy = copyOf(doc, lineId)
  return copy && insertLine(doc, { ...copy, symbol }, { after: lineId }, origin)
}

/** Ends a repetition: the second place of the id becomes a line of its own with the same fields. */
export const separateRepeatedLine = (
  doc: Y.Doc,
  lineId: string,
  origin: unknown = ownEdit,
): string | undefined => {
  const { page, lines } = documentParts(doc)
  const places = page.toArray().flatMap((node, index) => (isAtomOf(node, lineId) ? [index] : []))
  const second = places[1]
  const copy = copyOf(doc, lineId)
  if (second === undefined || !copy) return undefined
  asOneStep(doc, origin, () => {
    lines.set(copy.id, writeFields(copy))
    page.delete(second)
    page.insert(second, [lineAtom(copy.id)])
  })
  return copy.id
}

/** Drops fields of lines that stand nowhere on the page: when a revision is issued. */
export const dropSetAside = (doc: Y.Doc, origin?: unknown): void => {
  const { page, lines } = documentParts(doc)
  const placed = new Set(
    page
      .toArray()
      .map((node) =>
        node instanceof Y.XmlElement && node.nodeName === 'line' ? node.getAttribute('id') : '',
      ),
  )
  asOneStep(doc, origin, () => {
    for (const id of [...lines.keys()]) if (!placed.has(id)) lines.delete(id)
  })
}

const copyOf = (doc: Y.Doc, lineId: string): Line | undefined => {
  const fields = documentParts(doc).lines.get(lineId)
  const { line } = fields ? readLine(readFields(newId(), fields)) : {}
  if (!line) return undefined
  const copy = { ...line }
  delete copy.contested
  return copy
}
