/** What people do in a sheet, and how it then reads. */
import * as Y from 'yjs'
import type { SheetConnection } from '@/collaboration/sheetConnection'
import { setField } from '@shared/sheet/edits'

export const valueOf = (connection: SheetConnection, line: string, field = 'value'): unknown => {
  const map = connection.doc.value.getMap('lines').get(line)
  return map instanceof Y.Map ? map.get(field) : undefined
}

/** Takes the pen, writes, lays it down; false where the pen was refused. */
export const write = async (
  connection: SheetConnection,
  line: string,
  value: string,
  field = 'value',
): Promise<boolean> => {
  if (!(await connection.pens.take([line]))) return false
  setField(connection.doc.value, line, field, value)
  connection.pens.release([line])
  return true
}

const firstText = (doc: Y.Doc): Y.XmlText => {
  const paragraph = doc
    .getXmlFragment('page')
    .toArray()
    .find((node) => node instanceof Y.XmlElement && node.nodeName === 'paragraph')
  const text = paragraph instanceof Y.XmlElement ? paragraph.get(0) : undefined
  if (!(text instanceof Y.XmlText)) throw new Error('no opening paragraph')
  return text
}

export const prose = (connection: SheetConnection): string => firstText(connection.doc.value).toString()

/** Types at the end of the opening paragraph. */
export const type = (connection: SheetConnection, words: string): void => {
  const text = firstText(connection.doc.value)
  connection.doc.value.transact(() => text.insert(text.length, words), connection.origin)
}
