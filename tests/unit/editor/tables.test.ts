import { getSchema } from '@tiptap/core'
import type { Node as PageNode } from '@tiptap/pm/model'
import { EditorState, TextSelection, type Command } from '@tiptap/pm/state'
import { describe, expect, test } from 'vitest'
import { pageExtensions } from '@shared/sheet/page'
import {
  addColumn,
  addRow,
  hasHeaderRow,
  insertTable,
  nextRow,
  removeColumn,
  removeRow,
  removeTable,
  toggleHeaderRow,
} from '@/editor/commands/tables'

const schema = getSchema(pageExtensions)

/** A page with one table; a cell in capitals is a head, `|` in a cell is the caret. */
const pageWith = (...rows: string[][]): EditorState => {
  let caret = 0
  const doc = schema.nodeFromJSON({
    type: 'doc',
    content: [
      {
        type: 'table',
        content: rows.map((cells) => ({
          type: 'tableRow',
          content: cells.map((cell) => {
            const text = cell.replace('|', '')
            const isHead = text !== '' && text === text.toUpperCase()
            return {
              type: isHead ? 'tableHeader' : 'tableCell',
              content: text ? [{ type: 'text', text }] : [],
            }
          }),
        })),
      },
    ],
  })
  const [row = 0, column = 0] = rows.flatMap((cells, at) => {
    const index = cells.findIndex((cell) => cell.includes('|'))
    return index < 0 ? [] : [at, index]
  })
  let seen = -1
  const wanted = rows.slice(0, row).reduce((sum, cells) => sum + cells.length, 0) + column
  doc.descendants((node, position) => {
    if (!node.type.name.startsWith('tableCell') && node.type.name !== 'tableHeader') return true
    seen += 1
    if (seen === wanted) caret = position + 1
    return false
  })
  return EditorState.create({ doc, selection: TextSelection.create(doc, caret) })
}

const after = (state: EditorState, command: Command): EditorState => {
  let next = state
  expect(command(state, (transaction) => (next = state.apply(transaction)))).toBe(true)
  next.doc.check()
  return next
}
const cellsOf = (table: PageNode | null | undefined): string[][] =>
  (table?.children ?? []).map((row) => row.children.map(({ textContent }) => textContent))
const table = (state: EditorState) => state.doc.firstChild
const caretRow = (state: EditorState) => state.selection.$head.index(1)

describe('tables in the text', () => {
  test('a new table has three columns under a row of heads, and the caret in its first cell', () => {
    const empty = schema.nodeFromJSON({ type: 'doc', content: [{ type: 'paragraph' }] })
    const state = after(
      EditorState.create({ doc: empty, selection: TextSelection.create(empty, 1) }),
      insertTable,
    )
    expect(cellsOf(table(state))).toEqual([
      ['', '', ''],
      ['', '', ''],
      ['', '', ''],
    ])
    expect(state.doc.childCount).toBe(1)
    expect(hasHeaderRow(state.doc.child(0))).toBe(true)
    expect(state.selection.$head.parent.type.name).toBe('tableHeader')
  })

  test('rows and columns are added beside the caret and taken away under it', () => {
    const state = pageWith(['A', 'B'], ['1|a', '2b'])
    expect(cellsOf(table(after(state, addRow('above'))))).toEqual([
      ['A', 'B'],
      ['', ''],
      ['1a', '2b'],
    ])
    expect(cellsOf(table(after(state, addColumn('after'))))).toEqual([
      ['A', '', 'B'],
      ['1a', '', '2b'],
    ])
    expect(hasHeaderRow(after(state, addColumn('after')).doc.child(0))).toBe(true)
    expect(cellsOf(table(after(state, removeColumn)))).toEqual([['B'], ['2b']])
    expect(cellsOf(table(after(state, removeRow)))).toEqual([['A', 'B']])
  })

  test('rows of different lengths, as two people leave them, take every act', () => {
    const ragged = pageWith(['A', 'B', 'C'], ['a'], ['d', 'e|', 'f', 'g'])
    expect(cellsOf(table(after(ragged, addColumn('after'))))).toEqual([
      ['A', 'B', '', 'C'],
      ['a', ''],
      ['d', 'e', '', 'f', 'g'],
    ])
    expect(cellsOf(table(after(ragged, removeColumn)))).toEqual([['A', 'C'], ['a'], ['d', 'f', 'g']])
    expect(cellsOf(table(after(ragged, addRow('below'))))[3]).toEqual(['', '', '', ''])
    expect(cellsOf(table(after(ragged, removeRow)))).toEqual([['A', 'B', 'C'], ['a']])
    expect(hasHeaderRow(after(ragged, toggleHeaderRow).doc.child(0))).toBe(false)
  })

  test('the heads become ordinary cells and heads again, with their words', () => {
    const plain = after(pageWith(['A|', 'B'], ['a', 'b']), toggleHeaderRow)
    expect(hasHeaderRow(plain.doc.child(0))).toBe(false)
    const again = after(plain, toggleHeaderRow)
    expect(hasHeaderRow(again.doc.child(0))).toBe(true)
    expect(cellsOf(table(again))).toEqual([
      ['A', 'B'],
      ['a', 'b'],
    ])
  })

  test('Enter goes down, makes a row at the end, and leaves by an empty last row', () => {
    const down = after(pageWith(['a|'], ['b']), nextRow)
    expect(caretRow(down)).toBe(1)
    const grown = after(down, nextRow)
    expect(cellsOf(table(grown))).toEqual([['a'], ['b'], ['']])
    expect(caretRow(grown)).toBe(2)
    const left = after(grown, nextRow)
    expect(cellsOf(table(left))).toEqual([['a'], ['b']])
    expect(left.selection.$head.parent.type.name).toBe('paragraph')
  })

  test('with its last row, or by its own command, the table goes and leaves a place to type', () => {
    for (const act of [removeRow, removeTable]) {
      const state = after(pageWith(['a|', 'b']), act)
      expect(state.doc.childCount).toBe(1)
      expect(state.selection.$head.parent.type.name).toBe('paragraph')
    }
  })
})
