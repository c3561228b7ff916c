import * as Y from 'yjs'
import { cellKeyOf, flatRecords, writeField } from '../documentFields'
import { writeSource } from '../documentFront'
import { documentParts } from '../document'
import type { Line } from '../kinds'
import type { Front, Source } from '../sheet'
import { asOneStep, fieldsOf, ownEdit } from './transaction'

const sameValue = (a: unknown, b: unknown): boolean => JSON.stringify(a) === JSON.stringify(b)

const set = (map: Y.Map<unknown>, key: string, value: unknown): void => {
  if (value === undefined || value === null) {
    if (map.has(key)) map.delete(key)
  } else if (!sameValue(map.get(key), value)) map.set(key, value)
}

const isWhole = (field: string): boolean =>
  field in flatRecords || ['between', 'inputs', 'rows'].includes(field)

const removeBelow = (map: Y.Map<unknown>, field: string): void => {
  for (const key of [...map.keys()]) if (key === field || key.startsWith(`${field}.`)) map.delete(key)
}

/** `rows.2.x`, `rows.2.cells.x`, `inputs.segments.2.length`: the list, the row's index and the cell. */
const rowPath = (
  map: Y.Map<unknown>,
  path: string,
): { rows: Y.Array<unknown>; index: number; key: string } | undefined => {
  const found = /^(rows|inputs\.[^.]+)\.(\d+)\.(?:cells\.)?(.+)$/.exec(path)
  const rows = found?.[1] === undefined ? undefined : map.get(found[1])
  if (!(rows instanceof Y.Array) || found?.[2] === undefined || found[3] === undefined) return undefined
  return { rows, index: Number(found[2]), key: found[3] }
}

/** Sets or removes one cell; a row of a data table is a plain object and is written anew. */
export const setCellAt = (rows: Y.Array<unknown>, index: number, key: string, value: string | null): void => {
  const row: unknown = index < rows.length ? rows.get(index) : undefined
  if (row instanceof Y.Map) {
    set(row, key === 'title' || key === 'name' ? key : cellKeyOf(key), value)
  } else if (typeof row === 'object' && row !== null) {
    const { name, cells } = row as { name: string; cells: Record<string, string> }
    const changed = { ...cells }
    if (value === null) Reflect.deleteProperty(changed, key)
    else changed[key] = value
    if (sameValue(changed, cells)) return
    rows.delete(index)
    rows.insert(index, [{ name, cells: changed }])
  }
}

const setIn = (map: Y.Map<unknown>, path: string, value: unknown): void => {
  const row = rowPath(map, path)
  if (row) return setCellAt(row.rows, row.index, row.key, typeof value === 'string' ? value : null)
  if (isWhole(path)) {
    removeBelow(map, path)
    return writeField(map, String(map.get('kind')), path, value)
  }
  if (/^inputs\.[^.]+$/.test(path) && Array.isArray(value)) {
    return writeField(map, String(map.get('kind')), 'inputs', { [path.slice('inputs.'.length)]: value })
  }
  // A tolerance is either plus and minus or a fit.
  if (path === 'tolerance.fit' && value)
    for (const side of ['plus', 'minus']) set(map, `tolerance.${side}`, null)
  if (/^tolerance\.(plus|minus)$/.test(path) && value) set(map, 'tolerance.fit', null)
  const entry = /^(.+)\.(\d+)$/.exec(path)
  const list = entry?.[1] === undefined ? undefined : map.get(entry[1])
  if (Array.isArray(list)) {
    const changed = [...(list as unknown[])]
    changed[Number(entry?.[2])] = value
    return set(map, entry?.[1] ?? path, changed)
  }
  set(map, path, value)
}

/**
 * Sets one authored field by its path, as problems name it: `symbol`, `tolerance.plus`, `tolerance`
 * (a whole record), `between.0`, `inputs.outer`, `inputs.segments.2.length`, `outputs` (a list) or
 * `outputs.1`. `null` removes it. Writes nothing where nothing changes or where the line is gone.
 */
export const setField = (
  doc: Y.Doc,
  lineId: string,
  path: string,
  value: unknown,
  origin: unknown = ownEdit,
): void => {
  const map = fieldsOf(doc, lineId)
  if (map && path !== 'kind' && path !== 'id') asOneStep(doc, origin, () => setIn(map, path, value))
}

/** Several fields of one line, by path, as one step: what a repair says. */
export const setFields = (
  doc: Y.Doc,
  lineId: string,
  fields: Record<string, unknown>,
  origin: unknown = ownEdit,
): void =>
  asOneStep(doc, origin, () => {
    for (const [path, value] of Object.entries(fields)) setField(doc, lineId, path, value, origin)
  })

/** Gives a line other fields, or another kind, under the same id. */
export const replaceLine = (doc: Y.Doc, line: Line, origin: unknown = ownEdit): void => {
  const map = fieldsOf(doc, line.id)
  if (!map) return
  asOneStep(doc, origin, () => {
    const fields = Object.keys(line).filter((field) => field !== 'id')
    for (const key of [...map.keys()]) {
      const field = key.split('.')[0] ?? key
      if (field !== 'made' && (!fields.includes(field) || isWhole(field))) map.delete(key)
    }
    for (const [field, value] of Object.entries(line)) {
      if (isWhole(field)) writeField(map, line.kind, field, value)
      else if (field !== 'id') set(map, field, value)
    }
  })
}

/** Sets one field of the front; sources are set by `setSource`. */
export const setFront = <Key extends Exclude<keyof Front, 'sources'>>(
  doc: Y.Doc,
  key: Key,
  value: Front[Key],
  origin: unknown = ownEdit,
): void => asOneStep(doc, origin, () => set(documentParts(doc).front, key, value))

/** Sets one entry of the list of sources, or removes it. */
export const setSource = (doc: Y.Doc, key: string, source: Source | null, origin: unknown = ownEdit): void =>
  asOneStep(doc, origin, () => writeSource(documentParts(doc).front, key, source))
