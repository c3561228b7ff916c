/** Note, source and further fields after the statement of a compact line: ` -- note [source] {key=value}`. */

export interface CompactTail {
  /** After ` -- `; the title of a criterion. */
  note?: string
  /** In `[…]`. */
  source?: string
  /** `#id` in `{…}`. */
  id?: string
  /** `key=value` in `{…}`, by key. */
  fields: Record<string, string>
}

const unescaped = (text: string): string => text.replace(/\\(.)/gsu, '$1')

/** Whether the character at `at` has an odd number of backslashes before it. */
const isEscaped = (text: string, at: number): boolean => {
  let slashes = 0
  while (text[at - 1 - slashes] === '\\') slashes++
  return slashes % 2 === 1
}

/** The bracket that ends `text`: its inside and what stands before it. */
const finalBracket = (
  text: string,
  open: string,
  close: string,
): { before: string; inside: string } | undefined => {
  const last = text.length - 1
  if (text[last] !== close || isEscaped(text, last)) return undefined
  for (let at = last - 1; at >= 0; at--) {
    if (isEscaped(text, at)) continue
    if (text[at] === close) return undefined
    if (text[at] === open) return { before: text.slice(0, at).trimEnd(), inside: text.slice(at + 1, last) }
  }
  return undefined
}

const fieldName = /^[A-Za-z][A-Za-z0-9.]*$/

/** A piece between spaces: quoted parts and escaped characters keep theirs. */
const piece = /(?:"(?:\\.|[^"\\])*"|\\.|[^\s\\"])+/gsu

/** `two\ words` or `"two words"`. */
const fieldValue = (text: string): string =>
  unescaped(/^"(?:\\.|[^"\\])*"$/su.test(text) ? text.slice(1, -1) : text)

/** `#id key=value key="two words"`; undefined where it is something else. */
const readFields = (inside: string): { id?: string; fields: Record<string, string> } | undefined => {
  const fields = new Map<string, string>()
  let id: string | undefined
  // What no piece holds is a quotation mark without its partner.
  if (inside.replace(piece, '').trim() !== '') return undefined
  for (const [place, part] of (inside.match(piece) ?? []).entries()) {
    if (place === 0 && part.startsWith('#')) {
      id = unescaped(part.slice(1))
      continue
    }
    const equals = part.indexOf('=')
    const name = part.slice(0, Math.max(equals, 0))
    if (!fieldName.test(name) || fields.has(name)) return undefined
    fields.set(name, fieldValue(part.slice(equals + 1)))
  }
  return { fields: Object.fromEntries(fields), ...(id === undefined ? {} : { id }) }
}

/** The first ` -- ` that no backslash guards. */
const noteStart = (text: string): number => {
  for (let at = text.indexOf(' --'); at >= 0; at = text.indexOf(' --', at + 1)) {
    const next = text[at + 3]
    if (next === undefined || next === ' ') return at
  }
  return -1
}

/** Splits a compact line; undefined where its braces hold no fields. */
export const splitTail = (text: string): { statement: string; tail: CompactTail } | undefined => {
  const start = noteStart(text)
  let rest = (start < 0 ? text : text.slice(start + 3)).trimEnd()
  const tail: CompactTail = { fields: {} }
  const braces = finalBracket(rest, '{', '}')
  if (braces) {
    const read = readFields(braces.inside)
    if (read === undefined) return undefined
    tail.fields = read.fields
    if (read.id !== undefined) tail.id = read.id
    rest = braces.before
  }
  const source = finalBracket(rest, '[', ']')
  if (source) {
    tail.source = unescaped(source.inside)
    rest = source.before
  }
  if (start < 0) return { statement: rest.trim(), tail }
  const note = unescaped(rest.trim())
  if (note !== '') tail.note = note
  return { statement: text.slice(0, start).trim(), tail }
}

const escaped = (text: string): string => text.replace(/[\\[\]{}]/g, '\\$&')

const writtenValue = (text: string): string =>
  /[\s"]/u.test(text) ? `"${escaped(text).replaceAll('"', '\\"')}"` : escaped(text)

export const writeTail = ({ note, source, id, fields }: CompactTail): string => {
  const pieces = Object.entries(fields).map(([name, value]) => `${name}=${writtenValue(value)}`)
  if (id !== undefined) pieces.unshift(`#${id}`)
  return [
    note === undefined ? '' : ` -- ${escaped(note)}`,
    source === undefined ? '' : ` [${escaped(source)}]`,
    pieces.length === 0 ? '' : ` {${pieces.join(' ')}}`,
  ].join('')
}
