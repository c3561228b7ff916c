import { BulletList, ListItem, OrderedList } from '@tiptap/extension-list'

/**
 * Items hold any blocks, and lists may be empty: two people's edits may leave them so, and content
 * that the schema refuses would be deleted for everybody.
 */
export const PageListItem = ListItem.extend({ content: 'block*' })

export const PageBulletList = BulletList.extend({ content: 'listItem*' })

/** Only its first number; letters and Roman numbers cannot be said in the text form. */
export const PageOrderedList = OrderedList.extend({
  content: 'listItem*',
  addAttributes() {
    return {
      start: {
        default: 1,
        parseHTML: (element) => Number.parseInt(element.getAttribute('start') ?? '1', 10) || 1,
      },
    }
  },
})
