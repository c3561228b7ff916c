import { Table, TableCell, TableHeader, TableRow } from '@tiptap/extension-table'
import { DOMParser, Fragment } from '@tiptap/pm/model'
import type { Node as ProseMirrorNode, Schema } from '@tiptap/pm/model'
import { Plugin } from '@tiptap/pm/state'
import { tableEditing } from '@tiptap/pm/tables'

/**
 * Tables of prose: running text in cells, no spans, no widths, for Markdown cannot say them. A ragged
 * table, as two people's edits may leave it, is kept as it is: the part that would mend tables whenever
 * a document changes is taken out, since mending writes in somebody's name.
 */
export const PageTable = Table.extend({
  content: 'tableRow*',
  addProseMirrorPlugins() {
    const editing = tableEditing()
    return [new Plugin({ ...editing.spec, appendTransaction: undefined })]
  },
})

export const PageTableRow = TableRow.extend({ content: '(tableCell | tableHeader)*' })

const one = { default: 1, parseHTML: () => 1, rendered: false }

/** The table commands read these three; they never have another value. */
const cellAttributes = () => ({
  colspan: one,
  rowspan: one,
  colwidth: { default: null, parseHTML: () => null, rendered: false },
})

/** Pasted cells keep their running text; paragraphs and lists in them are joined. */
const runningText = (element: Node, schema: Schema): Fragment => {
  const paragraph: ProseMirrorNode | undefined = schema.nodes.paragraph?.create()
  return paragraph
    ? DOMParser.fromSchema(schema).parse(element, { topNode: paragraph }).content
    : Fragment.empty
}

export const PageTableCell = TableCell.extend({
  content: 'inline*',
  addAttributes: cellAttributes,
  parseHTML: () => [{ tag: 'td', getContent: runningText }],
})

export const PageTableHeader = TableHeader.extend({
  content: 'inline*',
  addAttributes: cellAttributes,
  parseHTML: () => [{ tag: 'th', getContent: runningText }],
})
