import type { Inline, Prose } from '../sheet'
import { writeInline } from './writeInline'
import type { InlineSetting, SymbolOfLine } from './writeInline'

export interface ProseWriting {
  symbolOf: SymbolOfLine
  /** The `{#id}` of a heading, or nothing where reading gives it the same id anyway. */
  headingId(id: string): string
}

type Grid = Extract<Prose, { type: 'grid' }>
type List = Extract<Prose, { type: 'bullets' | 'numbers' }>

const writeGrid = (grid: Grid, inline: (content: Inline[], setting: InlineSetting) => string): string[] => {
  const columns = grid.rows[0]?.length ?? 0
  const row = (cells: string[]) => `| ${cells.join(' | ')} |`
  const rows = grid.rows.map((cells) => row(cells.map((cell) => inline(cell.content, 'cell'))))
  const hasHead = grid.rows[0]?.every((cell) => cell.head) ?? false
  const head = hasHead ? (rows.shift() ?? '') : row(Array<string>(columns).fill(' '))
  return [head, row(Array<string>(columns).fill('---')), ...rows]
}

/** A list beside another of its kind takes the other sign, or Markdown would make one list of both. */
const writeList = (list: List, isSecond: boolean, writing: ProseWriting): string[] =>
  list.items.flatMap((item, index) => {
    const marker =
      list.type === 'bullets'
        ? isSecond
          ? '*'
          : '-'
        : `${Math.min(list.start + index, 999_999_999)}${isSecond ? ')' : '.'}`
    const lines = writeProse(item, writing)
    const indent = ' '.repeat(marker.length + 1)
    const indented = lines.map((line, at) =>
      at === 0 ? `${marker} ${line}` : line === '' ? '' : indent + line,
    )
    return index > 0 && (lines.length > 1 || (list.items[index - 1]?.length ?? 0) > 1)
      ? ['', ...indented]
      : indented
  })

const writeBlock = (prose: Prose, isSecond: boolean, writing: ProseWriting): string[] => {
  const inline = (content: Inline[], setting: InlineSetting) =>
    writeInline(content, setting, writing.symbolOf)
  switch (prose.type) {
    case 'paragraph':
      return inline(prose.content, 'paragraph').split('\n')
    case 'heading': {
      const parts = ['#'.repeat(prose.level), inline(prose.content, 'heading'), writing.headingId(prose.id)]
      return [parts.filter((part) => part !== '').join(' ')]
    }
    case 'grid':
      return writeGrid(prose, inline)
    default:
      return writeList(prose, isSecond, writing)
  }
}

/** Blocks as Markdown lines, an empty one between any two. */
export const writeProse = (blocks: readonly Prose[], writing: ProseWriting): string[] => {
  const lines: string[] = []
  let isSecond = false
  blocks.forEach((block, index) => {
    if (index > 0) lines.push('')
    isSecond = index > 0 && blocks[index - 1]?.type === block.type && !isSecond
    lines.push(...writeBlock(block, isSecond, writing))
  })
  return lines
}
