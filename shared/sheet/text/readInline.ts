import type Token from 'markdown-it/lib/token.mjs'
import type { Inline, Mark } from '../sheet'
import { readLineLink, readValueLink } from './ownLinks'

export interface InlineReading {
  /** Id of the first line with this symbol. */
  lineOf(symbol: string): string | undefined
  /** Notes what could not be taken over as it stands. */
  problem(message: string): void
}

const withMarks = (text: string, marks: readonly Mark[]): Inline =>
  marks.length > 0 ? { type: 'text', text, marks: [...marks] } : { type: 'text', text }

const closing = (tokens: readonly Token[], open: number): number => {
  let depth = 0
  for (let at = open; at < tokens.length; at++) {
    if (tokens[at]?.type === 'link_open') depth++
    if (tokens[at]?.type === 'link_close' && --depth === 0) return at
  }
  return tokens.length
}

const labelOf = (tokens: readonly Token[]): string =>
  tokens
    .map((token) => (token.type === 'softbreak' || token.type === 'hardbreak' ? ' ' : token.content))
    .join('')

/** Tokens of one inline text to running text; nothing is dropped without a problem that says so. */
export const readInline = (tokens: readonly Token[], reading: InlineReading): Inline[] => {
  const content: Inline[] = []
  const marks: Mark[] = []
  const end = (type: Mark['type']) => {
    const at = marks.findLastIndex((mark) => mark.type === type)
    if (at >= 0) marks.splice(at, 1)
  }
  for (let at = 0; at < tokens.length; at++) {
    const token = tokens[at]
    if (!token) continue
    switch (token.type) {
      case 'strong_open':
        marks.push({ type: 'bold' })
        break
      case 'em_open':
        marks.push({ type: 'italic' })
        break
      case 'strong_close':
        end('bold')
        break
      case 'em_close':
        end('italic')
        break
      case 'link_close':
        end('link')
        break
      case 'link_open': {
        const href = token.attrGet('href') ?? ''
        if (!/^(?:value|line):/.test(href)) {
          marks.push({ type: 'link', href })
          break
        }
        const close = closing(tokens, at)
        const label = labelOf(tokens.slice(at + 1, close))
        content.push(ownLink(label, href, reading))
        at = close
        break
      }
      case 'code_inline':
        content.push(withMarks(token.content, [...marks, { type: 'code' }]))
        break
      case 'hardbreak':
        content.push({ type: 'break' })
        break
      case 'softbreak':
        content.push(withMarks(' ', marks))
        break
      case 'image':
        reading.problem('A picture is a figure line with its attachment; only its words were taken over.')
        content.push(withMarks(token.content, marks))
        break
      default:
        if (token.content !== '') content.push(withMarks(token.content, marks))
    }
  }
  return content
}

const ownLink = (label: string, href: string, reading: InlineReading): Inline => {
  if (href.startsWith('value:')) {
    const quote = readValueLink(label, href)
    if (typeof quote !== 'string') return quote
    reading.problem(quote)
    return { type: 'text', text: label }
  }
  const line = readLineLink(href) || reading.lineOf(label)
  if (line) return { type: 'reference', line }
  reading.problem(`No line of this text has the symbol “${label}”; the reference became plain text.`)
  return { type: 'text', text: label }
}
