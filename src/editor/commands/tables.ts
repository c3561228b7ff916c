/**
 * What can be done with a table in the text. Rows and cells are counted as they stand: two people's edits
 * may have left rows of different lengths, and the usual table commands take every table for a rectangle.
 */
import type { Node as PageNode, NodeType, Schema } from '@tiptap/pm/model'
import { Selection, type Command, type EditorState, type Transaction } from '@tiptap/pm/state'

/** The table at the caret, and the cell in it. */
export interface TablePlace {
  table: PageNode
  /** Position of the table in the page. */
  at: number
  row: number
  column: number
}

export const tablePlace = ({ selection: { $head } }: EditorState): TablePlace | undefined => {
  for (let depth = $head.depth; depth > 0; depth -= 1) {
    if ($head.node(depth).type.name !== 'table') continue
    const column = $head.depth > depth ? $head.index(depth + 1) : 0
    return { table: $head.node(depth), at: $head.before(depth), row: $head.index(depth), column }
  }
  return undefined
}

const typesOf = (schema: Schema): Record<'table' | 'row' | 'cell' | 'header' | 'paragraph', NodeType> => {
  const { table, tableRow: row, tableCell: cell, tableHeader: header, paragraph } = schema.nodes
  if (!table || !row || !cell || !header || !paragraph)
    throw new Error('tables: the page schema has no tables')
  return { table, row, cell, header, paragraph }
}

const widest = (table: PageNode): number => Math.max(1, ...table.children.map(({ childCount }) => childCount))

const newRow = (schema: Schema, length: number, isHeader: boolean): PageNode => {
  const { row, cell, header } = typesOf(schema)
  return row.create(
    null,
    Array.from({ length }, () => (isHeader ? header : cell).create()),
  )
}

/** Where each row of a table begins. */
const rowStarts = (table: PageNode, at: number): number[] => {
  let next = at + 1
  return table.children.map(({ nodeSize }) => (next += nodeSize) - nodeSize)
}

/** Where the cell before which a column stands begins; the end of a row that is too short. */
const cellStart = (row: PageNode, start: number, column: number): number =>
  row.children.slice(0, column).reduce((at, { nodeSize }) => at + nodeSize, start + 1)

/** Puts the caret into a cell; a row that is too short gives its last one. */
const withCaretIn = (transaction: Transaction, at: number, row: number, column: number): Transaction => {
  const table = transaction.doc.nodeAt(at)
  if (table?.type.name !== 'table') return transaction
  const place = Math.max(0, Math.min(row, table.childCount - 1))
  const cells = table.maybeChild(place)
  const start = rowStarts(table, at)[place]
  if (!cells || start === undefined) return transaction
  const cell = cellStart(cells, start, Math.max(0, Math.min(column, cells.childCount - 1)))
  const $inside = transaction.doc.resolve(Math.min(cell + 1, transaction.doc.content.size))
  return transaction.setSelection(Selection.near($inside)).scrollIntoView()
}

/** A table of three columns under a row of heads, after the block at the caret; an empty one gives way. */
export const insertTable: Command = (state, dispatch) => {
  const { schema, selection, tr } = state
  const { table } = typesOf(schema)
  if (tablePlace(state)) return false
  const { $to } = selection
  const isEmpty = $to.depth === 1 && $to.parent.type.name === 'paragraph' && $to.parent.content.size === 0
  const from = $to.depth > 0 && isEmpty ? $to.before(1) : $to.depth > 0 ? $to.after(1) : $to.pos
  const made = table.create(null, [
    newRow(schema, 3, true),
    newRow(schema, 3, false),
    newRow(schema, 3, false),
  ])
  if (dispatch) {
    tr.replaceWith(from, isEmpty ? $to.after(1) : from, made)
    dispatch(withCaretIn(tr, from, 0, 0))
  }
  return true
}

export const removeTable: Command = (state, dispatch) => {
  const place = tablePlace(state)
  if (!place) return false
  const { tr, schema } = state
  tr.replaceWith(place.at, place.at + place.table.nodeSize, typesOf(schema).paragraph.create())
  dispatch?.(tr.setSelection(Selection.near(tr.doc.resolve(place.at + 1))).scrollIntoView())
  return true
}

