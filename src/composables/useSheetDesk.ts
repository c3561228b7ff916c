import { onScopeDispose, shallowReactive, type ShallowRef } from 'vue'
import type { LineId, Problem } from '@shared/errors/problem'
import type { LineResult } from '@shared/engine/contracts'
import { settleContested } from '@/editor/commands/settleContested'
import type { Desk } from '@/editor/desk'
import type { SheetConnection } from '@/collaboration/sheetConnection'
import type { SheetActs } from './useSheetActs'
import type { SheetContent } from './useSheetContent'
import type { SheetEngineState } from './useSheetEngine'
import type { SheetNumbers } from './useSheetNumbers'
import type { SheetPens } from './useSheetPens'

export interface LineMenu {
  id: LineId
  anchor: HTMLElement
  menu: 'insert' | 'more'
}

export interface SheetDeskParts {
  connection: SheetConnection
  content: SheetContent
  engine: SheetEngineState
  numbers: SheetNumbers
  pens: SheetPens
  acts: SheetActs
  openLine: ShallowRef<LineId | undefined>
  menu: ShallowRef<LineMenu | undefined>
}

export interface SheetDesk extends Desk {
  /** Elements into which components are put: the fields of the open line, the results of analyses. */
  hosts: { fields: Map<LineId, HTMLElement>; results: Map<LineId, HTMLElement> }
}

/** A result with the problems of fields that could not even be read. */
const withFieldProblems = (
  result: LineResult | undefined,
  problems: readonly Problem[] | undefined,
): LineResult | undefined =>
  result && problems && problems.length > 0
    ? { ...result, problems: [...problems, ...result.problems] }
    : result

/** What line views read and ask for, in one place. */
export const useSheetDesk = (parts: SheetDeskParts): SheetDesk => {
  const { connection, content, engine, numbers, pens, acts, openLine, menu } = parts
  const hosts = {
    fields: shallowReactive(new Map<LineId, HTMLElement>()),
    results: shallowReactive(new Map<LineId, HTMLElement>()),
  }

  const idOf = (entry: IntersectionObserverEntry): LineId => (entry.target as HTMLElement).dataset.line ?? ''
  const observer = new IntersectionObserver(
    (entries) => {
      const entered = entries.filter(({ isIntersecting }) => isIntersecting).map(idOf)
      const left = entries.filter(({ isIntersecting }) => !isIntersecting).map(idOf)
      if (entered.length > 0) engine.show(entered)
      if (left.length > 0) engine.hide(left)
    },
    { rootMargin: '600px 0px' },
  )
  onScopeDispose(() => observer.disconnect())

  return {
    hosts,
    line: (id) => content.lines.get(id),
    result: (id) => withFieldProblems(engine.results.get(id), content.fieldProblems.get(id)),
    presentation: (id) => engine.presentations.get(id),
    quote: (id) => engine.quotes.get(id),
    numberOf: (id) => numbers.numbering.value.lines.get(id) ?? '',
    isStale: (id) => engine.stale.has(id),
    sourceShown: (source) => {
      const entry = content.front.value.sources[source]
      return entry ? [entry.title, entry.edition, entry.clause].filter(Boolean).join(', ') : source
    },
    holder: pens.holder,
    mayEdit: acts.mayEdit,
    openLine: () => openLine.value,
    justChanged: (id) => engine.changed.has(id),
    madeOf: (id) => (acts.made.value?.id === id ? acts.made.value.kind : undefined),
    keepAsText: acts.keepAsText,
    edit: acts.edit,
    close: acts.close,
    showInsertMenu: (id, anchor) => (menu.value = { id, anchor, menu: 'insert' }),
    showMoreMenu: (id, anchor) => (menu.value = { id, anchor, menu: 'more' }),
    repair: acts.repair,
    goTo: acts.select,
    settleContested: (id, keep) =>
      void pens.withPens([id], () => settleContested(connection.doc.value, id, keep, connection.origin)),
    offerHost: (part, id, host) => hosts[part].set(id, host),
    withdrawHost: (part, id, host) => {
      if (hosts[part].get(id) === host) hosts[part].delete(id)
    },
    watchView: (view) => observer.observe(view),
    unwatchView: (view) => observer.unobserve(view),
  }
}
