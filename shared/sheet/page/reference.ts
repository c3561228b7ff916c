import { Node } from '@tiptap/core'

/** A reference to a line, shown as its number. */
export const PageReference = Node.create({
  name: 'reference',
  group: 'inline',
  inline: true,
  atom: true,
  selectable: true,

  addAttributes() {
    return {
      line: {
        default: '',
        parseHTML: (element) => element.getAttribute('data-reference') ?? '',
        renderHTML: (attributes) => ({ 'data-reference': attributes.line as string }),
      },
    }
  },

  parseHTML: () => [{ tag: 'span[data-reference]' }],
  renderHTML: ({ HTMLAttributes }) => ['span', HTMLAttributes],
})
