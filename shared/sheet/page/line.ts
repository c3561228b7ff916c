import { Node } from '@tiptap/core'

/**
 * The place of a line. Its fields live in the `lines` map under this id and follow it wherever it
 * goes: as node attributes they would be merged by position and land on a neighbour.
 */
export const PageLine = Node.create({
  name: 'line',
  group: 'sheetLine',
  atom: true,
  selectable: true,
  draggable: true,
  isolating: true,

  addAttributes() {
    return {
      id: {
        default: null,
        parseHTML: (element) => element.getAttribute('data-line'),
        renderHTML: (attributes) => ({ 'data-line': attributes.id as string | null }),
      },
    }
  },

  parseHTML: () => [{ tag: 'div[data-line]' }],
  renderHTML: ({ HTMLAttributes }) => ['div', HTMLAttributes],
})
