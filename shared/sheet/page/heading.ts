import { Heading } from '@tiptap/extension-heading'

/** A heading keeps an id of its own, since prose is ticked by section. The author's step gives it, never opening. */
export const PageHeading = Heading.extend({
  addAttributes() {
    return {
      level: { default: 1, rendered: false },
      id: {
        default: null,
        parseHTML: () => null,
        renderHTML: (attributes) => (attributes.id ? { 'data-heading': attributes.id as string } : {}),
      },
    }
  },
}).configure({ levels: [1, 2, 3] })
