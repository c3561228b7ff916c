import type { LineId, Problem } from '@shared/errors/problem'
import { insertBlocks, type Place } from '@shared/sheet/edits'
import type { Line } from '@shared/sheet/kinds'
import type { Block, Sheet } from '@shared/sheet/sheet'
import { copyText, hasLines, pasteText } from '@shared/sheet/text'

const escaped = (text: string): string =>
  text.replaceAll('&', '&amp;').replaceAll('<', '&lt;').replaceAll('>', '&gt;')

/** Puts lines on the clipboard in the text form, as plain text and as the same text in HTML. */
export const copyLines = (lines: readonly Line[], clipboard: DataTransfer): void => {
  const text = copyText(lines.map((line): Block => ({ type: 'line', line })))
  clipboard.setData('text/plain', text)
  clipboard.setData('text/html', `<pre>${escaped(text)}</pre>`)
}

type LiveDocument = Parameters<typeof insertBlocks>[0]

export interface PastedBlocks {
  insert: (doc: LiveDocument, at: Place, origin: unknown) => void
  /** A line whose symbol was taken: its symbol is opened, so that the author sees the new one. */
  opens?: LineId
  /** The last line that was pasted. */
  last?: LineId
  problems: Problem[]
}

const textOf = (clipboard: DataTransfer): string => {
  const plain = clipboard.getData('text/plain')
  if (hasLines(plain)) return plain
  const html = clipboard.getData('text/html')
  const block = html.includes('<pre')
    ? new DOMParser().parseFromString(html, 'text/html').querySelector('pre')
    : null
  return block?.textContent ?? ''
}

/** Lines of a clipboard, ready for this sheet; undefined where it holds none and is pasted as prose. */
export const pastedBlocks = (clipboard: DataTransfer, sheet: Sheet): PastedBlocks | undefined => {
  const text = textOf(clipboard)
  if (!hasLines(text)) return undefined
  const { blocks, renamed, problems } = pasteText(text, sheet)
  if (blocks.length === 0) return undefined
  const last = blocks.findLast((block) => block.type === 'line')
  return {
    insert: (doc, at, origin) => insertBlocks(doc, blocks, at, origin),
    opens: renamed[0]?.lineId,
    last: last?.type === 'line' ? last.line.id : undefined,
    problems,
  }
}
