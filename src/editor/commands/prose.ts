/** What stands at the caret in running text, for the bar that changes it. */
import { getMarkRange, type Editor } from '@tiptap/core'
import { TextSelection } from '@tiptap/pm/state'
import { hasHeaderRow, tablePlace } from './tables'

export type TextStyle = 'paragraph' | 'heading-1' | 'heading-2' | 'heading-3'
export type HeadingLevel = 1 | 2 | 3
/** What can be done with the text at the caret; a link and a table inside ask further. */
export type TextAct =
  | TextStyle
  | 'bold'
  | 'italic'
  | 'code'
  | 'bullets'
  | 'numbers'
  | 'further-in'
  | 'further-out'
  | 'link'
  | 'table'

export interface ProseState {
  /** The kind of the paragraph at the caret; undefined in a table's cell. */
  style: TextStyle | undefined
  list: 'bullet' | 'numbered' | undefined
  isBold: boolean
  isItalic: boolean
  isCode: boolean
  /** Address of the link at the caret. */
  link: string | undefined
  /** Whether there are words a link could stand on without typing them. */
  hasWords: boolean
  isInTable: boolean
  hasHeaderRow: boolean
}

const headingStyles = { 1: 'heading-1', 2: 'heading-2', 3: 'heading-3' } as const

/** Undefined where the caret is not in running text: on a line, or between two. */
export const proseState = (editor: Editor): ProseState | undefined => {
  const { state } = editor
  const { selection } = state
  if (!(selection instanceof TextSelection) || !selection.$head.parent.isTextblock) return undefined
  const { parent } = selection.$head
  const place = tablePlace(state)
  const href: unknown = editor.getAttributes('link').href
  const level = Number(parent.attrs.level) as HeadingLevel
  return {
    style: place ? undefined : parent.type.name === 'heading' ? headingStyles[level] : 'paragraph',
    list: editor.isActive('bulletList') ? 'bullet' : editor.isActive('orderedList') ? 'numbered' : undefined,
    isBold: editor.isActive('bold'),
    isItalic: editor.isActive('italic'),
    isCode: editor.isActive('code'),
    link: typeof href === 'string' && href !== '' ? href : undefined,
    hasWords: !selection.empty,
    isInTable: place !== undefined,
    hasHeaderRow: place !== undefined && hasHeaderRow(place.table),
  }
}

const setStyle = (editor: Editor, style: TextStyle): void => {
  const level = style === 'paragraph' ? undefined : (Number(style.slice(-1)) as HeadingLevel)
  const chain = editor.chain().focus()
  // A heading in a list would be no heading of the sheet: it leaves the list first.
  if (level && editor.isActive('listItem')) chain.liftListItem('listItem')
  if (level) chain.setHeading({ level }).run()
  else chain.setParagraph().run()
}

/** The words under the link at the caret, or those that are selected. */
export const linkWords = ({ state }: Editor): string => {
  const { selection, doc, schema } = state
  const type = schema.marks.link
  const range = selection.empty && type ? getMarkRange(selection.$from, type) : undefined
  const { from, to } = range ?? selection
  return doc.textBetween(from, to, ' ')
}

/** Lays a link under the selected words or over the link at the caret; with neither, writes `words`. */
export const setLink = (editor: Editor, href: string, words: string): void => {
  const chain = editor.chain().focus()
  const isOnWords = !editor.state.selection.empty || editor.isActive('link')
  if (isOnWords && words === linkWords(editor)) chain.extendMarkRange('link').setLink({ href }).run()
  else
    chain
      .extendMarkRange('link')
      .insertContent({ type: 'text', text: words, marks: [{ type: 'link', attrs: { href } }] })
      .run()
}

export const removeLink = (editor: Editor): void => {
  editor.chain().focus().extendMarkRange('link').unsetLink().run()
}

const chained = (editor: Editor) => editor.chain().focus()
const plainActs: Record<Exclude<TextAct, TextStyle | 'link' | 'table'>, (editor: Editor) => void> = {
  bold: (editor) => chained(editor).toggleBold().run(),
  italic: (editor) => chained(editor).toggleItalic().run(),
  code: (editor) => chained(editor).toggleCode().run(),
  bullets: (editor) => chained(editor).toggleBulletList().run(),
  numbers: (editor) => chained(editor).toggleOrderedList().run(),
  'further-in': (editor) => chained(editor).sinkListItem('listItem').run(),
  'further-out': (editor) => chained(editor).liftListItem('listItem').run(),
}

/** Carries out what needs no further question. */
export const changeText = (editor: Editor, act: Exclude<TextAct, 'link' | 'table'>): void => {
  if (act in plainActs) plainActs[act as keyof typeof plainActs](editor)
  else setStyle(editor, act as TextStyle)
}
