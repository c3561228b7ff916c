import type * as Y from 'yjs'
import type { LineId } from '@shared/errors/problem'
import { documentParts } from '@shared/sheet/document'
import { asOneStep, setField, setFields } from '@shared/sheet/edits'
import { readFields } from '@shared/sheet/documentFields'
import { readLine } from '@shared/sheet/readLine'

/**
 * Somebody chooses between what stands in a contested line (*theirs*) and what its other author wrote
 * while away (*mine*, as that author called it). One step; the other version is gone afterwards.
 */
export const settleContested = (doc: Y.Doc, id: LineId, keep: 'mine' | 'theirs', origin: unknown): void => {
  const fields = documentParts(doc).lines.get(id)
  const contested = fields && readLine(readFields(id, fields)).line?.contested
  if (!contested) return
  asOneStep(doc, origin, () => {
    if (keep === 'mine') setFields(doc, id, contested.fields, origin)
    setField(doc, id, 'contested', null, origin)
  })
}
