import { Extension } from '@tiptap/core'
import { Plugin } from '@tiptap/pm/state'
import type { EditorView } from '@tiptap/pm/view'
import type { Acts } from '../acts'
import { selectedLineIds } from './lineRange'

/** Index of the block after the selection: where pasted lines go. */
const indexAfter = ({ state }: EditorView): number => {
  const { $to } = state.selection
  return $to.depth === 0 ? $to.index(0) : $to.indexAfter(0)
}

/** Lines travel by the clipboard in the text form, so that they can be pasted anywhere that takes text. */
export const lineClipboard = (acts: Acts) =>
  Extension.create({
    name: 'lineClipboard',

    addProseMirrorPlugins() {
      return [
        new Plugin({
          props: {
            handleDOMEvents: {
              copy: (view, event) => {
                const ids = selectedLineIds(view.state.selection)
                if (ids.length === 0 || !event.clipboardData) return false
                acts.copy(ids, event.clipboardData)
                event.preventDefault()
                return true
              },
              cut: (view, event) => {
                const ids = selectedLineIds(view.state.selection)
                if (ids.length === 0 || !event.clipboardData) return false
                event.preventDefault()
                if (!acts.mayEdit()) return true
                acts.copy(ids, event.clipboardData)
                acts.remove(ids)
                return true
              },
            },
            handlePaste: (view, event) =>
              event.clipboardData !== null &&
              acts.mayEdit() &&
              acts.paste(event.clipboardData, indexAfter(view)),
          },
        }),
      ]
    },
  })
