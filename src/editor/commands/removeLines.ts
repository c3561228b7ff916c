import type * as Y from 'yjs'
import type { LineId, LineResult } from '@shared/engine/contracts'
import { documentParts } from '@shared/sheet/document'
import { asOneStep, removeLine } from '@shared/sheet/edits'
import { blockElement } from '@shared/sheet/pageWriting'

const ownerOf = (symbol: string): string => symbol.split('.')[0] ?? symbol

/** How many lines, other than these, read what these define. */
export const usersOf = (ids: readonly LineId[], results: ReadonlyMap<LineId, LineResult>): number => {
  const symbols = new Set(ids.map((id) => results.get(id)?.symbol).filter(Boolean))
  const going = new Set(ids)
  return [...results.values()].filter(
    ({ id, reads }) => !going.has(id) && reads.some((symbol) => symbols.has(ownerOf(symbol))),
  ).length
}

/** What is said when lines are gone: *Line deleted; 4 lines used it.* */
export const deletionNotice = (count: number, users: number): string => {
  const what = count === 1 ? 'Line deleted' : `${count} lines deleted`
  if (users === 0) return `${what}.`
  const whom = count === 1 ? 'it' : 'them'
  return `${what}; ${users} ${users === 1 ? 'line' : 'lines'} used ${whom}.`
}

/** Takes lines off the page as one step. A page that would be empty keeps a place for the caret. */
export const removeLines = (doc: Y.Doc, ids: readonly LineId[], origin: unknown): void =>
  asOneStep(doc, origin, () => {
    for (const id of ids) removeLine(doc, id, origin)
    const { page } = documentParts(doc)
    if (page.length === 0) page.insert(0, [blockElement({ type: 'paragraph', content: [] })])
  })
