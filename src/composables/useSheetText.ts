import type { Command } from '@tiptap/pm/state'
import { computed } from 'vue'
import { changeText, proseState, type ProseState, type TextAct } from '@/editor/commands/prose'
import { insertTable } from '@/editor/commands/tables'
import { useSheet } from './useSheet'

/** The running text at the caret, and what can be done with it. Text stays open while the connection is lost. */
export const useSheetText = () => {
  const { editor, stepCount, textQuestion, connection, say } = useSheet()

  /** A new object only where something differs: most keystrokes change nothing in the bar. */
  const state = computed<ProseState | undefined>((before) => {
    void stepCount.value
    const now = editor.value && connection.mayWrite.value ? proseState(editor.value) : undefined
    return JSON.stringify(now) === JSON.stringify(before) ? before : now
  })

  const command = (run: Command): void => {
    const view = editor.value?.view
    if (!view) return
    run(view.state, view.dispatch)
    view.focus()
  }

  const act = (what: TextAct): void => {
    const page = editor.value
    if (!page || !connection.mayWrite.value) return
    if (what === 'table' && !state.value?.isInTable) return command(insertTable)
    if (!state.value) return say('Put the caret into the text first.')
    if (what === 'link' || what === 'table') textQuestion.value = what
    else changeText(page, what)
  }

  return { state, act, command }
}
