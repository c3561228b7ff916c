import { TextSelection } from '@tiptap/pm/state'
import { computed } from 'vue'
import type { LineId } from '@shared/errors/problem'
import type { Command } from '@/editor/commands/commandTable'
import { findProblem, problemsInOrder } from '@/editor/commands/findProblem'
import { selectedLineIds } from '@/editor/extensions/lineRange'
import { useSheet } from './useSheet'
import { useSheetText } from './useSheetText'

/** Problems of the open sheet in reading order. */
export const useSheetProblems = () => {
  const { content, engine } = useSheet()
  const problems = computed(() => problemsInOrder(content.order.value, engine.results, content.fieldProblems))
  const troubled = computed(() => new Set(problems.value.map(({ lineId }) => lineId)))
  return { problems, troubled }
}

/** Carries out the commands of the list. */
export const useSheetCommands = (showNomenclature: () => void) => {
  const { acts, editor, content, say } = useSheet()
  const { troubled } = useSheetProblems()
  const text = useSheetText()

  const here = (): LineId | undefined => {
    const state = editor.value?.state
    if (!state) return undefined
    const [selected] = selectedLineIds(state.selection)
    if (selected !== undefined) return selected
    let before: LineId | undefined
    state.doc.forEach((node, position) => {
      if (position < state.selection.from && node.type.name === 'line') before = String(node.attrs.id)
    })
    return before
  }

  const goToProblem = (by: 1 | -1): void => {
    const id = findProblem(content.order.value, troubled.value, here(), by)
    if (id === undefined) say('No line of this sheet has a problem.')
    else acts.select(id)
  }

  /** Puts an inline atom at the caret; beside a selected line there is no running text to put it in. */
  const insertInline = (type: 'quote' | 'reference', attrs: Record<string, string>): void => {
    const selection = editor.value?.state.selection
    const isInText = selection instanceof TextSelection && selection.$head.parent.isTextblock
    if (!isInText || !editor.value?.chain().focus().insertContent({ type, attrs }).run())
      say('Put the caret into a paragraph first.')
  }

  const run = (command: Command): void => {
    switch (command.does) {
      case 'insert':
        return acts.insert(command.kind)
      case 'text':
        return text.act(command.act)
      case 'heading':
        return acts.insertHeading()
      case 'nomenclature':
        return showNomenclature()
      case 'next-problem':
        return goToProblem(1)
      case 'previous-problem':
        return goToProblem(-1)
    }
  }

  return {
    run,
    goToProblem,
    quote: (symbol: string) => insertInline('quote', { symbol }),
    refer: (line: string) => insertInline('reference', { line }),
  }
}
