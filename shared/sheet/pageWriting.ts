/** Blocks to the page's XML, in the shape that the editor binding reads. */
import * as Y from 'yjs'
import type { Block, Inline, Mark, Prose } from './sheet'

const marksOf = (marks: readonly Mark[] = []): object =>
  Object.fromEntries(marks.map((mark) => [mark.type, mark.type === 'link' ? { href: mark.href } : {}]))

const element = (
  name: string,
  attributes: Record<string, string | number | undefined> = {},
): Y.XmlElement => {
  const made = new Y.XmlElement<Record<string, string | number>>(name)
  for (const [key, value] of Object.entries(attributes))
    if (value !== undefined) made.setAttribute(key, value)
  return made as unknown as Y.XmlElement
}

/** Text runs that touch share one XmlText; anything between them is an element of its own. */
const inlineNodes = (content: readonly Inline[]): (Y.XmlElement | Y.XmlText)[] => {
  const nodes: (Y.XmlElement | Y.XmlText)[] = []
  let runs: { insert: string; attributes: object }[] = []
  const endText = () => {
    if (runs.length === 0) return
    const text = new Y.XmlText()
    text.applyDelta(runs)
    nodes.push(text)
    runs = []
  }
  for (const part of content) {
    if (part.type === 'text') {
      if (part.text) runs.push({ insert: part.text, attributes: marksOf(part.marks) })
      continue
    }
    endText()
    if (part.type === 'break') nodes.push(element('hardBreak'))
    else if (part.type === 'reference') nodes.push(element('reference', { line: part.line }))
    else nodes.push(element('quote', { symbol: part.symbol, unit: part.unit, digits: part.digits }))
  }
  endText()
  return nodes
}

const holding = (parent: Y.XmlElement, children: (Y.XmlElement | Y.XmlText)[]): Y.XmlElement => {
  if (children.length > 0) parent.insert(0, children)
  return parent
}

const listItem = (blocks: readonly Prose[]): Y.XmlElement =>
  holding(element('listItem'), blocks.map(proseElement))

const proseElement = (prose: Prose): Y.XmlElement => {
  switch (prose.type) {
    case 'paragraph':
      return holding(element('paragraph'), inlineNodes(prose.content))
    case 'heading':
      return holding(
        element('heading', { level: prose.level, id: prose.id || undefined }),
        inlineNodes(prose.content),
      )
    case 'bullets':
      return holding(element('bulletList'), prose.items.map(listItem))
    case 'numbers':
      return holding(element('orderedList', { start: prose.start }), prose.items.map(listItem))
    case 'grid':
      return holding(
        element('table'),
        prose.rows.map((row) =>
          holding(
            element('tableRow'),
            row.map((cell) =>
              holding(element(cell.head ? 'tableHeader' : 'tableCell'), inlineNodes(cell.content)),
            ),
          ),
        ),
      )
  }
}

export const lineAtom = (id: string): Y.XmlElement => element('line', { id })

export const blockElement = (block: Block): Y.XmlElement =>
  block.type === 'line' ? lineAtom(block.line.id) : proseElement(block)

export const writeBlocks = (page: Y.XmlFragment, blocks: readonly Block[], at = page.length): void => {
  if (blocks.length > 0) page.insert(at, blocks.map(blockElement))
}
