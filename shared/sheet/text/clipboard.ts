/** Lines and prose on the clipboard: the text form without front matter. */
import type { Problem } from '../../errors/problem'
import { freeSymbol, newId } from '../edits'
import { linesOf } from '../lines'
import { normalise } from '../normalise'
import { frontSchema } from '../sheet'
import type { Block, Inline, Prose, Sheet } from '../sheet'
import { writeBlocks } from './export'
import { longestText, readBody } from './import'

export interface Pasted {
  /** With new ids, to be put on the page by `insertBlocks`. */
  blocks: Block[]
  /** Lines whose symbol was taken: the editor opens that field. */
  renamed: { lineId: string; wanted: string; symbol: string }[]
  problems: Problem[]
}

/** A selection of blocks as text. */
export const copyText = (blocks: readonly Block[]): string => {
  const { blocks: normal } = normalise({ front: frontSchema.parse({}), blocks: [...blocks] })
  const text = writeBlocks(normal)
  return text === '' ? '' : `${text}\n`
}

/** Whether a text holds lines of a sheet, and not only prose. */
export const hasLines = (text: string): boolean =>
  text.length <= longestText &&
  /^ {0,3}`{3,}(?:given|formula|criterion|analysis|cases|sizing|parametric|tolerance|table|figure)(?: yaml)?[ \t]*$/m.test(
    text,
  )

const inContent = (content: Inline[], idOf: (id: string) => string): Inline[] =>
  content.map((part) => (part.type === 'reference' ? { ...part, line: idOf(part.line) } : part))

const inProse = (prose: Prose, idOf: (id: string) => string): Prose => {
  switch (prose.type) {
    case 'paragraph':
      return { ...prose, content: inContent(prose.content, idOf) }
    case 'heading':
      return { ...prose, id: newId(), content: inContent(prose.content, idOf) }
    case 'grid':
      return {
        ...prose,
        rows: prose.rows.map((row) =>
          row.map((cell) => ({ ...cell, content: inContent(cell.content, idOf) })),
        ),
      }
    default:
      return { ...prose, items: prose.items.map((item) => item.map((block) => inProse(block, idOf))) }
  }
}

/**
 * Blocks with new ids for lines and headings; references among them follow. Lines keep their origin;
 * one whose symbol is taken in `sheet` gets the next free one.
 */
export const asNewBlocks = (blocks: readonly Block[], sheet: Sheet): Omit<Pasted, 'problems'> => {
  const ids = new Map(
    blocks.flatMap((block) => (block.type === 'line' ? [[block.line.id, newId()] as const] : [])),
  )
  const idOf = (id: string) => ids.get(id) ?? id
  const taken = new Set(linesOf(sheet).map((line) => line.symbol))
  const renamed: Pasted['renamed'] = []
  const made = blocks.map((block): Block => {
    if (block.type !== 'line') return inProse(block, idOf)
    const { contested: _, ...line } = block.line
    const lineId = idOf(line.id)
    const symbol = freeSymbol(sheet, line.symbol, taken)
    if (symbol !== '') taken.add(symbol)
    if (symbol !== line.symbol) renamed.push({ lineId, wanted: line.symbol, symbol })
    return { type: 'line', line: { ...line, id: lineId, symbol } }
  })
  return { blocks: made, renamed }
}

/** Reads a text from the clipboard for this sheet. Never throws; what cannot be read is kept as text. */
export const pasteText = (text: string, sheet: Sheet): Pasted => {
  if (text.length > longestText) {
    const message = 'The clipboard holds more text than a sheet can take.'
    return { blocks: [], renamed: [], problems: [{ code: 'limit-exceeded', severity: 'error', message }] }
  }
  const { blocks, problems } = readBody(text.replace(/\r\n?/g, '\n'))
  return { ...asNewBlocks(blocks, sheet), problems }
}
