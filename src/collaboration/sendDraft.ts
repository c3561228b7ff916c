/** A draft written into the sheet as it is now: fields of lines that stand there, of plain values. */
import * as Y from 'yjs'
import type { KeptDraft } from './deviceStore'

type Plain = string | number | boolean

const isPlain = (value: unknown): value is Plain => ['string', 'number', 'boolean'].includes(typeof value)

/** Whether every field of it can be written as it is; others are for copying by hand. */
export const isSimple = (doc: Y.Doc, draft: KeptDraft): boolean => {
  const lines = doc.getMap('lines')
  return draft.fields.every(
    ({ key, mine }) =>
      (mine === undefined || isPlain(mine)) && (key.startsWith('front:') || lines.get(key) instanceof Y.Map),
  )
}

export const writeDraft = (doc: Y.Doc, draft: KeptDraft, origin: unknown): void => {
  doc.transact(() => {
    for (const { key, field, mine } of draft.fields) {
      const line = doc.getMap('lines').get(key)
      const target = key.startsWith('front:') ? doc.getMap('front') : line
      if (!(target instanceof Y.Map)) continue
      const name = key.startsWith('front:') ? key.slice('front:'.length) : field
      if (mine === undefined) target.delete(name)
      else target.set(name, mine)
    }
  }, origin)
}
