import { Extension, type Editor } from '@tiptap/core'
import { GapCursor } from '@tiptap/pm/gapcursor'
import { NodeSelection, Plugin, type Selection } from '@tiptap/pm/state'
import type { EditorView } from '@tiptap/pm/view'
import type { Acts } from '../acts'
import { nextRow } from '../commands/tables'
import { BlockRange, selectBlockAt, selectedLineIds } from './lineRange'

const isLineSelection = (selection: Selection): boolean =>
  selection instanceof BlockRange ||
  (selection instanceof NodeSelection && selection.node.type.name === 'line')

const headBlock = (selection: Selection): number =>
  selection instanceof BlockRange ? selection.$headBlock.pos : selection.from

const neighbour = (view: EditorView, position: number, by: 1 | -1): number | undefined => {
  const $at = view.state.doc.resolve(position)
  if (by > 0) {
    const end = position + ($at.nodeAfter?.nodeSize ?? 0)
    return end < view.state.doc.content.size ? end : undefined
  }
  return $at.nodeBefore ? position - $at.nodeBefore.nodeSize : undefined
}

const goTo = ({ view }: Editor, by: 1 | -1): boolean => {
  const { selection, tr } = view.state
  if (!isLineSelection(selection)) return false
  const next = neighbour(view, headBlock(selection), by)
  if (next === undefined) {
    // Before the first or after the last line there is a place for the caret.
    const edge = by < 0 ? 0 : view.state.doc.content.size
    const $edge = view.state.doc.resolve(edge)
    view.dispatch(tr.setSelection(new GapCursor($edge)).scrollIntoView())
    return true
  }
  view.dispatch(selectBlockAt(tr, next, by).scrollIntoView())
  return true
}

const extend = ({ view }: Editor, by: 1 | -1): boolean => {
  const { selection, doc, tr } = view.state
  if (!isLineSelection(selection)) return false
  const head = headBlock(selection)
  const next = neighbour(view, head, by)
  if (next === undefined) return true
  const anchor = selection instanceof BlockRange ? selection.$anchorBlock.pos : selection.from
  view.dispatch(tr.setSelection(BlockRange.between(doc, anchor, next)).scrollIntoView())
  return true
}

/** From prose into a line: ↓ at the last row of a paragraph selects the line below it. */
const enterLine = ({ view }: Editor, by: 1 | -1): boolean => {
  const { selection, doc, tr } = view.state
  if (!selection.empty || isLineSelection(selection)) return false
  if (selection instanceof GapCursor) {
    const { $from } = selection
    const node = by > 0 ? $from.nodeAfter : $from.nodeBefore
    if (node?.type.name !== 'line') return false
    const at = by > 0 ? $from.pos : $from.pos - node.nodeSize
    view.dispatch(tr.setSelection(NodeSelection.create(doc, at)).scrollIntoView())
    return true
  }
  const { $from } = selection
  if ($from.depth !== 1 || !view.endOfTextblock(by > 0 ? 'down' : 'up')) return false
  const edge = by > 0 ? $from.after(1) : $from.before(1)
  const $edge = doc.resolve(edge)
  const node = by > 0 ? $edge.nodeAfter : $edge.nodeBefore
  if (node?.type.name !== 'line') return false
  view.dispatch(
    tr.setSelection(NodeSelection.create(doc, by > 0 ? edge : edge - node.nodeSize)).scrollIntoView(),
  )
  return true
}

/** Backspace or Delete at the edge of a paragraph beside a line selects it; it never goes unseen. */
const selectBeside = ({ view }: Editor, by: 1 | -1): boolean => {
  const { selection, doc, tr } = view.state
  if (!selection.empty || isLineSelection(selection)) return false
  const { $from } = selection
  const isGap = selection instanceof GapCursor
  if (
    !isGap &&
    ($from.depth !== 1 || (by < 0 ? $from.parentOffset > 0 : $from.parentOffset < $from.parent.content.size))
  ) {
    return false
  }
  const edge = isGap ? $from.pos : by < 0 ? $from.before(1) : $from.after(1)
  const $edge = doc.resolve(edge)
  const node = by < 0 ? $edge.nodeBefore : $edge.nodeAfter
  if (node?.type.name !== 'line') return false
  const at = by < 0 ? edge - node.nodeSize : edge
  const isEmptyParagraph = !isGap && $from.parent.content.size === 0 && doc.childCount > 1
  const cleared = isEmptyParagraph ? tr.delete($from.before(1), $from.after(1)) : tr
  view.dispatch(
    cleared.setSelection(NodeSelection.create(cleared.doc, cleared.mapping.map(at))).scrollIntoView(),
  )
  return true
}

/** The keys of the sheet and of its lines. */
export const sheetKeys = (acts: Acts) =>
  Extension.create({
    name: 'sheetKeys',
    // Before every other extension: the keys of a selected line are these and no others.
    priority: 2000,

    addKeyboardShortcuts() {
      const onLines = (act: (ids: string[]) => void) => (): boolean => {
        const ids = selectedLineIds(this.editor.state.selection)
        if (ids.length === 0 || !acts.mayEdit()) return false
        act(ids)
        return true
      }
      const open = onLines(([id]) => id !== undefined && acts.edit(id))
      return {
        'Mod-z': () => (acts.undo(), true),
        'Mod-y': () => (acts.redo(), true),
        'Mod-Shift-z': () => (acts.redo(), true),
        'Mod-Enter': () => (acts.openCommands(), true),
        'Mod-k': ({ editor }) => {
          if (!editor.isEditable || isLineSelection(editor.state.selection)) return false
          acts.openLink()
          return true
        },
        ArrowDown: ({ editor }) => goTo(editor, 1) || enterLine(editor, 1),
        ArrowUp: ({ editor }) => goTo(editor, -1) || enterLine(editor, -1),
        'Shift-ArrowDown': ({ editor }) => extend(editor, 1),
        'Shift-ArrowUp': ({ editor }) => extend(editor, -1),
        'Alt-Shift-ArrowDown': onLines((ids) => acts.move(ids, 1)),
        'Alt-Shift-ArrowUp': onLines((ids) => acts.move(ids, -1)),
        Enter: ({ editor }) => open() || nextRow(editor.state, editor.view.dispatch),
        F2: open,
        Delete: ({ editor }) => onLines((ids) => acts.remove(ids))() || selectBeside(editor, 1),
        Backspace: ({ editor }) => onLines((ids) => acts.remove(ids))() || selectBeside(editor, -1),
      }
    },

    addProseMirrorPlugins() {
      return [
        new Plugin({
          props: {
            // A printable key never replaces a selected line; nor does an input method.
            handleTextInput: (view) => isLineSelection(view.state.selection),
            handleKeyPress: (view, event) =>
              isLineSelection(view.state.selection) &&
              !event.ctrlKey &&
              !event.metaKey &&
              event.key.length === 1,
            handleDOMEvents: {
              beforeinput: (view, event) => {
                if (!isLineSelection(view.state.selection)) return false
                event.preventDefault()
                return true
              },
            },
          },
        }),
      ]
    },
  })
