import type { CompactFields } from '@shared/engine/parse/shorthand'
import { newId, nextSymbol } from '@shared/sheet/edits'
import { lineSchema, type Line, type LineKind } from '@shared/sheet/kinds'
import type { Sheet } from '@shared/sheet/sheet'

/** A line of a kind with nothing in it yet but what its kind begins with. */
export const newLine = (sheet: Sheet, kind: LineKind, fields: Record<string, unknown> = {}): Line =>
  lineSchema.parse({ id: newId(), kind, symbol: nextSymbol(sheet, kind), ...fields })

/** The line that was typed in a paragraph: `d = 40 mm -- seat [drawing]`. */
export const typedLine = (sheet: Sheet, compact: CompactFields): Line => {
  const { note, source, fields, kind, symbol, ...own } = compact
  const extra = Object.fromEntries(Object.entries(fields).filter(([key]) => key !== 'id'))
  const written = kind === 'criterion' ? { title: note ?? '' } : { note: note ?? '' }
  return lineSchema.parse({
    ...extra,
    ...Object.fromEntries(Object.entries(own).filter(([key, value]) => key !== 'id' && value !== undefined)),
    ...written,
    source: source ?? '',
    id: newId(),
    kind,
    symbol: symbol || nextSymbol(sheet, kind),
  })
}
