import type { Editor } from '@tiptap/core'
import { GapCursor } from '@tiptap/pm/gapcursor'
import { NodeSelection, TextSelection } from '@tiptap/pm/state'
import { shallowRef, type ShallowRef } from 'vue'
import type { CompactFields } from '@shared/engine/parse/shorthand'
import type { LineId, Problem, Repair } from '@shared/errors/problem'
import { documentParts } from '@shared/sheet/document'
import {
  asOneStep,
  duplicateLine,
  freeSymbol,
  insertLine,
  newId,
  placeOfLine,
  restoreLine,
  separateRepeatedLine,
  setFields,
} from '@shared/sheet/edits'
import type { Line, LineKind } from '@shared/sheet/kinds'
import { blockElement } from '@shared/sheet/pageWriting'
import type { SheetConnection } from '@/collaboration/sheetConnection'
import type { Acts } from '@/editor/acts'
import { keepAsText, replaceBlockByLine } from '@/editor/commands/makeLine'
import { moveLines } from '@/editor/commands/moveLines'
import { newLine, typedLine } from '@/editor/commands/newLine'
import { deletionNotice, removeLines, usersOf } from '@/editor/commands/removeLines'
import { BlockRange } from '@/editor/extensions/lineRange'
import { copyLines, pastedBlocks } from './lineTransfer'
import type { SheetContent } from './useSheetContent'
import type { SheetEngineState } from './useSheetEngine'
import type { SheetNumbers } from './useSheetNumbers'
import type { SheetPens } from './useSheetPens'

export interface KindQuestion {
  index: number
  given: CompactFields
  formula: CompactFields
  text: string
}

/** A line that was just made of a typed paragraph: it can be kept as text. */
export interface MadeLine {
  id: LineId
  kind: LineKind
  text: string
}

export interface SheetActsParts {
  connection: SheetConnection
  content: SheetContent
  engine: SheetEngineState
  numbers: SheetNumbers
  pens: SheetPens
  editor: ShallowRef<Editor | undefined>
  openLine: ShallowRef<LineId | undefined>
  mayEdit: () => boolean
  openCommands: () => void
  openLink: () => void
  say: (text: string, action?: { label: string; act: () => void }) => void
}

export interface SheetActs extends Acts {
  repair: (problem: Problem, repair: Repair) => void
  select: (id: LineId) => void
  keepAsText: () => void
  chooseKind: (compact: CompactFields) => void
  insertAfter: (id: LineId, kind: LineKind) => void
  /** An empty paragraph after a line, with the caret in it. */
  insertTextAfter: (id: LineId) => void
  /** Puts a line that was set aside at the end of the page. */
  restore: (id: LineId) => void
  replaceByLine: (index: number, line: Line) => void
  question: ShallowRef<KindQuestion | undefined>
  made: ShallowRef<MadeLine | undefined>
  /** Whether the symbol is what is to be looked at first in the line that is opened. */
  opensSymbol: ShallowRef<boolean>
}

