import type { Problem } from '../../errors/problem'
import type { Line } from '../kinds'
import { freeId, normalise } from '../normalise'
import { frontSchema } from '../sheet'
import type { Block, Sheet } from '../sheet'
import { normaliseFront } from '../normaliseFields'
import { readFrontMatter } from './frontMatter'
import type { Heading } from './heading'
import { isLineFence, readLines } from './readLines'
import type { ReadLine } from './readLines'
import { markdown } from './markdown'
import { readProse } from './readProse'

/** Longer texts are refused before they are read. */
export const longestText = 8_000_000

export interface TextReading {
  /** Absent only where the text is too long or of a newer format. */
  sheet?: Sheet
  heading: Heading
  problems: Problem[]
  /** One-based line of the text where each line of the sheet stands, by id. */
  textLines?: ReadonlyMap<string, number>
}

/** Ids of headings by order, those that are written out kept for their own. */
const headingIds = (body: string): ((written: string | undefined) => string) => {
  const kept = new Set(
    [...body.matchAll(/\{#([A-Za-z0-9_-]{1,64})\}[ \t#]*$/gm)].map((found) => found[1] ?? ''),
  )
  const given = new Set<string>()
  let count = 0
  return (written) => {
    count++
    const id =
      written !== undefined && !given.has(written)
        ? written
        : freeId(new Set([...kept, ...given]), `h${count}`)
    given.add(id)
    return id
  }
}

export interface BodyReading {
  blocks: Block[]
  problems: Problem[]
  textLines: ReadonlyMap<string, number>
}

/** Blocks of a text without front matter; `firstLine` is its zero-based first line in the whole. */
export const readBody = (body: string, firstLine = 0): BodyReading => {
  const problems: Problem[] = []
  const tokens = markdown.parse(body, {})
  const fences = tokens.filter((token) => token.level === 0 && isLineFence(token))
  const linesByFence = readLines(fences, firstLine, problems)
  const bySymbol = new Map<string, string>()
  const textLines = new Map<string, number>()
  for (const entry of [...linesByFence.values()].flat()) {
    const line: Line | undefined = entry.line
    if (line && entry.textLine !== undefined) textLines.set(line.id, entry.textLine)
    if (line && line.symbol !== '' && !bySymbol.has(line.symbol)) bySymbol.set(line.symbol, line.id)
  }
  const reading = {
    lineOf: (symbol: string) => bySymbol.get(symbol),
    problem: (message: string, line: number) =>
      void problems.push({
        code: 'invalid-field',
        severity: 'advisory',
        message,
        textLine: firstLine + line + 1,
      }),
    lines: body.split('\n'),
    headingId: headingIds(body),
  }
  const blocks: Block[] = []
  let prose: typeof tokens = []
  const endProse = () => {
    blocks.push(...readProse(prose, reading))
    prose = []
  }
  for (const token of tokens) {
    const lines = linesByFence.get(token)
    if (!lines) {
      prose.push(token)
      continue
    }
    endProse()
    blocks.push(...lines.map(blockOf))
  }
  endProse()
  return { blocks: normalise({ front: frontSchema.parse({}), blocks }).blocks, problems, textLines }
}

/** A line, or the text that could not be read as one: it stays where it stood. */
const blockOf = (read: ReadLine): Block =>
  read.line
    ? { type: 'line', line: read.line }
    : { type: 'paragraph', content: [{ type: 'text', text: read.text ?? '', marks: [{ type: 'code' }] }] }

/**
 * Reads the text form. Never throws for what stands in it: what cannot be read is a problem with its
 * line, is kept as text, and everything else is there.
 */
export const importText = (text: string): TextReading => {
  if (text.length > longestText) {
    const message = `The text is longer than ${longestText / 1_000_000} million characters and was not read.`
    return { heading: { title: '' }, problems: [{ code: 'limit-exceeded', severity: 'error', message }] }
  }
  const clean = text.replace(/^\uFEFF/, '').replace(/\r\n?/g, '\n')
  const { heading, front, problems, body, bodyLine, readable } = readFrontMatter(clean)
  if (!readable) return { heading, problems }
  const read = readBody(body, bodyLine)
  return {
    sheet: { front: normaliseFront(front), blocks: read.blocks },
    heading,
    problems: [...problems, ...read.problems],
    textLines: read.textLines,
  }
}
