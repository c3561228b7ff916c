import type { Editor } from '@tiptap/core'
import {
  computed,
  inject,
  provide,
  shallowRef,
  type ComputedRef,
  type InjectionKey,
  type ShallowRef,
} from 'vue'
import type { LineId } from '@shared/errors/problem'
import type { SheetConnection } from '@/collaboration/sheetConnection'
import type { EngineChannel } from '@/workers/engineClient'
import { useNoticeStore } from '@/stores/notices'
import { useSheetActs, type SheetActs } from './useSheetActs'
import { useSheetContent, type SheetContent } from './useSheetContent'
import { useSheetDesk, type LineMenu, type SheetDesk } from './useSheetDesk'
import { useSheetEditor } from './useSheetEditor'
import { useSheetEngine, type SheetEngineState } from './useSheetEngine'
import { useSheetNumbers, type SheetNumbers } from './useSheetNumbers'
import { useSheetPens, type SheetPens } from './useSheetPens'
import { useSheetTyping } from './useSheetTyping'

/** Everything about the sheet that is open, for the components that show it. */
export interface OpenSheet {
  connection: SheetConnection
  content: SheetContent
  engine: SheetEngineState
  numbers: SheetNumbers
  pens: SheetPens
  acts: SheetActs
  desk: SheetDesk
  editor: ShallowRef<Editor | undefined>
  /** Element of the page; the editor is made when it is there. */
  pageHost: ShallowRef<HTMLElement | undefined>
  selectionCount: ShallowRef<number>
  stepCount: ShallowRef<number>
  /** What the bar of the text is asked to open: its question for a link, its menu for a table. */
  textQuestion: ShallowRef<'link' | 'table' | undefined>
  openLine: ShallowRef<LineId | undefined>
  menu: ShallowRef<LineMenu | undefined>
  commandsShown: ShallowRef<boolean>
  /** What is chosen from a list in place of the commands: a symbol to quote, a line to refer to. */
  picking: ShallowRef<'quote' | 'reference' | undefined>
  /** May lines be written in now: by right, and while connected. */
  mayEdit: ComputedRef<boolean>
  say: (text: string, action?: { label: string; act: () => void }) => void
}

const key: InjectionKey<OpenSheet> = Symbol('open sheet')

/** Puts a sheet on the screen over its connection and hands it to everything below. */
export const provideSheet = (
  connection: SheetConnection,
  me: { name: string },
  openChannel?: () => EngineChannel,
): OpenSheet => {
  const notices = useNoticeStore()
  const say: OpenSheet['say'] = (text, action) => notices.say(text, action)
  const editor = shallowRef<Editor>()
  const openLine = shallowRef<LineId>()
  const menu = shallowRef<LineMenu>()
  const commandsShown = shallowRef(false)
  const picking = shallowRef<'quote' | 'reference'>()
  const textQuestion = shallowRef<'link' | 'table'>()
  const mayEdit = computed(() => connection.mayWrite.value && connection.linesOpen.value)

  const content = useSheetContent(connection.doc)
  const engine = useSheetEngine(content, openChannel)
  const numbers = useSheetNumbers(content)
  const pens = useSheetPens(connection, say)
  const acts = useSheetActs({
    connection,
    content,
    engine,
    numbers,
    pens,
    editor,
    openLine,
    mayEdit: () => mayEdit.value,
    openCommands: () => (commandsShown.value = true),
    openLink: () => (textQuestion.value = 'link'),
    say,
  })
  const desk = useSheetDesk({ connection, content, engine, numbers, pens, acts, openLine, menu })
  const typing = useSheetTyping(content, engine, numbers)
  const { host, selectionCount, stepCount } = useSheetEditor({
    connection,
    editor,
    desk,
    acts,
    typing,
    me,
    mayEdit: connection.mayWrite,
  })

  const sheet: OpenSheet = {
    connection,
    content,
    engine,
    numbers,
    pens,
    acts,
    desk,
    editor,
    pageHost: host,
    selectionCount,
    stepCount,
    textQuestion,
    openLine,
    menu,
    commandsShown,
    picking,
    mayEdit,
    say,
  }
  provide(key, sheet)
  return sheet
}

/** The sheet above this component. */
export const useSheet = (): OpenSheet => {
  const sheet = inject(key)
  if (!sheet) throw new Error('useSheet: no sheet is provided above this component')
  return sheet
}
