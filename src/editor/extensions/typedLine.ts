import { Extension } from '@tiptap/core'
import { Plugin, PluginKey, TextSelection, type EditorState } from '@tiptap/pm/state'
import { Decoration, DecorationSet, type EditorView } from '@tiptap/pm/view'
import type { CompactFields, CompactReading } from '@shared/engine/parse/shorthand'
import type { Acts } from '../acts'
import { element } from '../element'
import { typeset } from '../katex'

/** What a paragraph that is being typed would give. */
export interface TypedPreview {
  tex?: string
  plain: string
  problem?: string
}

export interface Typing {
  /** How a whole paragraph reads; `none` for ordinary text. */
  read: (text: string) => CompactReading
  /** What the line would give in this sheet; null when it cannot be said. */
  preview: (compact: CompactFields) => Promise<TypedPreview | null>
}

interface Shown {
  text: string
  preview: TypedPreview
}

const key = new PluginKey<Shown | null>('typedLine')
const pauseMs = 120

/** The paragraph of the page in which the caret stands, where it holds nothing but text. */
const paragraphAt = ({
  selection,
}: EditorState): { index: number; text: string; end: number } | undefined => {
  const { $from, empty } = selection
  if (
    !(selection instanceof TextSelection) ||
    !empty ||
    $from.depth !== 1 ||
    $from.parent.type.name !== 'paragraph'
  )
    return undefined
  const { parent } = $from
  if (parent.childCount !== 1 || !parent.firstChild?.isText) return undefined
  return { index: $from.index(0), text: parent.textContent.trim(), end: $from.after(1) }
}

const drawPreview = ({ tex, plain, problem }: TypedPreview): HTMLElement => {
  const shown = element('span', { class: 'typed__result', 'aria-hidden': 'true' }, plain)
  if (tex) typeset(shown, tex)
  return element(
    'div',
    { class: 'typed', contenteditable: 'false' },
    problem ? element('span', { class: 'typed__problem' }, problem) : shown,
    element('span', { class: 'typed__hint' }, 'Enter makes a line'),
  )
}

/** Shows the result while a line is typed in a paragraph; Enter makes the line, and only Enter. */
export const typedLine = (acts: Acts, typing: Typing) =>
  Extension.create({
    name: 'typedLine',
    priority: 1500,

    addKeyboardShortcuts() {
      return {
        Enter: ({ editor }) => {
          const paragraph = paragraphAt(editor.state)
          if (!paragraph || !acts.mayEdit()) return false
          const reading = typing.read(paragraph.text)
          if (reading.reading === 'none') return false
          if (reading.reading === 'line') acts.makeLine(paragraph.index, reading.line, paragraph.text)
          else acts.askKind(paragraph.index, reading.given, reading.formula, paragraph.text)
          return true
        },
      }
    },

    addProseMirrorPlugins() {
      let timer: ReturnType<typeof setTimeout> | undefined

      const look = (view: EditorView): void => {
        const paragraph = paragraphAt(view.state)
        const shown = key.getState(view.state)
        const clear = () => shown && view.dispatch(view.state.tr.setMeta(key, null))
        if (!paragraph || paragraph.text === shown?.text) return paragraph ? undefined : void clear()
        const reading = typing.read(paragraph.text)
        if (reading.reading !== 'line') return void clear()
        void typing.preview(reading.line).then((preview) => {
          if (view.isDestroyed || paragraphAt(view.state)?.text !== paragraph.text) return
          view.dispatch(view.state.tr.setMeta(key, preview && { text: paragraph.text, preview }))
        })
      }

      return [
        new Plugin<Shown | null>({
          key,
          state: {
            init: () => null,
            apply: (transaction, before) => {
              const said: unknown = transaction.getMeta(key)
              return said === undefined ? before : (said as Shown | null)
            },
          },
          props: {
            decorations: (state) => {
              const shown = key.getState(state)
              const paragraph = shown ? paragraphAt(state) : undefined
              if (!shown || !paragraph) return null
              return DecorationSet.create(state.doc, [
                Decoration.widget(paragraph.end, () => drawPreview(shown.preview), {
                  side: -1,
                  key: `${shown.text}|${shown.preview.plain}|${shown.preview.problem ?? ''}`,
                }),
              ])
            },
          },
          view: () => ({
            update: (view, before) => {
              if (before.doc.eq(view.state.doc) && before.selection.eq(view.state.selection)) return
              clearTimeout(timer)
              timer = setTimeout(() => look(view), pauseMs)
            },
            destroy: () => clearTimeout(timer),
          }),
        }),
      ]
    },
  })
