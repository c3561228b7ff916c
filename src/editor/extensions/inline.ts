import type { Node as PageNode } from '@tiptap/pm/model'
import type { NodeView } from '@tiptap/pm/view'
import { effect, stop } from 'vue'
import { PageQuote, PageReference } from '@shared/sheet/page'
import { quantityText, symbolText } from '@/editor/symbolText'
import { quoteKey } from '../quoteKey'
import { element } from '../element'
import type { Desk } from '../desk'

/** Without one on each side, browsers cannot put the caret beside an inline atom, and input methods stumble. */
const zeroWidthSpace = '​'

/** A live inline atom: its text is drawn again when what it reads changes. */
const liveText = (
  node: PageNode,
  className: string,
  read: (node: PageNode) => { text: string; state: string },
): NodeView => {
  const text = element('span', {})
  const dom = element('span', { class: className }, zeroWidthSpace, text, zeroWidthSpace)
  dom.contentEditable = 'false'
  let current = node
  const draw = () => {
    const { text: shown, state } = read(current)
    text.textContent = shown
    dom.className = `${className} ${className}--${state}`
  }
  const drawing = effect(draw)
  return {
    dom,
    update: (next) => {
      if (next.type !== current.type) return false
      current = next
      drawing()
      return true
    },
    ignoreMutation: () => true,
    destroy: () => stop(drawing),
  }
}

export const quoteExtension = (desk: Desk) =>
  PageQuote.extend({
    // The caret walks past it: were it selected on the way, the next key would replace it.
    selectable: false,
    addNodeView() {
      return ({ node }) =>
        liveText(node, 'quote', ({ attrs }) => {
          const { symbol, unit, digits } = attrs as {
            symbol: string
            unit: string | null
            digits: number | null
          }
          const result = desk.quote(quoteKey(symbol, unit, digits))
          if (result?.value) return { text: quantityText(result.value.shown), state: 'value' }
          return { text: symbolText(symbol), state: result?.state ?? 'waits' }
        })
    },
  })

export const referenceExtension = (desk: Desk) =>
  PageReference.extend({
    selectable: false,
    addNodeView() {
      return ({ node }) =>
        liveText(node, 'reference', ({ attrs }) => {
          const id = String(attrs.line)
          const number = desk.numberOf(id)
          return number ? { text: number, state: 'value' } : { text: 'line removed', state: 'problem' }
        })
    },
  })
