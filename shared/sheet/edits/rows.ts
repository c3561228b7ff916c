/** Edits of rows: segments, load cases, data. A table is named as in paths: `rows`, `inputs.segments`. */
import * as Y from 'yjs'
import { cellKeyOf, writeRow } from '../documentFields'
import type { Row } from '../documentFields'
import { setCellAt } from './fields'
import { asOneStep, fieldsOf, ownEdit } from './transaction'

export type TableName = 'rows' | `inputs.${string}`

const rowsOf = (map: Y.Map<unknown> | undefined, table: TableName): Y.Array<unknown> | undefined => {
  const rows = map?.get(table)
  return rows instanceof Y.Array ? rows : undefined
}

const nameOf = (row: unknown): string => {
  const name: unknown = row instanceof Y.Map ? row.get('name') : (row as Partial<Row> | null)?.name
  return typeof name === 'string' ? name : ''
}

const indexOfRow = (rows: Y.Array<unknown>, name: string): number =>
  rows.toArray().findIndex((row) => nameOf(row) === name)

const plainRow = (row: unknown): Row => {
  if (!(row instanceof Y.Map)) return structuredClone(row) as Row
  const cells: Record<string, string> = {}
  const title: unknown = row.get('title')
  for (const [key, value] of row.entries()) {
    if (key.startsWith(cellKeyOf('')) && typeof value === 'string')
      cells[key.slice(cellKeyOf('').length)] = value
  }
  return { name: nameOf(row), ...(typeof title === 'string' ? { title } : {}), cells }
}

/**
 * The next number above any that a row of this table was ever named by: a removed row's name is never
 * given again, so that `S1.tau_2` keeps its meaning.
 */
const nextRowName = (map: Y.Map<unknown>, table: TableName, rows: Y.Array<unknown>): string => {
  const made = map.get(`made.${table}`)
  let highest = typeof made === 'number' ? made : 0
  for (const row of rows.toArray()) {
    const name = nameOf(row)
    if (/^\d{1,9}$/.test(name)) highest = Math.max(highest, Number(name))
  }
  return String(highest + 1)
}

/** Adds a row, at the end unless told otherwise; answers its name. */
export const addRow = (
  doc: Y.Doc,
  lineId: string,
  table: TableName,
  row: { name?: string; title?: string; cells?: Record<string, string> } = {},
  at?: number,
  origin: unknown = ownEdit,
): string | undefined => {
  const map = fieldsOf(doc, lineId)
  if (!map) return undefined
  return asOneStep(doc, origin, () => {
    let rows = rowsOf(map, table)
    if (!rows) {
      rows = new Y.Array<unknown>()
      map.set(table, rows)
    }
    const wanted = row.name !== undefined && indexOfRow(rows, row.name) < 0 ? row.name : undefined
    const name = wanted ?? nextRowName(map, table, rows)
    if (/^\d{1,9}$/.test(name)) {
      const made = map.get(`made.${table}`)
      map.set(`made.${table}`, Math.max(typeof made === 'number' ? made : 0, Number(name)))
    }
    const cells = row.cells ?? {}
    const made =
      map.get('kind') === 'table' ? { name, cells: { ...cells } } : writeRow({ ...row, name, cells })
    rows.insert(Math.min(at ?? rows.length, rows.length), [made])
    return name
  })
}

export const removeRow = (
  doc: Y.Doc,
  lineId: string,
  table: TableName,
  name: string,
  origin: unknown = ownEdit,
): void => {
  const map = fieldsOf(doc, lineId)
  const rows = rowsOf(map, table)
  const at = rows ? indexOfRow(rows, name) : -1
  if (!map || !rows || at < 0) return
  asOneStep(doc, origin, () => {
    // Noted before it goes: rows of a pasted table may have numbers that nobody counted yet.
    map.set(`made.${table}`, Number(nextRowName(map, table, rows)) - 1)
    rows.delete(at)
  })
}

/** Moves a row to an index among the others; its name and cells stay. */
export const moveRow = (
  doc: Y.Doc,
  lineId: string,
  table: TableName,
  name: string,
  to: number,
  origin: unknown = ownEdit,
): void => {
  const rows = rowsOf(fieldsOf(doc, lineId), table)
  const from = rows ? indexOfRow(rows, name) : -1
  if (!rows || from < 0 || from === to) return
  asOneStep(doc, origin, () => {
    const row: unknown = rows.get(from)
    const copy = row instanceof Y.Map ? writeRow(plainRow(row)) : plainRow(row)
    rows.delete(from)
    rows.insert(Math.min(Math.max(to, 0), rows.length), [copy])
  })
}

/** Sets one cell (or `title`) by the row's name; `null` removes it. */
export const setCell = (
  doc: Y.Doc,
  lineId: string,
  table: TableName,
  name: string,
  column: string,
  text: string | null,
  origin: unknown = ownEdit,
): void => {
  const rows = rowsOf(fieldsOf(doc, lineId), table)
  const at = rows ? indexOfRow(rows, name) : -1
  if (rows && at >= 0) asOneStep(doc, origin, () => setCellAt(rows, at, column, text))
}

/** Renames a column of cells in every row, or removes it where `to` is null. */
export const renameColumn = (
  doc: Y.Doc,
  lineId: string,
  table: TableName,
  column: string,
  to: string | null,
  origin: unknown = ownEdit,
): void => {
  const rows = rowsOf(fieldsOf(doc, lineId), table)
  if (!rows || column === to) return
  asOneStep(doc, origin, () => {
    rows.toArray().forEach((row, index) => {
      const text = plainRow(row).cells[column]
      if (text === undefined) return
      setCellAt(rows, index, column, null)
      if (to !== null) setCellAt(rows, index, to, text)
    })
  })
}
