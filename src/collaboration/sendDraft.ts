/** A draft written into the sheet as it is now: fields of lines that stand there, of plain values. */
import * as Y from 'yjs'
import { setField } from '@shared/sheet/edits'
import type { KeptDraft } from './deviceStore'

type Plain = string | number | boolean

const isPlain = (value: unknown): value is Plain => ['string', 'number', 'boolean'].includes(typeof value)

/** A cell is named by its place, and rows may have moved since. */
const isCell = (field: string): boolean => /\.\d+(\.|$)/.test(field)

/** Whether every field of it can be written as it is; others are for copying by hand. */
export const isSimple = (doc: Y.Doc, draft: KeptDraft): boolean => {
  const lines = doc.getMap('lines')
  return draft.fields.every(
    ({ key, field, mine }) =>
      !isCell(field) &&
      (mine === undefined || isPlain(mine)) &&
      (key.startsWith('front:') || lines.get(key) instanceof Y.Map),
  )
}

export const writeDraft = (doc: Y.Doc, draft: KeptDraft, origin: unknown): void => {
  doc.transact(() => {
    for (const { key, field, mine } of draft.fields) {
      if (!key.startsWith('front:')) setField(doc, key, field, mine ?? null, origin)
      else doc.getMap('front').set(key.slice('front:'.length), mine ?? '')
    }
  }, origin)
}
