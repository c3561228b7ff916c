import { Editor } from '@tiptap/core'
import { markRaw, onScopeDispose, shallowRef, watch, type Ref, type ShallowRef } from 'vue'
import type { Acts } from '@/editor/acts'
import type { Desk } from '@/editor/desk'
import { sheetExtensions } from '@/editor/extensions'
import { standAgain, standingOf } from '@/editor/standing'
import type { Typing } from '@/editor/extensions/typedLine'
import { styleNonce } from '@/plugins/vuetify'
import type { SheetConnection } from '@/collaboration/sheetConnection'

export interface SheetEditorWishes {
  connection: SheetConnection
  editor: ShallowRef<Editor | undefined>
  desk: Desk
  acts: Acts
  typing: Typing
  me: { name: string }
  mayEdit: Ref<boolean>
}

/**
 * The editor of the page. It belongs to one Y.Doc: when the connection comes back with another, the
 * editor is made anew in the same place.
 */
export const useSheetEditor = (wishes: SheetEditorWishes) => {
  const { connection, editor, desk, acts, typing, me, mayEdit } = wishes
  const host = shallowRef<HTMLElement>()
  /** Raised with every change of the selection, for those who show where one is. */
  const selectionCount = shallowRef(0)
  /** Raised with every step, also one that changes nothing but what the next letter will look like. */
  const stepCount = shallowRef(0)

  const make = (element: HTMLElement): Editor =>
    markRaw(
      new Editor({
        element,
        editable: mayEdit.value,
        injectNonce: styleNonce(),
        editorProps: {
          attributes: { class: 'page', role: 'document', 'aria-label': 'Sheet' },
          scrollMargin: { top: 96, bottom: 96, left: 0, right: 0 },
          scrollThreshold: { top: 96, bottom: 64, left: 0, right: 0 },
        },
        extensions: sheetExtensions({
          doc: connection.doc.value,
          undoManager: connection.undoManager.value,
          awareness: connection.awareness.value,
          me,
          desk,
          acts,
          typing,
        }),
        onSelectionUpdate: () => (selectionCount.value += 1),
        onTransaction: () => (stepCount.value += 1),
      }),
    )

  const stopWatching = watch(
    [host, connection.doc],
    ([element]) => {
      const standing = editor.value && standingOf(editor.value)
      editor.value?.destroy()
      editor.value = element ? make(element) : undefined
      if (editor.value && standing) standAgain(editor.value, standing)
    },
    { flush: 'post' },
  )
  const stopRights = watch(mayEdit, (may) => editor.value?.setEditable(may, false))

  onScopeDispose(() => {
    stopWatching()
    stopRights()
    editor.value?.destroy()
    editor.value = undefined
  })

  return { host, selectionCount, stepCount }
}
