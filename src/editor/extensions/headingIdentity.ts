import { Extension } from '@tiptap/core'
import { isChangeOrigin } from '@tiptap/extension-collaboration'
import { Plugin } from '@tiptap/pm/state'

/**
 * Gives a heading its id in the step of whoever wrote it; prose is ticked by section. Never on opening
 * and never for a colleague's change: a reader who repaired ids would become an author. (The extension
 * made for this by others writes at the first synchronisation.)
 */
export const HeadingIdentity = Extension.create({
  name: 'headingIdentity',

  addProseMirrorPlugins() {
    return [
      new Plugin({
        appendTransaction: (transactions, _, { doc, tr }) => {
          const own = transactions.some(
            (transaction) => transaction.docChanged && !isChangeOrigin(transaction),
          )
          if (!own) return null
          const seen = new Set<string>()
          doc.descendants((node, position) => {
            if (node.type.name !== 'heading') return node.isBlock && !node.isTextblock
            const id: unknown = node.attrs.id
            if (typeof id === 'string' && id !== '' && !seen.has(id)) seen.add(id)
            else tr.setNodeAttribute(position, 'id', crypto.randomUUID())
            return false
          })
          return tr.docChanged ? tr : null
        },
      }),
    ]
  },
})
