import type { Line } from '../kinds'
import { normalise } from '../normalise'
import type { Block, Prose, Sheet } from '../sheet'
import { writeCompactLine } from './lineCompact'
import { lineToMapping } from './lineYaml'
import { writeFrontMatter } from './frontMatter'
import type { Heading } from './heading'
import { writeProse } from './writeProse'
import type { ProseWriting } from './writeProse'
import { writeYaml } from './yaml'

/** One piece of the text: prose, or lines of one kind that share a fenced block. */
type Piece =
  | { type: 'prose'; blocks: Prose[] }
  | { type: 'compact'; kind: string; lines: string[] }
  | { type: 'yaml'; kind: string; lines: object[] }

const pieceOf = (block: Block): Piece => {
  if (block.type !== 'line') return { type: 'prose', blocks: [block] }
  const { line } = block
  const withId = needsId(line)
  const compact = writeCompactLine(line, withId)
  if (compact !== undefined) return { type: 'compact', kind: line.kind, lines: [compact] }
  return { type: 'yaml', kind: line.kind, lines: [lineToMapping(line, withId)] }
}

/** Reading gives a line its symbol as id where it says none. */
const needsId = (line: Line): boolean => line.id !== line.symbol

const piecesOf = (blocks: readonly Block[]): Piece[] => {
  const pieces: Piece[] = []
  for (const block of blocks) {
    const piece = pieceOf(block)
    const last = pieces.at(-1)
    if (last?.type === 'prose' && piece.type === 'prose') last.blocks.push(...piece.blocks)
    else if (last?.type === 'compact' && piece.type === 'compact' && last.kind === piece.kind)
      last.lines.push(...piece.lines)
    else if (last?.type === 'yaml' && piece.type === 'yaml' && last.kind === piece.kind)
      last.lines.push(...piece.lines)
    else pieces.push(piece)
  }
  return pieces
}

const fenced = (info: string, content: string): string => {
  const longest = Math.max(2, ...(content.match(/`{3,}/g) ?? []).map((run) => run.length))
  const fence = '`'.repeat(longest + 1)
  return `${fence}${info}\n${content.replace(/\n$/, '')}\n${fence}`
}

const writePiece = (piece: Piece, writing: ProseWriting): string => {
  if (piece.type === 'prose') return writeProse(piece.blocks, writing).join('\n')
  if (piece.type === 'compact') return fenced(piece.kind, piece.lines.join('\n'))
  return fenced(`${piece.kind} yaml`, writeYaml(piece.lines))
}

/** Blocks in normal form as text, without front matter. */
export const writeBlocks = (blocks: readonly Block[]): string => {
  const symbols = new Map<string, string>()
  for (const block of blocks) {
    // A label is one line of text.
    if (block.type !== 'line' || /[\r\n]/.test(block.line.symbol)) continue
    if (!symbols.has(block.line.symbol)) symbols.set(block.line.symbol, block.line.id)
  }
  const symbolById = new Map([...symbols].map(([symbol, id]) => [id, symbol]))
  let headings = 0
  const writing: ProseWriting = {
    symbolOf: (lineId) => symbolById.get(lineId) || undefined,
    headingId: (id) => (id === `h${++headings}` ? '' : `{#${id}}`),
  }
  return piecesOf(blocks)
    .map((piece) => writePiece(piece, writing))
    .join('\n\n')
}

/** A sheet in the text form: Markdown with front matter. Reading it gives `normalise(sheet)` again. */
export const exportText = (sheet: Sheet, heading: Heading): string => {
  const { front, blocks } = normalise(sheet)
  const body = writeBlocks(blocks)
  return writeFrontMatter(front, heading) + (body === '' ? '' : `\n${body}\n`)
}
