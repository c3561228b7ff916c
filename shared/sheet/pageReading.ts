/**
 * The page's XML to blocks. Whatever stands there is read: unknown elements are passed through to
 * their content, so that no text is lost; nothing is thrown.
 */
import * as Y from 'yjs'
import { isSafeLink } from './page/safeLink'
import type { Inline, Mark, Prose } from './sheet'

/** A prose block, or the place of a line. */
export type PageBlock = Prose | { type: 'place'; id: unknown }

/** Lists and tables deeper than this are read as text of the level above. */
const deepest = 40

type XmlNode = ReturnType<Y.XmlFragment['toArray']>[number]

const attribute = (node: Y.XmlElement, name: string): unknown =>
  (node.getAttributes() as Record<string, unknown>)[name]

const textOf = (value: unknown, most: number): string =>
  typeof value === 'string' ? value.slice(0, most) : ''

/** `bold`, or `bold--<hash>` where the binding kept two marks of one type apart. */
const markName = (key: string): string => key.replace(/--[A-Za-z0-9+/=]{8}$/, '')

const marksOf = (attributes: Record<string, unknown> = {}): Mark[] => {
  const given = new Map(
    Object.entries(attributes)
      .filter(([, value]) => value !== null)
      .map(([key, value]) => [markName(key), value]),
  )
  const marks: Mark[] = []
  for (const type of ['bold', 'italic', 'code'] as const) if (given.has(type)) marks.push({ type })
  const link = given.get('link') as { href?: unknown } | undefined
  if (typeof link?.href === 'string' && isSafeLink(link.href)) marks.push({ type: 'link', href: link.href })
  return marks
}

const textRuns = (text: Y.XmlText): Inline[] =>
  (text.toDelta() as { insert: unknown; attributes?: Record<string, unknown> }[]).flatMap(
    ({ insert, attributes }) => {
      if (typeof insert !== 'string' || insert === '') return []
      const marks = marksOf(attributes)
      return [marks.length > 0 ? { type: 'text', text: insert, marks } : { type: 'text', text: insert }]
    },
  )

const quoteOf = (node: Y.XmlElement): Inline => {
  const unit = textOf(attribute(node, 'unit'), 100)
  const digits = Number(attribute(node, 'digits'))
  return {
    type: 'quote',
    symbol: textOf(attribute(node, 'symbol'), 200),
    ...(unit ? { unit } : {}),
    ...(Number.isInteger(digits) && digits >= 1 && digits <= 15 ? { digits } : {}),
  }
}

const inlineOf = (nodes: readonly XmlNode[]): Inline[] =>
  nodes.flatMap((node): Inline[] => {
    if (node instanceof Y.XmlText) return textRuns(node)
    if (!(node instanceof Y.XmlElement)) return []
    if (node.nodeName === 'hardBreak') return [{ type: 'break' }]
    if (node.nodeName === 'quote') return [quoteOf(node)]
    if (node.nodeName === 'reference')
      return [{ type: 'reference', line: textOf(attribute(node, 'line'), 64) }]
    return inlineOf(node.toArray())
  })

const isProse = (block: PageBlock): block is Prose => block.type !== 'place'

const itemsOf = (list: Y.XmlElement, depth: number): Prose[][] =>
  list.toArray().flatMap((item) => {
    const blocks = blocksOf(
      item instanceof Y.XmlElement && item.nodeName === 'listItem' ? item.toArray() : [item],
      depth,
    )
    return [blocks.filter(isProse)]
  })

const gridOf = (table: Y.XmlElement): Prose => ({
  type: 'grid',
  rows: table
    .toArray()
    .flatMap((row) =>
      row instanceof Y.XmlElement
        ? [
            row
              .toArray()
              .flatMap((cell) =>
                cell instanceof Y.XmlElement
                  ? [{ head: cell.nodeName === 'tableHeader', content: inlineOf(cell.toArray()) }]
                  : [{ head: false, content: inlineOf([cell]) }],
              ),
          ]
        : [],
    ),
})

const startOf = (list: Y.XmlElement): number => {
  const start = Number(attribute(list, 'start') ?? 1)
  return Number.isInteger(start) && start >= 0 && start <= 999_999_999 ? start : 1
}

const levelOf = (heading: Y.XmlElement): 1 | 2 | 3 => {
  const level = Number(attribute(heading, 'level'))
  return level === 2 || level === 3 ? level : 1
}

const blockOf = (node: Y.XmlElement, depth: number): PageBlock[] => {
  if (depth > deepest) return [{ type: 'paragraph', content: inlineOf(node.toArray()) }]
  switch (node.nodeName) {
    case 'paragraph':
      return [{ type: 'paragraph', content: inlineOf(node.toArray()) }]
    case 'heading':
      return [
        {
          type: 'heading',
          id: textOf(attribute(node, 'id'), 64),
          level: levelOf(node),
          content: inlineOf(node.toArray()),
        },
      ]
    case 'bulletList':
      return [{ type: 'bullets', items: itemsOf(node, depth + 1) }]
    case 'orderedList':
      return [{ type: 'numbers', start: startOf(node), items: itemsOf(node, depth + 1) }]
    case 'table':
      return [gridOf(node)]
    case 'line':
      return [{ type: 'place', id: attribute(node, 'id') }]
    default:
      return blocksOf(node.toArray(), depth + 1)
  }
}

/** Blocks of any nodes; loose text becomes a paragraph. */
const blocksOf = (nodes: readonly XmlNode[], depth: number): PageBlock[] =>
  nodes.flatMap((node): PageBlock[] => {
    if (node instanceof Y.XmlElement) return blockOf(node, depth)
    const content = inlineOf([node])
    return content.length > 0 ? [{ type: 'paragraph', content }] : []
  })

export const readBlocks = (page: Y.XmlFragment): PageBlock[] => blocksOf(page.toArray(), 0)
