/**
 * A line as a YAML mapping: its authored fields under their own names. Rows are mappings of `name`
 * and cells; cells that are called like a row's own keys move below `cells`.
 */
import { lineKinds } from '../kinds'
import type { Line, LineKind } from '../kinds'

type Mapping = Record<string, unknown>

const isMapping = (value: unknown): value is Mapping =>
  typeof value === 'object' && value !== null && !Array.isArray(value)

const put = (target: Mapping, key: string, value: unknown): void => {
  Object.defineProperty(target, key, { value, enumerable: true, writable: true, configurable: true })
}

/** The type that a field has once its `optional` and `default` are taken off. */
const typeOf = (kind: LineKind, field: string): string | undefined => {
  let schema: unknown = (lineKinds[kind].shape as Mapping)[field]
  for (let depth = 0; depth < 5; depth++) {
    const { def } = (schema ?? {}) as { def?: { type?: string; innerType?: unknown } }
    if (def?.innerType === undefined) return def?.type
    schema = def.innerType
  }
  return undefined
}

const rowKeys = ['name', 'title', 'cells']

const writeRow = (row: { name: string; title?: string; cells: Record<string, string> }): Mapping => {
  const { cells, ...own } = row
  return Object.keys(cells).some((column) => rowKeys.includes(column))
    ? { ...own, cells }
    : { ...own, ...cells }
}

type Row = Parameters<typeof writeRow>[0]

/** The mapping of a line, without its kind (the block says it) and without what is empty by default. */
export const lineToMapping = (line: Line, withId: boolean): Mapping => {
  const mapping: Mapping = withId ? { id: line.id } : {}
  // Said where it is empty, for a criterion without a symbol would get the next number.
  if (line.kind === 'criterion' && line.symbol === '') mapping.symbol = ''
  const defaults = lineKinds[line.kind].parse({ id: 'x', kind: line.kind }) as Mapping
  for (const [field, value] of Object.entries(line) as [string, unknown][]) {
    if (field === 'id' || field === 'kind' || value === undefined) continue
    if (JSON.stringify(value) === JSON.stringify(defaults[field])) continue
    if (field === 'rows') mapping.rows = (value as Row[]).map(writeRow)
    else if (field === 'inputs') {
      const inputs: Mapping = {}
      for (const [name, input] of Object.entries(value as Mapping)) {
        put(inputs, name, Array.isArray(input) ? (input as Row[]).map(writeRow) : input)
      }
      mapping.inputs = inputs
    } else if (field === 'contested') {
      // Fields of an unknown shape: a text of their own, since here every scalar is a text.
      const contested = value as { fields: unknown }
      mapping.contested = { ...contested, fields: JSON.stringify(contested.fields) }
    } else mapping[field] = typeof value === 'number' || typeof value === 'boolean' ? String(value) : value
  }
  return mapping
}

/** Rows as the document has them; rows without a name get the next number. */
const readRows = (rows: readonly unknown[]): unknown[] => {
  const numbers = rows.map((row) =>
    Number(isMapping(row) && /^\d{1,9}$/.test(String(row.name)) ? row.name : 0),
  )
  let next = Math.max(0, ...numbers)
  return rows.map((row) => {
    if (!isMapping(row)) return row
    const { name = String(++next), title, cells, ...columns } = row
    return {
      name,
      ...(title === undefined ? {} : { title }),
      cells: isMapping(cells) ? cells : { ...columns, ...(cells === undefined ? {} : { cells }) },
    }
  })
}

const typed = (kind: LineKind, field: string, value: unknown): unknown => {
  const type = typeOf(kind, field)
  if (type === 'number' && typeof value === 'string' && /^\d{1,15}$/.test(value)) return Number(value)
  if (type === 'boolean' && (value === 'true' || value === 'false')) return value === 'true'
  if (field === 'rows' && Array.isArray(value)) return readRows(value)
  if (field === 'inputs' && isMapping(value)) {
    const inputs: Mapping = {}
    for (const [name, input] of Object.entries(value))
      put(inputs, name, Array.isArray(input) ? readRows(input) : input)
    return inputs
  }
  return value
}

const readContested = (value: unknown): unknown => {
  if (!isMapping(value) || typeof value.fields !== 'string') return value
  try {
    return { ...value, fields: JSON.parse(value.fields) as unknown }
  } catch {
    return value
  }
}

/** The line that a mapping says, not yet validated, with the names of fields that its kind does not have. */
export const mappingToLine = (
  kind: LineKind,
  id: string,
  mapping: Mapping,
): { line: Mapping; unknown: string[] } => {
  const line: Mapping = { id, kind }
  const unknown: string[] = []
  for (const [field, value] of Object.entries(mapping)) {
    if (field === 'id') continue
    if (field === 'kind' || !Object.hasOwn(lineKinds[kind].shape, field)) unknown.push(field)
    else line[field] = field === 'contested' ? readContested(value) : typed(kind, field, value)
  }
  return { line, unknown }
}
