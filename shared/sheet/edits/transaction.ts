import type * as Y from 'yjs'
import { documentParts } from '../document'

/** Origin of every act of the person at this screen: undo tracks it, and nothing else uses it. */
export const ownEdit = Symbol('own edit')

/** Where a line goes: at a place among the page's blocks, or beside another line. */
export type Place = { index: number } | { after: string } | { before: string } | 'end'

/** Runs an act as one transaction, so that it is stored, relayed and undone as one step. */
export const asOneStep = <Result>(doc: Y.Doc, origin: unknown, act: () => Result): Result =>
  doc.transact(act, origin)

export const fieldsOf = (doc: Y.Doc, lineId: string): Y.Map<unknown> | undefined =>
  documentParts(doc).lines.get(lineId)

/** Random, so that two people's new lines never share one. */
export const newId = (): string => crypto.randomUUID().replaceAll('-', '').slice(0, 20)
