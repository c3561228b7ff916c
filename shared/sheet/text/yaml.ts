/**
 * The small YAML of front matter and of `… yaml` blocks: every scalar is a text (failsafe schema), no
 * aliases, tags or comments, so that a text says what it says and nothing more.
 */
import { LineCounter, Parser, parseDocument, stringify } from 'yaml'
import type { Node } from 'yaml'

export interface YamlProblem {
  message: string
  /** Zero-based line within the YAML text. */
  line: number
}

export interface YamlReading {
  value: unknown
  /** Zero-based line of the entry `index` of a list, or of the key `name` of a mapping. */
  lineOf(entry: number | string): number
  problems: YamlProblem[]
}

const refused: Record<string, string> = {
  comment: 'Comments are refused here, since they would be lost: write a note in the field “note”.',
  anchor: 'Anchors are refused here: write the value out where it is used.',
  alias: 'Aliases are refused here: write the value out where it is used.',
  tag: 'Tags are refused here: every value is a text.',
  directive: 'Directives are refused here.',
}

const refusals = (text: string, lines: LineCounter): YamlProblem[] => {
  const problems: YamlProblem[] = []
  const visit = (token: unknown): void => {
    if (typeof token !== 'object' || token === null) return
    if (Array.isArray(token)) return token.forEach(visit)
    const { type, offset, ...members } = token as { type?: string; offset?: number }
    const message = type === undefined ? undefined : refused[type]
    if (message !== undefined && typeof offset === 'number') {
      problems.push({ message, line: Math.max(lines.linePos(offset).line - 1, 0) })
    }
    Object.values(members).forEach(visit)
  }
  for (const token of new Parser(lines.addNewLine).parse(text)) visit(token)
  return problems
}

const positionOf = (node: unknown): number | undefined => (node as Node | null)?.range?.[0]

/** Deeper than any line of a sheet; the parser's own time grows with the square of the depth. */
const deepest = 40

/** Whether brackets or dashes are nested beyond reason; brackets within quotes do not count. */
const isTooDeep = (text: string): boolean => {
  if (/(?:[-?][ \t]+){40}/.test(text)) return true
  const bare = text.replace(/"(?:\\.|[^"\\])*"|'[^'\n]*'/g, '')
  let depth = 0
  for (const character of bare) {
    if (character === '[' || character === '{') depth++
    else if (character === ']' || character === '}') depth = Math.max(0, depth - 1)
    if (depth > deepest) return true
  }
  return false
}

/** Reads a text, never throws: what cannot be read is a problem with its line. */
export const readYaml = (text: string): YamlReading => {
  const lines = new LineCounter()
  if (isTooDeep(text)) {
    return {
      value: undefined,
      lineOf: () => 0,
      problems: [{ message: 'This is nested too deeply.', line: 0 }],
    }
  }
  try {
    const problems = refusals(text, lines)
    const counter = new LineCounter()
    const document = parseDocument(text, {
      schema: 'failsafe',
      uniqueKeys: true,
      lineCounter: counter,
      prettyErrors: false,
    })
    for (const error of document.errors) {
      problems.push({ message: error.message, line: Math.max(counter.linePos(error.pos[0]).line - 1, 0) })
    }
    const lineOf = (entry: number | string): number => {
      const items = (document.contents as { items?: unknown[] } | null)?.items ?? []
      const found =
        typeof entry === 'number'
          ? items[entry]
          : items
              .map((pair) => (pair as { key?: unknown }).key)
              .find((key) => (key as { value?: unknown } | null)?.value === entry)
      const at = positionOf(found)
      return at === undefined ? 0 : Math.max(counter.linePos(at).line - 1, 0)
    }
    return { value: problems.length > 0 ? undefined : document.toJS({ maxAliasCount: 0 }), lineOf, problems }
  } catch (error) {
    // Nesting by indentation alone can still exhaust the parser's stack.
    const message =
      error instanceof RangeError ? 'This is nested too deeply.' : 'This could not be read as YAML.'
    return { value: undefined, lineOf: () => 0, problems: [{ message, line: 0 }] }
  }
}

/** Writes plain data; every scalar quoted, so that nothing is read as anything but a text. */
export const writeYaml = (value: unknown): string =>
  stringify(value, {
    schema: 'failsafe',
    defaultStringType: 'QUOTE_DOUBLE',
    defaultKeyType: 'PLAIN',
    lineWidth: 0,
    aliasDuplicateObjects: false,
    doubleQuotedMinMultiLineLength: 1_000_000_000,
    doubleQuotedAsJSON: true,
  })
