/** Fenced blocks to lines. */
import type Token from 'markdown-it/lib/token.mjs'
import type { Problem } from '../../errors/problem'
import { readCompact } from '../../engine/parse/shorthand'
import type { CompactFields } from '../../engine/parse/shorthand'
import { lineKinds } from '../kinds'
import type { Line, LineKind } from '../kinds'
import { freeId, isId } from '../normalise'
import { readLine } from '../readLine'
import { repeatedRows } from '../readSheet'
import { compactContext, compactKinds, fromCompact } from './lineCompact'
import type { CompactKind } from './lineCompact'
import { mappingToLine } from './lineYaml'
import { readYaml } from './yaml'

/** A line that was read, or the text that could not be. */
export interface ReadLine {
  line?: Line
  /** One-based line of the text where it stands. */
  textLine?: number
  text?: string
}

/** What a block says, before ids are given. */
interface Draft {
  textLine: number
  id?: string
  symbol: string
  read(id: string): { line: Record<string, unknown>; unknown: string[] }
  text?: string
}

const infoOf = (token: Token): { kind: LineKind; yaml: boolean } | undefined => {
  if (token.type !== 'fence') return undefined
  const [word = '', form, ...rest] = token.info.trim().split(/\s+/)
  if (!Object.hasOwn(lineKinds, word) || rest.length > 0 || (form !== undefined && form !== 'yaml'))
    return undefined
  const kind = word as LineKind
  return { kind, yaml: form === 'yaml' || !isCompactKind(kind) }
}

const isCompactKind = (kind: LineKind): kind is CompactKind =>
  (compactKinds as readonly string[]).includes(kind)

export const isLineFence = (token: Token): boolean => infoOf(token) !== undefined

const isMapping = (value: unknown): value is Record<string, unknown> =>
  typeof value === 'object' && value !== null && !Array.isArray(value)

const textOf = (value: unknown): string => (typeof value === 'string' ? value : '')

type Draw = (draft: Draft) => void

const readYamlBlock = (
  kind: LineKind,
  content: string,
  at: number,
  problems: Problem[],
  draw: Draw,
): void => {
  const { value, lineOf, problems: found } = readYaml(content)
  const error = (message: string, line: number) =>
    problems.push({ code: 'syntax', severity: 'error', message, textLine: at + line + 1 })
  for (const { message, line } of found) error(message, line)
  const unread = () =>
    draw({ textLine: at + 1, symbol: '', read: () => ({ line: {}, unknown: [] }), text: content })
  if (found.length > 0) return unread()
  const entries = Array.isArray(value) ? value : isMapping(value) ? [value] : []
  if (entries.length === 0 && value !== null) {
    error(`A block “${kind} yaml” is a list: every line begins with a hyphen, its fields below it.`, 0)
    return unread()
  }
  entries.forEach((entry: unknown, index) => {
    if (!isMapping(entry))
      return error('Every entry of this list must have fields, “name: value”.', lineOf(index))
    const id = textOf(entry.id)
    draw({
      textLine: at + lineOf(index) + 1,
      ...(id ? { id } : {}),
      symbol: textOf(entry.symbol),
      read: (given) => mappingToLine(kind, given, entry),
    })
  })
}

const readCompactBlock = (
  kind: CompactKind,
  content: string,
  at: number,
  problems: Problem[],
  draw: Draw,
): void => {
  content.split('\n').forEach((text, index) => {
    if (text.trim() === '') return
    const textLine = at + index + 1
    const reading = readCompact(text, compactContext(kind))
    if (reading.reading === 'none') {
      problems.push({ code: 'syntax', severity: 'error', message: reading.message, textLine })
      return draw({ textLine, symbol: '', read: () => ({ line: {}, unknown: [] }), text })
    }
    const compact: CompactFields = reading.reading === 'line' ? reading.line : reading.given
    draw({
      textLine,
      ...(compact.id === undefined ? {} : { id: compact.id }),
      symbol: compact.symbol,
      read: (given) => fromCompact(compact, given),
    })
  })
}

/** Criteria without a symbol get the next number: `C1`, `C2` …. */
const criterionNumbers = (drafts: readonly Draft[]): (() => string) => {
  let highest = Math.max(0, ...drafts.map(({ symbol }) => Number(/^C(\d{1,9})$/.exec(symbol)?.[1] ?? 0)))
  return () => `C${++highest}`
}

/**
 * Reads the lines of all fenced blocks. Ids that are written stay; other lines get their symbol as
 * id, so that the same text always has the same ids and an inserted line changes no other's.
 */
export const readLines = (
  fences: readonly Token[],
  firstLine: number,
  problems: Problem[],
): Map<Token, ReadLine[]> => {
  const drafts: (Draft & { fence: Token })[] = []
  for (const fence of fences) {
    const info = infoOf(fence)
    // The first line of the content is one below the fence.
    const at = firstLine + (fence.map?.[0] ?? 0) + 1
    const draw: Draw = (draft) => drafts.push({ ...draft, fence })
    if (info?.yaml) readYamlBlock(info.kind, fence.content, at, problems, draw)
    else if (info && isCompactKind(info.kind)) readCompactBlock(info.kind, fence.content, at, problems, draw)
  }
  const written = new Set(drafts.flatMap(({ id }) => (id !== undefined && isId(id) ? [id] : [])))
  const given = new Set<string>()
  const nextCriterion = criterionNumbers(drafts)
  const byFence = new Map<Token, ReadLine[]>(fences.map((fence) => [fence, []]))
  drafts.forEach((draft) => {
    const lines = byFence.get(draft.fence)
    if (draft.text !== undefined) return lines?.push({ text: draft.text })
    const note = (message: string) =>
      problems.push({ code: 'invalid-field', severity: 'error', message, textLine: draft.textLine })
    let id = draft.id
    if (id !== undefined && (!isId(id) || given.has(id))) {
      note(
        isId(id)
          ? `The id “${id}” stands twice; this line got another.`
          : `“${id}” cannot be an id; this line got another.`,
      )
      id = undefined
    }
    id ??= freeId(new Set([...written, ...given]), isId(draft.symbol) ? draft.symbol : 'line')
    given.add(id)
    const { line: authored, unknown } = draft.read(id)
    for (const field of unknown) note(`A ${String(authored.kind)} has no field “${field}”; it was left out.`)
    if (authored.kind === 'criterion' && authored.symbol === undefined) authored.symbol = nextCriterion()
    const read = readLine(authored)
    const found = read.line ? [...read.problems, ...repeatedRows(read.line)] : read.problems
    problems.push(...found.map((problem) => ({ ...problem, textLine: draft.textLine })))
    lines?.push(
      read.line ? { line: read.line, textLine: draft.textLine } : { text: JSON.stringify(authored) },
    )
  })
  return byFence
}
