/**
 * A line's authored fields as one Y.Map, flat: one key each.
 * - `symbol`, `value`, `demand` …: strings, numbers, booleans as they are;
 * - the members of small records: `tolerance.plus`, `toConfirm.owner`, `range.from`, `between.0`;
 * - inputs of an analysis: `inputs.<name>`, a string, or rows;
 * - rows (`rows`, `inputs.<table>`): a Y.Array with a Y.Map each, of `name`, `title` and `cell.<column>`;
 *   rows of a data table are plain objects instead, since there may be very many of them and the line's
 *   pen keeps two people from writing in one;
 * - `made.rows`, `made.inputs.<table>`: the highest number a row was ever named by;
 * - lists of texts (`outputs`, `choices`), `columns` and `contested`: plain JSON.
 */
import * as Y from 'yjs'
import type { Line } from './kinds'

export interface Row {
  name: string
  title?: string
  cells: Record<string, string>
}

/** Records that are stored flat, and the members that an unfinished one is completed with. */
export const flatRecords: Record<string, readonly string[]> = {
  tolerance: [],
  toConfirm: ['owner', 'due'],
  range: [],
  register: ['material', 'property', 'version'],
  origin: ['template', 'edition', 'line'],
}

const cellKey = 'cell.'

export const writeRow = (row: Row): Y.Map<string> => {
  const map = new Y.Map<string>()
  map.set('name', row.name)
  if (row.title !== undefined) map.set('title', row.title)
  for (const [column, text] of Object.entries(row.cells)) map.set(cellKey + column, text)
  return map
}

export const cellKeyOf = (column: string): string => cellKey + column

const highestNumber = (rows: readonly Row[]): number =>
  rows.reduce((highest, { name }) => (/^\d{1,9}$/.test(name) ? Math.max(highest, Number(name)) : highest), 0)

const writeRows = (map: Y.Map<unknown>, key: string, rows: readonly Row[], plain: boolean): void => {
  const array = new Y.Array<unknown>()
  array.push(plain ? rows.map((row) => ({ name: row.name, cells: { ...row.cells } })) : rows.map(writeRow))
  map.set(key, array)
  const highest = highestNumber(rows)
  if (highest > 0) map.set(`made.${key}`, highest)
}

/** Writes one field with everything below it; whatever was there under the same name goes. */
export const writeField = (map: Y.Map<unknown>, kind: string, field: string, value: unknown): void => {
  if (value === undefined || value === null) return
  if (field in flatRecords) {
    for (const [member, text] of Object.entries(value as Record<string, unknown>)) {
      if (text !== undefined) map.set(`${field}.${member}`, text)
    }
  } else if (field === 'between') {
    ;(value as string[]).forEach((text, index) => map.set(`between.${index}`, text))
  } else if (field === 'inputs') {
    for (const [name, input] of Object.entries(value as Record<string, unknown>)) {
      if (Array.isArray(input)) writeRows(map, `inputs.${name}`, input as Row[], false)
      else map.set(`inputs.${name}`, input)
    }
  } else if (field === 'rows') {
    writeRows(map, 'rows', value as Row[], kind === 'table')
  } else {
    map.set(field, structuredClone(value))
  }
}

/** The map of a new line; the id is the key it is stored under and is not repeated in it. */
export const writeFields = (line: Line): Y.Map<unknown> => {
  const map = new Y.Map<unknown>()
  for (const [field, value] of Object.entries(line)) {
    if (field !== 'id') writeField(map, line.kind, field, value)
  }
  return map
}

const put = (target: Record<string, unknown>, key: string, value: unknown): void => {
  // A field of this name would otherwise change the object's prototype.
  Object.defineProperty(target, key, { value, enumerable: true, writable: true, configurable: true })
}

const readRow = (row: unknown): unknown => {
  if (!(row instanceof Y.Map)) return row
  const cells: Record<string, unknown> = {}
  const read: Record<string, unknown> = { cells }
  for (const [key, value] of row.entries()) {
    if (key.startsWith(cellKey)) put(cells, key.slice(cellKey.length), value)
    else put(read, key, value)
  }
  return read
}

const readValue = (value: unknown): unknown => {
  if (value instanceof Y.Array) return value.toArray().map(readRow)
  if (value instanceof Y.AbstractType) return value.toJSON()
  return value
}

const completed = (record: Record<string, unknown>, field: string): Record<string, unknown> => {
  const members =
    field === 'tolerance' ? ('fit' in record ? ['fit'] : ['plus', 'minus']) : (flatRecords[field] ?? [])
  for (const member of members) if (!(member in record)) record[member] = ''
  return record
}

/** The line that a map says, not yet validated: it may be rubbish. */
export const readFields = (id: string, map: Y.Map<unknown>): Record<string, unknown> => {
  const line: Record<string, unknown> = { id }
  const records: Record<string, Record<string, unknown>> = {}
  const between: unknown[] = ['', '']
  for (const [key, stored] of map.entries()) {
    const point = key.indexOf('.')
    const field = point < 0 ? key : key.slice(0, point)
    const member = key.slice(point + 1)
    if (field === 'made' || key === 'id') continue
    if (point < 0) put(line, key, readValue(stored))
    else if (field === 'between') between[Number(member)] = stored
    else if (field === 'inputs' || field in flatRecords)
      put((records[field] ??= {}), member, readValue(stored))
  }
  for (const [field, record] of Object.entries(records)) line[field] = completed(record, field)
  if (line.kind === 'sizing') line.between = between.slice(0, 2)
  return line
}
