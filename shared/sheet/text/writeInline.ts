/**
 * Running text to Markdown, so that reading it gives exactly the same text. Bold is `**` and italic
 * `_`, never the same character, so that one cannot be taken for the other; a character beside such
 * a mark that would keep it from counting as one is written as a character reference.
 */
import { lineDestination, valueDestination } from './ownLinks'
import type { Inline, Mark } from '../sheet'

/** Where the text stands: a paragraph may break lines, a heading and a cell are one line. */
export type InlineSetting = 'paragraph' | 'heading' | 'cell'

/** What the label of a reference says: the line's symbol where that finds the line again. */
export type SymbolOfLine = (lineId: string) => string | undefined

type TextRun = Extract<Inline, { type: 'text' }>

/** `place` of a mark: text before an opening one is outside of it, text after it inside. */
type Piece = { text: string } | { raw: string } | { mark: string; opens: boolean } | { lineEnd: true }

const reference = (character: string): string => `&#${character.codePointAt(0) ?? 32};`

const escapeAddress = (address: string, setting: InlineSetting): string => {
  const escaped = address.replace(/[\\<>&]/g, '\\$&')
  return setting === 'cell' ? escaped.replaceAll('|', '&#124;') : escaped
}

const address = (href: string, setting: InlineSetting): string =>
  /^(?:value|line):[A-Za-z0-9._^*/=;-]*$/.test(href) ? `(${href})` : `(<${escapeAddress(href, setting)}>)`

const codeSpan = (text: string, setting: InlineSetting): string => {
  const longest = Math.max(0, ...(text.match(/`+/g) ?? []).map((run) => run.length))
  const fence = '`'.repeat(longest + 1)
  const padding = /^`|`$|^ [^]+ $/.test(text) ? ' ' : ''
  const content = setting === 'cell' ? text.replaceAll('|', '\\|') : text
  return fence + padding + content + padding + fence
}

const nesting: Mark['type'][] = ['link', 'bold', 'italic']

/** Runs that share their outermost mark are written within it, one level of marks at a time. */
const writeRuns = (runs: readonly TextRun[], level: number, setting: InlineSetting): Piece[] => {
  const type = nesting[level]
  if (type === undefined) {
    return runs.map((run) =>
      run.marks?.some((mark) => mark.type === 'code')
        ? { raw: codeSpan(run.text, setting) }
        : { text: run.text },
    )
  }
  const markOf = (run: TextRun | undefined): Mark | undefined =>
    run?.marks?.find((mark) => mark.type === type)
  const same = (a: Mark | undefined, b: Mark | undefined) => JSON.stringify(a) === JSON.stringify(b)
  const pieces: Piece[] = []
  for (let from = 0; from < runs.length;) {
    const mark = markOf(runs[from])
    let to = from + 1
    while (to < runs.length && same(mark, markOf(runs[to]))) to++
    const inner = writeRuns(runs.slice(from, to), level + 1, setting)
    if (!mark) pieces.push(...inner)
    else if (mark.type === 'link')
      pieces.push({ raw: '[' }, ...inner, { raw: `]${address(mark.href, setting)}` })
    else {
      const sign = mark.type === 'bold' ? '**' : '_'
      pieces.push({ mark: sign, opens: true }, ...inner, { mark: sign, opens: false })
    }
    from = to
  }
  return pieces
}

const always = /[\\`*_[\]<&!]/
const isWord = (character: string | undefined): boolean =>
  character !== undefined && /[A-Za-z0-9]/.test(character)

const escapeText = (characters: readonly string[], at: number, setting: InlineSetting): string => {
  const character = characters[at] ?? ''
  if (character === '\t' || /[\u2028\u2029]/.test(character)) return reference(character)
  if (character === '_' && isWord(characters[at - 1]) && isWord(characters[at + 1])) return character
  if (setting === 'cell' && character === '|') return '&#124;'
  if (setting === 'heading' && /[#{}]/.test(character)) return `\\${character}`
  return always.test(character) ? `\\${character}` : character
}

const startsLine = (text: string): string =>
  /^[!-/:-@[-`{-~]/.test(text) && !text.startsWith('\\') && !text.startsWith('&')
    ? `\\${text}`
    : text.replace(/^(\d{1,9})([.)])/, '$1\\$2')

/** A text piece with what stands before and after it. */
const writeText = (
  text: string,
  before: Piece | undefined,
  after: Piece | undefined,
  setting: InlineSetting,
): string => {
  const characters = [...text]
  const written = characters.map((_, at) => escapeText(characters, at, setting))
  const atEdge = (at: number, edge: Piece | undefined, isInside: (mark: { opens: boolean }) => boolean) => {
    const character = characters[at] ?? ''
    const isSpace = /\s/.test(character)
    const mustRefer =
      edge === undefined || 'lineEnd' in edge
        ? isSpace
        : 'mark' in edge &&
          (isInside(edge) ? isSpace : !/[\s!-/:-@[-`{-~]/.test(character) || /[^\x20-\x7e]/.test(character))
    if (mustRefer) written[at] = reference(character)
  }
  atEdge(0, before, (mark) => mark.opens)
  atEdge(characters.length - 1, after, (mark) => !mark.opens)
  // Beside a character reference an underscore is no longer within a word.
  const last = characters.length - 1
  for (const [edge, beside] of [
    [0, 1],
    [last, last - 1],
  ] as const) {
    if (written[edge]?.startsWith('&#') && characters[beside] === '_') written[beside] = '\\_'
  }
  const joined = written.join('')
  return setting !== 'cell' && (before === undefined || 'lineEnd' in before) ? startsLine(joined) : joined
}

/** Markdown of running text in normal form; one line, but for line breaks in a paragraph. */
export const writeInline = (
  content: readonly Inline[],
  setting: InlineSetting,
  symbolOf: SymbolOfLine,
): string => {
  const pieces: Piece[] = []
  for (let at = 0; at < content.length;) {
    const part = content[at]
    if (part?.type === 'text') {
      let to = at
      const runs: TextRun[] = []
      for (let run = content[to]; run?.type === 'text'; run = content[++to]) runs.push(run)
      pieces.push(...writeRuns(runs, 0, setting))
      at = to
      continue
    }
    if (part?.type === 'break') {
      const isBetween = [content[at - 1], content[at + 1]].every(
        (beside) => beside && beside.type !== 'break',
      )
      pieces.push(setting === 'paragraph' && isBetween ? { lineEnd: true } : { raw: '<br>' })
    } else if (part?.type === 'quote') {
      const label = writeText(
        part.symbol,
        { raw: '[' },
        { raw: ']' },
        setting === 'paragraph' ? 'heading' : setting,
      )
      pieces.push({ raw: `[${label}]${address(valueDestination(part), setting)}` })
    } else if (part?.type === 'reference') {
      const symbol = symbolOf(part.line)
      const label = symbol === undefined ? 'line' : writeText(symbol, { raw: '[' }, { raw: ']' }, setting)
      pieces.push({
        raw: `[${label}]${address(symbol === undefined ? lineDestination(part.line) : 'line:', setting)}`,
      })
    }
    at++
  }
  return pieces
    .map((piece, at) => {
      if ('raw' in piece) return piece.raw
      if ('mark' in piece) return piece.mark
      if ('lineEnd' in piece) return '\\\n'
      return writeText(piece.text, pieces[at - 1], pieces[at + 1], setting)
    })
    .join('')
}