/** A new row above or below the caret's. Below a row of heads it is an ordinary one. */
export const addRow =
  (side: 'above' | 'below'): Command =>
  (state, dispatch) => {
    const place = tablePlace(state)
    if (!place) return false
    const { table, at, row } = place
    const index = side === 'above' ? row : row + 1
    const start = rowStarts(table, at)[index] ?? at + table.nodeSize - 1
    const { tr, schema } = state
    tr.insert(start, newRow(schema, widest(table), false))
    dispatch?.(withCaretIn(tr, at, index, place.column))
    return true
  }

export const addColumn =
  (side: 'before' | 'after'): Command =>
  (state, dispatch) => {
    const place = tablePlace(state)
    if (!place) return false
    const { table, at, row, column } = place
    const { cell, header } = typesOf(state.schema)
    const index = side === 'before' ? column : column + 1
    const starts = rowStarts(table, at)
    const { tr } = state
    // From the end, so that the places before stay where they are.
    for (const [number, cells] of [...table.children.entries()].reverse()) {
      const isHeader = cells.firstChild?.type === header && cells.lastChild?.type === header
      tr.insert(cellStart(cells, starts[number] ?? 0, index), (isHeader ? header : cell).create())
    }
    dispatch?.(withCaretIn(tr, at, row, index))
    return true
  }

export const removeRow: Command = (state, dispatch) => {
  const place = tablePlace(state)
  if (!place) return false
  const { table, at, row, column } = place
  if (table.childCount <= 1) return removeTable(state, dispatch)
  const start = rowStarts(table, at)[row]
  if (start === undefined) return false
  const { tr } = state
  tr.delete(start, start + table.child(row).nodeSize)
  dispatch?.(withCaretIn(tr, at, row, column))
  return true
}

/** Takes the caret's column away, in every row that reaches so far. */
export const removeColumn: Command = (state, dispatch) => {
  const place = tablePlace(state)
  if (!place) return false
  const { table, at, row, column } = place
  if (widest(table) <= 1) return removeTable(state, dispatch)
  const starts = rowStarts(table, at)
  const { tr } = state
  for (const [number, cells] of [...table.children.entries()].reverse()) {
    const cell = cells.maybeChild(column)
    if (!cell) continue
    const start = cellStart(cells, starts[number] ?? 0, column)
    tr.delete(start, start + cell.nodeSize)
  }
  dispatch?.(withCaretIn(tr, at, row, column))
  return true
}

/** Whether the first row of a table is a row of heads. */
export const hasHeaderRow = (table: PageNode): boolean => {
  const cells = table.firstChild?.children ?? []
  return cells.length > 0 && cells.every(({ type }) => type.name === 'tableHeader')
}

/** Makes the first row one of heads, or an ordinary one. */
export const toggleHeaderRow: Command = (state, dispatch) => {
  const place = tablePlace(state)
  const first = place?.table.firstChild
  if (!place || !first) return false
  const { cell, header } = typesOf(state.schema)
  const type = hasHeaderRow(place.table) ? cell : header
  const { tr } = state
  let at = place.at + 2
  for (const each of first.children) {
    if (each.type !== type) tr.setNodeMarkup(at, type)
    at += each.nodeSize
  }
  dispatch?.(tr)
  return true
}

/**
 * Enter goes to the cell below; in the last row it makes another one, and in a last row with nothing in it
 * it leaves the table, as it leaves a list.
 */
export const nextRow: Command = (state, dispatch) => {
  const place = tablePlace(state)
  if (!place) return false
  const { table, at, row, column } = place
  if (row < table.childCount - 1) {
    dispatch?.(withCaretIn(state.tr, at, row + 1, column))
    return true
  }
  if (table.lastChild?.textContent !== '' || table.childCount === 1) return addRow('below')(state, dispatch)
  const { tr, schema } = state
  const start = rowStarts(table, at)[row]
  if (start === undefined) return false
  tr.delete(start, start + table.child(row).nodeSize)
  const end = tr.mapping.map(at + table.nodeSize)
  const follows = tr.doc.nodeAt(end)
  if (follows?.type.name !== 'paragraph') tr.insert(end, typesOf(schema).paragraph.create())
  dispatch?.(tr.setSelection(Selection.near(tr.doc.resolve(end + 1))).scrollIntoView())
  return true
}
