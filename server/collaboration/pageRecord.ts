/**
 * The page's part of the edit record: prose belongs to the block that its heading opens (prose is ticked
 * by section), and a line's atom says that the line came, went or moved.
 */
import * as Y from 'yjs'
import type { Entry } from './recordEntry'

/** The block before the first heading. */
export const OPENING = 'opening'

interface Place {
  node: unknown
  /** Id of a line's atom. */
  line: string | undefined
  /** Id of the heading that the node stands under. */
  block: string
  text: string
}

const asText = (node: unknown): string =>
  node instanceof Y.XmlElement || node instanceof Y.XmlText ? node.toString() : ''

const placeOf = (node: unknown, block: string, known: Place | undefined): Place => {
  const element = node instanceof Y.XmlElement ? node : undefined
  const id = element?.getAttribute('id')
  const isHeading = element?.nodeName === 'heading' && typeof id === 'string' && id !== ''
  return {
    node,
    line: element?.nodeName === 'line' && typeof id === 'string' ? id : undefined,
    block: isHeading ? id : block,
    text: known?.text ?? asText(node),
  }
}

/** What differs between two texts, without what they share at both ends. */
const trimmed = (before: string, after: string): { before: string; after: string } => {
  let from = 0
  const most = Math.min(before.length, after.length)
  while (from < most && before[from] === after[from]) from++
  let back = 0
  while (back < most - from && before[before.length - 1 - back] === after[after.length - 1 - back]) back++
  return { before: before.slice(from, before.length - back), after: after.slice(from, after.length - back) }
}

const stated = (value: string): string | null => (value === '' ? null : JSON.stringify(value))

export class PageRecord {
  readonly #page: Y.XmlFragment
  #places: Place[] = []

  constructor(page: Y.XmlFragment) {
    this.#page = page
    this.#places = this.#readPlaces(new Map())
  }

  #readPlaces(known: Map<unknown, Place>): Place[] {
    let block = OPENING
    return this.#page.toArray().map((node) => {
      const place = placeOf(node, block, known.get(node))
      block = place.block
      return place
    })
  }

  /** Watches one update; `entries` is called after it was applied. */
  watch(): { stop: () => void; entries: (newLines: ReadonlySet<string>) => Entry[] } {
    let isOrderTouched = false
    const touched = new Set<number>()
    const listen = (events: Y.YEvent<Y.AbstractType<unknown>>[]) => {
      for (const event of events) {
        if (event.path.length === 0) isOrderTouched = true
        else touched.add(Number(event.path[0]))
      }
    }
    this.#page.observeDeep(listen)
    return {
      stop: () => this.#page.unobserveDeep(listen),
      entries: (newLines) =>
        isOrderTouched || touched.size > 0 ? this.#compare(isOrderTouched, touched, newLines) : [],
    }
  }

  #compare(isOrderTouched: boolean, touched: Set<number>, newLines: ReadonlySet<string>): Entry[] {
    const before = this.#places
    const known = new Map(before.map((place) => [place.node, place]))
    // A heading's id may have changed with its text, so places are read again in both cases.
    const after = this.#readPlaces(known)
    for (const index of touched) {
      const place = after[index]
      if (place !== undefined) place.text = asText(place.node)
    }
    this.#places = after
    const entries: Entry[] = []
    for (const index of touched) {
      const place = after[index]
      if (place !== undefined) entries.push(...proseEntry(known.get(place.node), place))
    }
    if (!isOrderTouched) return entries
    const now = new Set(after.map((place) => place.node))
    for (const place of before) if (!now.has(place.node)) entries.push(...proseEntry(place, undefined))
    after.forEach((place, index) => {
      if (!known.has(place.node) && !touched.has(index)) entries.push(...proseEntry(undefined, place))
    })
    return [...entries, ...movedLines(before, after, newLines)]
  }
}

const proseEntry = (before: Place | undefined, after: Place | undefined): Entry[] => {
  if (before?.line !== undefined || after?.line !== undefined) return []
  const difference = trimmed(before?.text ?? '', after?.text ?? '')
  if (difference.before === difference.after) return []
  const subjectId = after?.block ?? before?.block ?? OPENING
  const field = before !== undefined && after !== undefined ? 'text' : ''
  return [
    {
      subject: 'block',
      subjectId,
      field,
      before: stated(difference.before),
      after: stated(difference.after),
    },
  ]
}

/** Atoms that came, went or moved: an atom that only shifted because others came or went did not move. */
const movedLines = (before: Place[], after: Place[], newLines: ReadonlySet<string>): Entry[] => {
  const indexes = (places: Place[], others: Set<unknown>): Map<string, number[]> => {
    const found = new Map<string, number[]>()
    places.forEach((place, index) => {
      if (place.line === undefined || others.has(place.node)) return
      found.set(place.line, [...(found.get(place.line) ?? []), index])
    })
    return found
  }
  const went = indexes(before, new Set(after.map((place) => place.node)))
  const came = indexes(after, new Set(before.map((place) => place.node)))
  const entries: Entry[] = []
  for (const line of new Set([...went.keys(), ...came.keys()])) {
    const was = went.get(line)?.[0]
    const is = came.get(line)?.[0]
    if (was === undefined && newLines.has(line)) continue
    if (was === is) continue
    const place = (index: number | undefined) =>
      index === undefined ? null : JSON.stringify({ place: index })
    entries.push({ subject: 'line', subjectId: line, field: '', before: place(was), after: place(is) })
  }
  return entries
}
