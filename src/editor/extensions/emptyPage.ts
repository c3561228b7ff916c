import { Extension } from '@tiptap/core'
import { Plugin } from '@tiptap/pm/state'
import { Decoration, DecorationSet } from '@tiptap/pm/view'

/** Says in an empty paragraph at the caret what can be typed there. */
export const EmptyPage = Extension.create({
  name: 'emptyPage',

  addProseMirrorPlugins() {
    const { editor } = this
    return [
      new Plugin({
        props: {
          decorations: ({ doc, selection }) => {
            if (!editor.isEditable) return null
            const { $from, empty } = selection
            const isAtCaret =
              empty &&
              $from.depth === 1 &&
              $from.parent.type.name === 'paragraph' &&
              $from.parent.content.size === 0
            if (!isAtCaret) return null
            return DecorationSet.create(doc, [
              Decoration.node($from.before(1), $from.after(1), {
                class: 'is-empty-page',
                'data-hint': 'Write text, or a line as on paper: d = 40 mm',
              }),
            ])
          },
        },
      }),
    ]
  },
})
