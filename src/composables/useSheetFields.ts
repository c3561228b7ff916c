import { computed, onScopeDispose, shallowReactive, watch, type ComputedRef } from 'vue'
import type { Problem } from '@shared/errors/problem'
import { setField, setFront } from '@shared/sheet/edits'
import { authoredText } from '@/editor/nodeViews/problems'
import { useSheet } from './useSheet'

export interface SheetFields {
  /** What a field shows: what is being typed, else what stands in the sheet. */
  text: (path: string) => string
  /** A key was pressed in a field: the first takes the pen, and what was typed is written once it is granted. */
  type: (path: string, text: string) => void
  /** Writes a value that is no text, such as a choice. */
  set: (path: string, value: unknown) => void
  problemsOf: (path: string) => Problem[]
  /** Problems that name no field of this form. */
  otherProblems: (paths: readonly string[]) => Problem[]
  isClosed: ComputedRef<boolean>
  whyClosed: ComputedRef<string>
}

/** Typing in one line's fields is one step of undo once they are left. */
const wholeSessionMs = 3_600_000
const ordinaryMs = 500

const NOT_WRITTEN = 'A colleague held the pen while you typed here.'

/**
 * The fields of one line. Nothing is written before the pen is granted; what was typed meanwhile stays in
 * the field, and it stays there, too, where the pen is refused.
 */
export const useSheetFields = (id: string): SheetFields => {
  const { connection, content, engine, pens, desk, say } = useSheet()
  const typed = shallowReactive(new Map<string, unknown>())
  let isAsking = false
  let isLeft = false

  const written = (path: string): string => {
    const line = content.lines.get(id)
    return line ? (authoredText(line, path) ?? '') : ''
  }

  const write = (): void => {
    for (const [path, value] of typed) setField(connection.doc.value, id, path, value, connection.origin)
    content.refresh()
    typed.clear()
    connection.holdField(null)
  }

  /** Nothing typed disappears without its author's word: what could not be written is shown to them. */
  const keepAsDraft = (): void => {
    const fields = [...typed].map(([path, value]) => ({ key: id, field: path, before: written(path), value }))
    typed.clear()
    connection.holdField(null)
    void connection.keepAsDraft(NOT_WRITTEN, fields)
  }

  const put = async (path: string, value: unknown): Promise<void> => {
    connection.holdField({ key: id, field: path, before: written(path), value })
    typed.set(path, value)
    if (connection.pens.isMine(id)) {
      connection.pens.touch([id])
      return write()
    }
    if (isAsking) return
    isAsking = true
    const isGranted = await connection.pens.take([id])
    isAsking = false
    if (isGranted) {
      write()
      if (isLeft) connection.pens.release([id])
      return
    }
    // The connection went meanwhile, and what was typed is a draft by now.
    if (typed.size === 0) return
    if (isLeft) return keepAsDraft()
    const holder = pens.holder(id)
    say(
      holder
        ? `${holder.name} is writing in this line. What you typed stays in the field.`
        : 'The pen of this line could not be had.',
    )
  }

  const manager = connection.undoManager.value
  manager.stopCapturing()
  manager.captureTimeout = wholeSessionMs
  connection.standAt({ key: id })

  // What stood in the field is among the drafts by now, and the sheet shows what is stored.
  const stopWatching = watch(connection.linesOpen, (isOpen) => {
    if (isOpen) return
    typed.clear()
    desk.close()
  })

  onScopeDispose(() => {
    stopWatching()
    manager.captureTimeout = ordinaryMs
    manager.stopCapturing()
    connection.standAt(null)
    isLeft = true
    if (typed.size > 0 && !isAsking) keepAsDraft()
    if (connection.pens.isMine(id)) connection.pens.release([id])
  })

  const whyClosed = computed((): string => {
    if (!connection.linesOpen.value)
      return 'The connection is lost. Fields open again when it is back; what stands here is kept.'
    const holder = pens.holder(id)
    return holder && !holder.isMine ? `${holder.name} is writing in this line.` : ''
  })

  const problems = (): Problem[] => [
    ...(content.fieldProblems.get(id) ?? []),
    ...(engine.results.get(id)?.problems ?? []),
  ]
  const isAt = (path: string, { span }: Problem): boolean =>
    span?.field === path || (span?.field.startsWith(`${path}.`) ?? false)

  return {
    text: (path) => {
      const value = typed.get(path)
      return typeof value === 'string' ? value : written(path)
    },
    type: (path, text) => void put(path, text),
    set: (path, value) => void put(path, value),
    problemsOf: (path) => problems().filter((problem) => isAt(path, problem)),
    otherProblems: (paths) => problems().filter((problem) => !paths.some((path) => isAt(path, problem))),
    isClosed: computed(() => whyClosed.value !== ''),
    whyClosed,
  }
}

export type FrontTextName = 'purpose' | 'method' | 'conclusion'

/** One of the front texts, with its pen. */
export const useFrontText = (name: FrontTextName) => {
  const { connection, content, pens, say } = useSheet()
  const key = `front:${name}`
  const typed = shallowReactive({ text: undefined as string | undefined })
  let isAsking = false
  let isLeft = false

  const write = (): void => {
    if (typed.text !== undefined) setFront(connection.doc.value, name, typed.text, connection.origin)
    content.refresh()
    typed.text = undefined
    connection.holdField(null)
  }

  const keepAsDraft = (): void => {
    const value = typed.text
    typed.text = undefined
    connection.holdField(null)
    if (value === undefined) return
    const before = content.front.value[name]
    void connection.keepAsDraft(NOT_WRITTEN, [{ key, field: 'text', before, value }])
  }

  const type = async (text: string): Promise<void> => {
    connection.holdField({ key, field: 'text', before: content.front.value[name], value: text })
    typed.text = text
    if (connection.pens.isMine(key)) {
      connection.pens.touch([key])
      return write()
    }
    if (isAsking) return
    isAsking = true
    const isGranted = await connection.pens.take([key])
    isAsking = false
    if (isGranted) {
      write()
      if (isLeft) leave()
      return
    }
    if (typed.text === undefined) return
    if (isLeft) return keepAsDraft()
    say('A colleague is writing this text. What you typed stays in the field.')
  }

  // What stood in the field is among the drafts by now.
  watch(connection.linesOpen, (isOpen) => {
    if (!isOpen) typed.text = undefined
  })

  const enter = (): void => {
    isLeft = false
  }
  const leave = (): void => {
    isLeft = true
    if (!isAsking) keepAsDraft()
    connection.undoManager.value.stopCapturing()
    if (connection.pens.isMine(key)) connection.pens.release([key])
  }

  return {
    text: computed(() => typed.text ?? content.front.value[name]),
    holder: computed(() => pens.holder(key)),
    type,
    enter,
    leave,
  }
}
