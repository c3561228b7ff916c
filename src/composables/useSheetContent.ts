import { onScopeDispose, shallowReactive, shallowRef, watch, type ShallowRef } from 'vue'
import type { LineId, Problem } from '@shared/errors/problem'
import { documentParts, type DocumentParts } from '@shared/sheet/document'
import { readFields } from '@shared/sheet/documentFields'
import { placeOfLine } from '@shared/sheet/edits'
import { readFront } from '@shared/sheet/documentFront'
import type { Line } from '@shared/sheet/kinds'
import { readBlocks, type PageBlock } from '@shared/sheet/pageReading'
import { readLine } from '@shared/sheet/readLine'
import type { Front } from '@shared/sheet/sheet'
import type { SheetConnection } from '@/collaboration/sheetConnection'
import { useFrame } from './useFrame'

export interface SheetContent {
  /** Authored fields by id, of every line that stands on the page; a line is a new object when it changed. */
  lines: Map<LineId, Line>
  /** Fields that could not be read, by line. */
  fieldProblems: Map<LineId, Problem[]>
  /** Lines off the page in which somebody wrote after they had been removed: to be restored, or left out. */
  setAside: Map<LineId, Line>
  /** Lines in reading order, each once. */
  order: ShallowRef<LineId[]>
  blocks: ShallowRef<PageBlock[]>
  front: ShallowRef<Front>
  /** Whether the page has been read at least once. */
  isRead: ShallowRef<boolean>
  /** Reads at once what has changed; otherwise it is read once a frame. */
  refresh: () => void
}

const idsOf = (blocks: readonly PageBlock[]): LineId[] => {
  const ids = blocks.flatMap((block) =>
    block.type === 'place' && typeof block.id === 'string' && block.id ? [block.id] : [],
  )
  return [...new Set(ids)]
}

/** Two people moved a line at once: the second place can become a line of its own. */
const repeatedLine = (lineId: LineId): Problem => ({
  lineId,
  code: 'repeated-line',
  severity: 'error',
  message: 'This line stands on the page twice, as when two people move it at once. The first one counts.',
  repairs: [{ label: 'Make the second a line of its own', lineId, fields: {} }],
})

const repeatedIn = (blocks: readonly PageBlock[]): Set<LineId> => {
  const seen = new Set<unknown>()
  const repeated = new Set<LineId>()
  for (const block of blocks) {
    if (block.type !== 'place' || typeof block.id !== 'string') continue
    if (seen.has(block.id)) repeated.add(block.id)
    seen.add(block.id)
  }
  return repeated
}

type DeepListener = Parameters<DocumentParts['lines']['observeDeep']>[0]

/** Under an id there may be anything: a document is what people and older programs made of it. */
const isMap = (fields: unknown): fields is NonNullable<ReturnType<DocumentParts['lines']['get']>> =>
  typeof fields === 'object' && fields !== null && 'entries' in fields

/** The live document as plain data, read by line: a keystroke in one line reads that line again and no other. */
export const useSheetContent = (doc: SheetConnection['doc']): SheetContent => {
  const lines = shallowReactive(new Map<LineId, Line>())
  const fieldProblems = shallowReactive(new Map<LineId, Problem[]>())
  const setAside = shallowReactive(new Map<LineId, Line>())
  const order = shallowRef<LineId[]>([])
  const blocks = shallowRef<PageBlock[]>([])
  const front = shallowRef<Front>(readFront(documentParts(doc.value).front).front)
  const isRead = shallowRef(false)

  const changedLines = new Set<LineId>()
  const changedOffPage = new Set<LineId>()
  let repeated = new Set<LineId>()
  let isPageChanged = true
  let isFrontChanged = true

  const readOne = (id: LineId): void => {
    const fields = documentParts(doc.value).lines.get(id)
    if (!isMap(fields)) {
      lines.delete(id)
      fieldProblems.delete(id)
      return
    }
    const read = readLine(readFields(id, fields))
    if (read.line) lines.set(id, read.line)
    else lines.delete(id)
    const problems = repeated.has(id) ? [repeatedLine(id), ...read.problems] : read.problems
    if (problems.length > 0) fieldProblems.set(id, problems)
    else fieldProblems.delete(id)
  }

  const readPage = (): void => {
    blocks.value = readBlocks(documentParts(doc.value).page)
    const ids = idsOf(blocks.value)
    const before = repeated
    repeated = repeatedIn(blocks.value)
    for (const id of [...before, ...repeated]) if (before.has(id) !== repeated.has(id)) changedLines.add(id)
    const placed = new Set(ids)
    for (const id of lines.keys()) if (!placed.has(id)) lines.delete(id)
    for (const id of ids) if (!lines.has(id)) changedLines.add(id)
    if (ids.length !== order.value.length || ids.some((id, index) => order.value[index] !== id))
      order.value = ids
  }

  const readSetAside = (placed: ReadonlySet<LineId>): void => {
    for (const id of changedOffPage) {
      const fields = documentParts(doc.value).lines.get(id)
      const line = isMap(fields) && !placed.has(id) ? readLine(readFields(id, fields)).line : undefined
      if (line) setAside.set(id, line)
    }
    changedOffPage.clear()
    for (const id of setAside.keys()) if (placed.has(id)) setAside.delete(id)
  }

  const refresh = (): void => {
    if (isFrontChanged) front.value = readFront(documentParts(doc.value).front).front
    if (isPageChanged) readPage()
    const placed = new Set(order.value)
    for (const id of changedLines) if (placed.has(id)) readOne(id)
    changedLines.clear()
    readSetAside(placed)
    isPageChanged = isFrontChanged = false
    isRead.value = true
  }
  const frame = useFrame(refresh)

  const onLines: DeepListener = (events) => {
    for (const event of events) {
      const [id] = event.path
      if (typeof id === 'string') {
        changedLines.add(id)
        if ((isPageChanged || !lines.has(id)) && placeOfLine(doc.value, id) < 0) changedOffPage.add(id)
      } else for (const key of event.changes.keys.keys()) changedLines.add(key)
    }
    frame.request()
  }
  const onPage = (): void => {
    isPageChanged = true
    frame.request()
  }
  const onFront = (): void => {
    isFrontChanged = true
    frame.request()
  }

  const stopWatching = watch(
    doc,
    (current, _, onCleanup) => {
      const parts = documentParts(current)
      parts.lines.observeDeep(onLines)
      parts.page.observeDeep(onPage)
      parts.front.observeDeep(onFront)
      lines.clear()
      changedOffPage.clear()
      isPageChanged = isFrontChanged = true
      refresh()
      onCleanup(() => {
        parts.lines.unobserveDeep(onLines)
        parts.page.unobserveDeep(onPage)
        parts.front.unobserveDeep(onFront)
      })
    },
    { immediate: true, flush: 'sync' },
  )
  onScopeDispose(stopWatching)

  return { lines, fieldProblems, setAside, order, blocks, front, isRead, refresh }
}
