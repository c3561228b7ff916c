/**
 * Versions of a sheet side by side, as plain text and JSON: which lines, front texts and sections of prose
 * differ. Compared by content, never by Yjs bytes.
 */
import * as Y from 'yjs'
import { frontTexts, penOfFront } from '@shared/protocol'

/** Field → JSON text. */
type Fields = Map<string, string>

const asJson = (value: unknown): string =>
  JSON.stringify(value instanceof Y.AbstractType ? value.toJSON() : value) ?? 'null'

/** Lines by id, and front texts by their pens' keys. */
export const fieldsByKey = (doc: Y.Doc): Map<string, Fields> => {
  const found = new Map<string, Fields>()
  for (const [id, line] of doc.getMap('lines').entries()) {
    const fields: Fields = new Map()
    if (line instanceof Y.Map) for (const [field, value] of line.entries()) fields.set(field, asJson(value))
    found.set(id, fields)
  }
  const front = doc.getMap('front')
  for (const field of frontTexts)
    if (front.has(field)) found.set(penOfFront(field), new Map([[field, asJson(front.get(field))]]))
  return found
}

const isSame = (one: Fields | undefined, other: Fields | undefined): boolean => {
  if (one === undefined || other === undefined) return one === other
  return one.size === other.size && [...one].every(([field, value]) => other.get(field) === value)
}

/** Keys of lines and front texts that differ between two versions. */
export const differingKeys = (before: Y.Doc, after: Y.Doc): Set<string> => {
  const one = fieldsByKey(before)
  const other = fieldsByKey(after)
  return new Set([...one.keys(), ...other.keys()].filter((key) => !isSame(one.get(key), other.get(key))))
}

/** Keys that two versions changed since their common base, and not to the same content. */
export const contestedKeys = (base: Y.Doc, mine: Y.Doc, theirs: Y.Doc): Set<string> => {
  const theirsChanged = differingKeys(base, theirs)
  const apart = differingKeys(mine, theirs)
  return new Set([...differingKeys(base, mine)].filter((key) => theirsChanged.has(key) && apart.has(key)))
}

export interface DifferingField {
  key: string
  field: string
  before: unknown
  mine: unknown
}

const parsed = (text: string | undefined): unknown =>
  text === undefined ? undefined : (JSON.parse(text) as unknown)

/** The fields of these keys that differ, with both values. */
export const differingFields = (before: Y.Doc, mine: Y.Doc, keys: Iterable<string>): DifferingField[] => {
  const one = fieldsByKey(before)
  const other = fieldsByKey(mine)
  const found: DifferingField[] = []
  for (const key of keys) {
    const was = one.get(key) ?? new Map<string, string>()
    const is = other.get(key) ?? new Map<string, string>()
    for (const field of new Set([...was.keys(), ...is.keys()]))
      if (was.get(field) !== is.get(field))
        found.push({ key, field, before: parsed(was.get(field)), mine: parsed(is.get(field)) })
  }
  return found
}

const plainText = (node: unknown): string => {
  if (node instanceof Y.XmlText)
    return node
      .toDelta()
      .map((part: { insert: unknown }) => (typeof part.insert === 'string' ? part.insert : ''))
      .join('')
  if (node instanceof Y.XmlElement)
    return node
      .toArray()
      .map(plainText)
      .join(node.length > 1 ? '\n' : '')
  return ''
}

/** Text under each heading, by the heading's id; `opening` before the first. */
const sections = (doc: Y.Doc): Map<string, string> => {
  const found = new Map<string, string>()
  let section = 'opening'
  for (const node of doc.getXmlFragment('page').toArray()) {
    if (node instanceof Y.XmlElement && node.nodeName === 'heading')
      section = node.getAttribute('id') ?? section
    if (node instanceof Y.XmlElement && node.nodeName === 'line') continue
    const text = plainText(node)
    if (text !== '') found.set(section, [found.get(section), text].filter(Boolean).join('\n'))
  }
  return found
}

/** Sections of prose that differ, as text. */
export const differingProse = (before: Y.Doc, mine: Y.Doc): DifferingField[] => {
  const one = sections(before)
  const other = sections(mine)
  return [...new Set([...one.keys(), ...other.keys()])]
    .filter((section) => one.get(section) !== other.get(section))
    .map((section) => ({ key: section, field: 'text', before: one.get(section), mine: other.get(section) }))
}
