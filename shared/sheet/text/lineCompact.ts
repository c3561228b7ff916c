/** Lines that have a one-line form, to and from what the reader of that form says. */
import { readCompact, writeCompact } from '../../engine/parse/shorthand'
import type { CompactFields } from '../../engine/parse/shorthand'
import { canonicalText } from '../canonical'
import type { Criterion, Formula, Given, Line } from '../kinds'
import { lineKinds } from '../kinds'
import { readLine } from '../readLine'
import { mappingToLine } from './lineYaml'

export const compactKinds = ['given', 'formula', 'criterion'] as const
export type CompactKind = (typeof compactKinds)[number]

const own: Record<CompactKind, readonly string[]> = {
  given: ['symbol', 'value', 'unit', 'tolerance', 'note', 'source'],
  formula: ['symbol', 'expression', 'unit', 'note', 'source'],
  criterion: ['symbol', 'demand', 'relation', 'limit', 'upper', 'title', 'source'],
}

/** Fields that go into the `{key=value …}` tail, by dotted key; undefined where one has no such form. */
const tailFields = (line: Given | Formula | Criterion): Record<string, string> | undefined => {
  const fields: Record<string, string> = {}
  const defaults = lineKinds[line.kind].parse({ id: 'x', kind: line.kind }) as Record<string, unknown>
  for (const [field, value] of Object.entries(line) as [string, unknown][]) {
    if (field === 'id' || field === 'kind' || value === undefined || own[line.kind].includes(field)) continue
    if (value === defaults[field]) continue
    if (typeof value === 'object' && value !== null) {
      if (Array.isArray(value) || field === 'contested') return undefined
      for (const [member, text] of Object.entries(value as Record<string, string>))
        fields[`${field}.${member}`] = text
    } else fields[field] = String(value)
  }
  return fields
}

const tail = (source: string, note: string) => ({ ...(note ? { note } : {}), ...(source ? { source } : {}) })

const toCompact = (line: Given | Formula | Criterion, withId: boolean): CompactFields | undefined => {
  const fields = tailFields(line)
  if (!fields) return undefined
  const id = withId ? { id: line.id } : {}
  switch (line.kind) {
    case 'given': {
      const { symbol, value, unit, tolerance } = line
      return {
        kind: 'given',
        symbol,
        value,
        unit,
        ...(tolerance ? { tolerance } : {}),
        ...tail(line.source, line.note),
        ...id,
        fields,
      }
    }
    case 'formula': {
      const { symbol, expression, unit } = line
      return { kind: 'formula', symbol, expression, unit, ...tail(line.source, line.note), ...id, fields }
    }
    case 'criterion': {
      const { symbol, demand, relation, limit, upper } = line
      if (symbol === '') return undefined
      return {
        kind: 'criterion',
        symbol,
        demand,
        relation,
        limit,
        ...(upper === undefined ? {} : { upper }),
        ...tail(line.source, line.title),
        ...id,
        fields,
      }
    }
  }
}

/** The line that compact fields say, not yet validated; `unknown` are keys that its kind does not have. */
export const fromCompact = (compact: CompactFields, id: string) => {
  const { kind, fields, note, source, id: _id, ...authored } = compact
  const mapping: Record<string, unknown> = { ...authored }
  // Whoever reads the text gives a criterion its number.
  if (mapping.symbol === '') delete mapping.symbol
  if (note !== undefined) mapping[kind === 'criterion' ? 'title' : 'note'] = note
  if (source !== undefined) mapping.source = source
  for (const [key, text] of Object.entries(fields)) {
    const [record, member] = key.split('.', 2)
    if (record === undefined || member === undefined) mapping[key] = text
    else mapping[record] = { ...(mapping[record] as object | undefined), [member]: text }
  }
  return mappingToLine(kind, id, mapping)
}

/** The context of a block: its info word says the kind, and units are units. */
export const compactContext = (kind: CompactKind) => ({ isDefined: () => false, block: kind })

/**
 * The one-line form, only where reading it gives exactly the same line again; everything else is
 * written as YAML.
 */
export const writeCompactLine = (line: Line, withId: boolean): string | undefined => {
  if (line.kind !== 'given' && line.kind !== 'formula' && line.kind !== 'criterion') return undefined
  const compact = toCompact(line, withId)
  const text = compact && writeCompact(compact)
  if (text === undefined || text !== text.trim() || text === '' || text.includes('\n')) return undefined
  const read = readCompact(text, compactContext(line.kind))
  if (read.reading !== 'line' || read.line.id !== compact?.id) return undefined
  const again = readLine(fromCompact(read.line, line.id).line).line
  return again && canonicalText(again) === canonicalText(line) ? text : undefined
}
