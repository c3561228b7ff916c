/**
 * Where a person stands in the page, in terms that hold in another copy of the same document: the caret
 * and the keyboard stay with them when the connection comes back with a fresh copy.
 */
import type { Editor } from '@tiptap/core'
import { NodeSelection, TextSelection, type Selection } from '@tiptap/pm/state'
import {
  absolutePositionToRelativePosition,
  relativePositionToAbsolutePosition,
  ySyncPluginKey,
} from '@tiptap/y-tiptap'
import type * as Y from 'yjs'

interface Binding {
  doc: Y.Doc
  type: Y.XmlFragment
  mapping: Parameters<typeof absolutePositionToRelativePosition>[2]
}

export interface Standing {
  hasFocus: boolean
  isNode: boolean
  anchor: unknown
  head: unknown
  scroll: number
}

const bindingOf = (editor: Editor): Binding | undefined => {
  const state: { binding?: Binding } | undefined = ySyncPluginKey.getState(editor.state)
  return state?.binding
}

export const standingOf = (editor: Editor): Standing | undefined => {
  const binding = bindingOf(editor)
  if (!binding || editor.isDestroyed) return undefined
  const { selection } = editor.state
  const relative = (position: number): unknown =>
    absolutePositionToRelativePosition(position, binding.type, binding.mapping)
  return {
    hasFocus: editor.view.hasFocus(),
    isNode: selection instanceof NodeSelection,
    anchor: relative(selection.anchor),
    head: relative(selection.head),
    scroll: window.scrollY,
  }
}

/** A place that is gone with what stood there leaves the caret where the editor puts it. */
export const standAgain = (editor: Editor, { hasFocus, isNode, anchor, head, scroll }: Standing): void => {
  const binding = bindingOf(editor)
  if (!binding) return
  const { state, view } = editor
  const absolute = (position: unknown): number | null =>
    relativePositionToAbsolutePosition(binding.doc, binding.type, position, binding.mapping)
  const from = absolute(anchor)
  const to = absolute(head) ?? from
  if (from !== null && to !== null && Math.max(from, to) <= state.doc.content.size) {
    const isLine = isNode && state.doc.nodeAt(from) !== null
    const selection: Selection = isLine
      ? NodeSelection.create(state.doc, from)
      : TextSelection.between(state.doc.resolve(from), state.doc.resolve(to))
    view.dispatch(state.tr.setSelection(selection))
  }
  if (hasFocus) view.focus()
  window.scrollTo({ top: scroll, behavior: 'instant' })
}
