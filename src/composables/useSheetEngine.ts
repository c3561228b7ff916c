import { onScopeDispose, ref, shallowReactive, shallowRef, watch, type Ref, type ShallowRef } from 'vue'
import type {
  AnalysisSpec,
  EngineLine,
  LineId,
  LineResult,
  Presentation,
  Quote,
  QuoteResult,
} from '@shared/engine/contracts'
import { DEFAULT_DIGITS } from '@shared/pipeline/engineLines'
import type { PageBlock } from '@shared/sheet/pageReading'
import type { Inline, Prose } from '@shared/sheet/sheet'
import { quoteKey } from '@/editor/quoteKey'
import { createEngineClient, workerChannel, type EngineChannel } from '@/workers/engineClient'
import type { Drawing, DrawnFigure, NomenclatureEntry, ShownWorking, Trial } from '@/workers/engineMessages'
import { changesSince, type Told } from './engineChanges'
import { waitingOn } from './engineDependents'
import { summariseChanges } from './engineSummary'
import type { SheetContent } from './useSheetContent'

export interface SheetEngineState {
  results: Map<LineId, LineResult>
  presentations: Map<LineId, Presentation>
  /** By `quoteKey`. */
  quotes: Map<string, QuoteResult>
  nomenclature: ShallowRef<NomenclatureEntry[]>
  /** Lines whose shown value is older than what was asked for, once that took longer than 300 ms. */
  stale: Set<LineId>
  /** Lines in view whose value has just changed, where they are few enough to be looked at. */
  changed: Set<LineId>
  /** One sentence that sums up what changed, for the live region. */
  summary: Ref<string>
  /** What went wrong with the program, if something did: values are not current then. */
  fault: Ref<string>
  specs: ShallowRef<AnalysisSpec[]>
  show: (ids: LineId[]) => void
  hide: (ids: LineId[]) => void
  tryLine: (line: EngineLine, after: LineId | null) => Promise<Trial | null>
  draw: (drawing: Drawing) => Promise<DrawnFigure | null>
  working: (id: LineId) => Promise<ShownWorking | null>
}

const staleAfterMs = 300
const tintForMs = 600
const mostTinted = 12

const inlines = (prose: Prose): Inline[] => {
  switch (prose.type) {
    case 'paragraph':
    case 'heading':
      return prose.content
    case 'bullets':
    case 'numbers':
      return prose.items.flatMap((item) => item.flatMap(inlines))
    case 'grid':
      return prose.rows.flatMap((row) => row.flatMap((cell) => cell.content))
  }
}

const quotesIn = (blocks: readonly PageBlock[]): Quote[] => {
  const found = new Map<string, Quote>()
  for (const block of blocks) {
    if (block.type === 'place') continue
    for (const inline of inlines(block)) {
      if (inline.type !== 'quote') continue
      const { symbol, unit, digits } = inline
      const id = quoteKey(symbol, unit, digits)
      found.set(id, { id, symbol, unit, digits })
    }
  }
  return [...found.values()]
}

/** The engine of one sheet, in its worker: it is told what changed, once a frame, and answers by line. */
export const useSheetEngine = (
  content: SheetContent,
  openChannel: () => EngineChannel = workerChannel,
): SheetEngineState => {
  const results = shallowReactive(new Map<LineId, LineResult>())
  const presentations = shallowReactive(new Map<LineId, Presentation>())
  const quotes = shallowReactive(new Map<string, QuoteResult>())
  const stale = shallowReactive(new Set<LineId>())
  const changed = shallowReactive(new Set<LineId>())
  const nomenclature = shallowRef<NomenclatureEntry[]>([])
  const specs = shallowRef<AnalysisSpec[]>([])
  const summary = ref('')
  const fault = ref('')

  const told: Told = { order: [], lines: new Map() }
  const inView = new Set<LineId>()
  let toldQuotes = ''
  let toldSystem = ''
  let lastAsked = 0
  let staleTimer: ReturnType<typeof setTimeout> | undefined
  let tintTimer: ReturnType<typeof setTimeout> | undefined

  const tint = (ids: LineId[]): void => {
    const seen = ids.filter((id) => inView.has(id))
    changed.clear()
    if (seen.length === 0 || seen.length > mostTinted) return
    seen.forEach((id) => changed.add(id))
    clearTimeout(tintTimer)
    tintTimer = setTimeout(() => changed.clear(), tintForMs)
  }

  const client = createEngineClient(openChannel(), {
    results: (answer) => {
      const { sentence, ids } = summariseChanges(results, answer.lines)
      for (const line of answer.lines) {
        results.set(line.id, line)
        // Out of view nothing is typeset: rather no number there than the one from before.
        presentations.delete(line.id)
      }
      for (const presentation of answer.presentations) presentations.set(presentation.id, presentation)
      for (const quote of answer.quotes) quotes.set(quote.id, quote)
      nomenclature.value = answer.nomenclature
      if (answer.number === lastAsked) {
        clearTimeout(staleTimer)
        stale.clear()
      }
      if (sentence) summary.value = sentence
      tint(ids)
    },
    presentations: (answer) => {
      for (const presentation of answer.presentations) presentations.set(presentation.id, presentation)
    },
    fault: (message) => (fault.value = message),
  })
  void client.specs().then((all) => (specs.value = all))

  const tell = (): void => {
    const changes = changesSince(told, content.order.value, content.lines)
    const nextQuotes = quotesIn(content.blocks.value)
    const quotesText = JSON.stringify(nextQuotes)
    const { unitSystem } = content.front.value
    if (changes.length === 0 && quotesText === toldQuotes && unitSystem === toldSystem) return
    for (const { id, line } of changes) {
      if (line) continue
      results.delete(id)
      presentations.delete(id)
    }
    lastAsked = client.apply({
      changes,
      ...(quotesText === toldQuotes ? {} : { quotes: nextQuotes }),
      ...(unitSystem === toldSystem ? {} : { settings: { unitSystem, digits: DEFAULT_DIGITS } }),
    })
    toldQuotes = quotesText
    toldSystem = unitSystem
    clearTimeout(staleTimer)
    const touched = changes.map(({ id }) => id)
    staleTimer = setTimeout(() => waitingOn(touched, results).forEach((id) => stale.add(id)), staleAfterMs)
  }

  const stopWatching = watch(
    [content.order, content.blocks, content.front, () => [...content.lines.values()]],
    tell,
    {
      immediate: true,
      flush: 'post',
    },
  )

  onScopeDispose(() => {
    stopWatching()
    clearTimeout(staleTimer)
    clearTimeout(tintTimer)
    client.close()
  })

  return {
    results,
    presentations,
    quotes,
    nomenclature,
    stale,
    changed,
    summary,
    fault,
    specs,
    show: (ids) => {
      ids.forEach((id) => inView.add(id))
      client.show(ids)
    },
    hide: (ids) => {
      ids.forEach((id) => inView.delete(id))
      client.hide(ids)
    },
    tryLine: client.try,
    draw: client.draw,
    working: client.working,
  }
}
