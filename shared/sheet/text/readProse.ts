import type Token from 'markdown-it/lib/token.mjs'
import type { Inline, Prose } from '../sheet'
import { markdown } from './markdown'
import { readInline } from './readInline'
import { splitRow } from './tableRow'

export interface ProseReading {
  lineOf(symbol: string): string | undefined
  /** `line` is zero-based in the text that the tokens were made of. */
  problem(message: string, line: number): void
  /** The text's lines, for rows that are longer than their table's head. */
  lines: readonly string[]
  /** The id of a heading, from its `{#id}` where it has one. */
  headingId(written: string | undefined): string
}

const closingOf = (tokens: readonly Token[], open: number): number => {
  let depth = 0
  for (let at = open; at < tokens.length; at++) {
    depth += tokens[at]?.nesting ?? 0
    if (depth === 0) return at
  }
  return tokens.length - 1
}

const headingEnd = /(?:^|\s)\{#([A-Za-z0-9_-]{1,64})\}$/

const inlineOf = (token: Token | undefined, reading: ProseReading, line: number): Inline[] =>
  readInline(token?.children ?? [], {
    lineOf: (symbol) => reading.lineOf(symbol),
    problem: (message) => reading.problem(message, token?.map?.[0] ?? line),
  })

const readHeading = (open: Token, inline: Token | undefined, reading: ProseReading): Prose => {
  const line = open.map?.[0] ?? 0
  const level = Number(open.tag.slice(1))
  if (level > 3) reading.problem('Headings have three levels; this one was read as one of the third.', line)
  const written = inline?.content.trim() ?? ''
  const id = headingEnd.exec(written)
  const children = id
    ? (markdown.parseInline(written.slice(0, id.index), {})[0]?.children ?? [])
    : (inline?.children ?? [])
  return {
    type: 'heading',
    id: reading.headingId(id?.[1]),
    level: level >= 3 ? 3 : level === 2 ? 2 : 1,
    content: readInline(children, {
      lineOf: (symbol) => reading.lineOf(symbol),
      problem: (message) => reading.problem(message, line),
    }),
  }
}

const readItems = (tokens: readonly Token[], reading: ProseReading): Prose[][] => {
  const items: Prose[][] = []
  for (let at = 0; at < tokens.length; at++) {
    const close = closingOf(tokens, at)
    items.push(readProse(tokens.slice(at + 1, close), reading))
    at = close
  }
  return items
}

/** Cells beyond the head's columns, which Markdown's own reading leaves out: the table gets wider. */
const furtherCells = (row: Token, read: number, reading: ProseReading): Inline[][] => {
  const line = row.map?.[0]
  if (line === undefined) return []
  const cells = splitRow(reading.lines[line] ?? '').slice(read)
  if (cells.length > 0) {
    reading.problem(
      `This row has ${read + cells.length} cells and its table's head ${read}; the table was made wider so that nothing is lost.`,
      line,
    )
  }
  return cells.map((cell) => inlineOf(markdown.parseInline(cell, {})[0], reading, line))
}

const readGrid = (tokens: readonly Token[], reading: ProseReading): Prose => {
  const rows: { head: boolean; content: Inline[] }[][] = []
  let row: { head: boolean; content: Inline[] }[] = []
  let open: Token | undefined
  tokens.forEach((token, at) => {
    if (token.type === 'tr_open') {
      row = []
      open = token
      rows.push(row)
    } else if (token.type === 'th_open' || token.type === 'td_open') {
      row.push({
        head: token.type === 'th_open',
        content: inlineOf(tokens[at + 1], reading, open?.map?.[0] ?? 0),
      })
    } else if (token.type === 'tr_close' && open && rows.length > 1) {
      row.push(...furtherCells(open, row.length, reading).map((content) => ({ head: false, content })))
    }
  })
  const head = rows[0]?.every((cell) => cell.content.length === 0) ? rows.slice(1) : rows
  return { type: 'grid', rows: head }
}

const readLiteral = (token: Token, reading: ProseReading): Prose => {
  reading.problem(
    token.type === 'fence' && token.info.trim()
      ? `“${token.info.trim()}” is no kind of line; the block was kept as text.`
      : 'A block of code has no place in a sheet; it was kept as text.',
    token.map?.[0] ?? 0,
  )
  const content = token.content
    .replace(/\n$/, '')
    .split('\n')
    .flatMap((text, index): Inline[] => [
      ...(index > 0 ? [{ type: 'break' } as const] : []),
      ...(text === ''
        ? []
        : [{ type: 'text', text, marks: [{ type: 'code' }] } as const].map((run) => ({
            ...run,
            marks: [...run.marks],
          }))),
    ])
  return { type: 'paragraph', content }
}

/** Blocks of tokens; what a sheet has no form for is kept as text, with a problem that says so. */
export const readProse = (tokens: readonly Token[], reading: ProseReading): Prose[] => {
  const blocks: Prose[] = []
  for (let at = 0; at < tokens.length; at++) {
    const token = tokens[at]
    if (!token) continue
    const close = token.nesting === 1 ? closingOf(tokens, at) : at
    const inner = tokens.slice(at + 1, close)
    switch (token.type) {
      case 'paragraph_open':
        blocks.push({ type: 'paragraph', content: inlineOf(inner[0], reading, token.map?.[0] ?? 0) })
        break
      case 'heading_open':
        blocks.push(readHeading(token, inner[0], reading))
        break
      case 'bullet_list_open':
        blocks.push({ type: 'bullets', items: readItems(inner, reading) })
        break
      case 'ordered_list_open':
        blocks.push({
          type: 'numbers',
          start: Number(token.attrGet('start') ?? 1),
          items: readItems(inner, reading),
        })
        break
      case 'table_open':
        blocks.push(readGrid(inner, reading))
        break
      case 'blockquote_open':
        reading.problem('A block quotation was read as ordinary paragraphs.', token.map?.[0] ?? 0)
        blocks.push(...readProse(inner, reading))
        break
      case 'hr':
        reading.problem('A ruled line has no place in a sheet and was left out.', token.map?.[0] ?? 0)
        break
      case 'fence':
      case 'code_block':
        blocks.push(readLiteral(token, reading))
        break
    }
    at = close
  }
  return blocks
}