/** Carries out what a person does with lines: one act, one step of undo, with the pens it needs. */
export const useSheetActs = (parts: SheetActsParts): SheetActs => {
  const { connection, content, engine, numbers, pens, editor, openLine, say } = parts
  const question = shallowRef<KindQuestion>()
  const made = shallowRef<MadeLine>()
  const opensSymbol = shallowRef(false)
  const doc = () => connection.doc.value

  /** What is done is undone as one step, apart from what was typed before and after. */
  const step = <Result>(act: () => Result): Result => {
    connection.undoManager.value.stopCapturing()
    const result = asOneStep(doc(), connection.origin, act)
    connection.undoManager.value.stopCapturing()
    content.refresh()
    return result
  }

  const positionOf = (index: number): number => {
    let position = 0
    editor.value?.state.doc.forEach((_, offset, at) => {
      if (at === index) position = offset
    })
    return position
  }

  const select = (id: LineId): void => {
    const view = editor.value?.view
    const index = placeOfLine(doc(), id)
    if (!view || index < 0) return
    const transaction = view.state.tr.setSelection(NodeSelection.create(view.state.doc, positionOf(index)))
    view.dispatch(transaction.scrollIntoView())
    view.focus()
  }

  const placeCaret = (index: number): void => {
    const view = editor.value?.view
    if (!view) return
    const at = view.state.doc.resolve(Math.min(positionOf(index) + 1, view.state.doc.content.size))
    view.dispatch(view.state.tr.setSelection(TextSelection.near(at)).scrollIntoView())
    view.focus()
  }

  const close = (): void => {
    const id = openLine.value
    if (id === undefined) return
    openLine.value = undefined
    select(id)
  }

  const edit = (id: LineId): void => {
    if (!parts.mayEdit()) return
    made.value = undefined
    opensSymbol.value = false
    openLine.value = id
  }

  /** Where a new line goes: after the selected block; an empty paragraph gives way to it. */
  const insertionPoint = (): { index: number; replaces: boolean } => {
    const state = editor.value?.state
    const length = documentParts(doc()).page.length
    if (!state) return { index: length, replaces: false }
    const { selection } = state
    if (selection instanceof GapCursor) return { index: selection.$from.index(0), replaces: false }
    if (selection instanceof NodeSelection || selection instanceof BlockRange)
      return { index: selection.$to.index(0), replaces: false }
    const { $from } = selection
    const isEmpty =
      $from.depth === 1 && $from.parent.type.name === 'paragraph' && $from.parent.content.size === 0
    return { index: $from.index(0) + (isEmpty ? 0 : 1), replaces: isEmpty }
  }

  const insertAt = (index: number, line: Line, replaces: boolean): void => {
    const id = step(() => {
      const given = insertLine(doc(), line, { index }, connection.origin)
      const { page } = documentParts(doc())
      // After the last line of the sheet there is always a place to go on writing.
      const isLast = index + (replaces ? 2 : 1) === page.length
      if (replaces && !isLast) page.delete(index + 1)
      if (!replaces && isLast) page.insert(index + 1, [blockElement({ type: 'paragraph', content: [] })])
      return given
    })
    select(id)
    edit(id)
  }

  const insert = (kind: LineKind): void => {
    const { index, replaces } = insertionPoint()
    insertAt(index, newLine(numbers.sheet.value, kind), replaces)
  }

  const makeLine = (index: number, compact: CompactFields, text: string): void => {
    const line = typedLine(numbers.sheet.value, compact)
    const { id, next } = step(() => replaceBlockByLine(doc(), index, line, connection.origin))
    made.value = { id, kind: line.kind, text }
    question.value = undefined
    placeCaret(next)
  }

  return {
    question,
    made,
    opensSymbol,
    edit,
    close,
    select,
    insert,
    mayEdit: parts.mayEdit,
    openCommands: parts.openCommands,
    openLink: parts.openLink,
    makeLine,
    insertAfter: (id, kind) =>
      insertAt(placeOfLine(doc(), id) + 1, newLine(numbers.sheet.value, kind), false),
    replaceByLine: (index, line) =>
      step(() => void replaceBlockByLine(doc(), index, line, connection.origin)),
    insertTextAfter: (id) => {
      const index = placeOfLine(doc(), id) + 1
      step(() => documentParts(doc()).page.insert(index, [blockElement({ type: 'paragraph', content: [] })]))
      placeCaret(index)
    },
    restore: (id) => {
      step(() => restoreLine(doc(), id, { index: documentParts(doc()).page.length }, connection.origin))
      select(id)
    },
    askKind: (index, given, formula, text) => (question.value = { index, given, formula, text }),
    chooseKind: (compact) => question.value && makeLine(question.value.index, compact, question.value.text),
    keepAsText: () => {
      const line = made.value
      if (!line) return
      const index = placeOfLine(doc(), line.id)
      made.value = undefined
      if (index < 0) return
      void pens.withPens([line.id], () => step(() => keepAsText(doc(), index, line.text, connection.origin)))
      placeCaret(index)
    },
    insertHeading: () => {
      const { index, replaces } = insertionPoint()
      step(() => {
        const { page } = documentParts(doc())
        const above = content.blocks.value.slice(0, index).findLast((block) => block.type === 'heading')
        const level = above?.type === 'heading' ? above.level : 1
        page.insert(index, [blockElement({ type: 'heading', id: newId(), level, content: [] })])
        if (replaces) page.delete(index + 1)
      })
      placeCaret(index)
    },
    move: (ids, by) =>
      void pens.withPens(ids, () => {
        step(() => moveLines(doc(), ids, by, connection.origin))
        const [first] = ids
        if (ids.length === 1 && first !== undefined) select(first)
      }),
    remove: (ids) =>
      void pens.withPens(ids, () => {
        const users = usersOf(ids, engine.results)
        const [first = ''] = ids
        const index = placeOfLine(doc(), first)
        if (openLine.value !== undefined && ids.includes(openLine.value)) openLine.value = undefined
        step(() => removeLines(doc(), ids, connection.origin))
        say(deletionNotice(ids.length, users), { label: 'Undo', act: () => void connection.undo() })
        const next = content.order.value.find((id) => placeOfLine(doc(), id) >= index)
        if (next !== undefined && placeOfLine(doc(), next) === index) select(next)
      }),
    duplicate: (id) => {
      const line = content.lines.get(id)
      if (!line) return
      const symbol = freeSymbol(numbers.sheet.value, line.symbol)
      const copy = step(() => duplicateLine(doc(), id, symbol, connection.origin))
      if (copy !== undefined) edit(copy)
    },
    copy: (ids, clipboard) =>
      copyLines(
        ids.flatMap((id) => content.lines.get(id) ?? []),
        clipboard,
      ),
    paste: (clipboard, index) => {
      const pasted = pastedBlocks(clipboard, numbers.sheet.value)
      if (!pasted) return false
      step(() => pasted.insert(doc(), { index }, connection.origin))
      if (pasted.opens !== undefined) {
        edit(pasted.opens)
        opensSymbol.value = true
      } else if (pasted.last !== undefined) select(pasted.last)
      const [problem] = pasted.problems
      if (problem) say(problem.message)
      return true
    },
    repair: (problem, repair) => {
      const id = repair.lineId ?? problem.lineId
      if (id === undefined) return
      if (problem.code === 'repeated-line') {
        step(() => separateRepeatedLine(doc(), id, connection.origin))
        return
      }
      void pens.withPens([id], () => step(() => setFields(doc(), id, repair.fields, connection.origin)))
    },
    undo: () => {
      made.value = undefined
      void connection.undo().then((outcome) => {
        if (outcome === 'skipped') say('That step was left out: a colleague has changed its line since.')
        if (outcome === 'pen-of-another') say('A colleague is writing in that line. Try again in a minute.')
      })
    },
    redo: () => void connection.redo(),
  }
}
