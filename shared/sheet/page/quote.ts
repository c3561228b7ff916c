import { Node } from '@tiptap/core'

/** A quoted value: the value of a symbol, live, in running text. */
export const PageQuote = Node.create({
  name: 'quote',
  group: 'inline',
  inline: true,
  atom: true,
  selectable: true,

  addAttributes() {
    return {
      symbol: {
        default: '',
        parseHTML: (element) => element.getAttribute('data-quote') ?? '',
        renderHTML: (attributes) => ({ 'data-quote': attributes.symbol as string }),
      },
      unit: {
        default: null,
        parseHTML: (element) => element.getAttribute('data-unit'),
        renderHTML: (attributes) => (attributes.unit ? { 'data-unit': attributes.unit as string } : {}),
      },
      digits: {
        default: null,
        parseHTML: (element) => Number.parseInt(element.getAttribute('data-digits') ?? '', 10) || null,
        renderHTML: (attributes) => (attributes.digits ? { 'data-digits': String(attributes.digits) } : {}),
      },
    }
  },

  parseHTML: () => [{ tag: 'span[data-quote]' }],
  renderHTML: ({ HTMLAttributes, node }) => ['span', HTMLAttributes, String(node.attrs.symbol ?? '')],
  renderText: ({ node }) => String(node.attrs.symbol ?? ''),
})
