/**
 * The engine of a sheet. A change goes four steps: it is *integrated* (lines, order, definitions; texts
 * are read again where they or the meaning of their words changed), the *order of recomputation* is
 * found, each line in it is *refreshed* as far as it is out of date, and what differs is *answered*.
 * The cost grows with what depends on the change, not with the sheet.
 */
import type { Changes, LibraryFunction, LineResult, Analysis, Settings, SheetEngine } from '../contracts'
import { compare } from '../graph/readingOrder'
import { recomputation } from '../graph/topology'
import { builtins } from './builtins'
import { nomenclatureOf } from './nomenclature'
import { presentationOf } from './presentation'
import { Quotes } from './quotes'
import { Refresh } from './refresh'
import { same } from './same'
import { SheetLines } from './sheetLines'
import { dependentsOf, lacks, stale, type Circle, type SheetNode } from './sheetNode'

export interface EngineParts {
  analyses: ReadonlyMap<string, Analysis>
  /** Beyond the built-in ones. */
  functions: readonly LibraryFunction[]
}

/** Until the sheet says otherwise. */
const initialSettings: Settings = { unitSystem: 'SI', digits: 3 }

export const createEngine = ({ analyses, functions }: EngineParts): SheetEngine => {
  const library = new Map([...builtins, ...functions.map((one) => [one.name, one] as const)])
  const lines = new SheetLines({ analyses, functions: library })
  const refresh = new Refresh(lines.symbols, library, initialSettings)
  const quotes = new Quotes(lines.symbols)

  const apply = (changes: Changes): ReturnType<SheetEngine['apply']> => {
    const { dirty, touched } = lines.integrate(changes.changes)
    if (changes.settings) {
      refresh.setSettings(changes.settings)
      for (const node of lines.nodes.values()) {
        lacks(node, stale.types)
        dirty.add(node)
      }
    }
    if (changes.quotes) quotes.replace(changes.quotes)

    const { order, circles } = recomputation(dirty, dependentsOf)
    markCircles(order, circles)
    const differing: SheetNode[] = []
    for (const node of order) {
      if (node.stale === stale.nothing) continue
      const before = node.result
      const renewal = refresh.refresh(node)
      if (renewal !== stale.nothing) {
        for (const dependent of dependentsOf(node)) lacks(dependent, renewal)
      }
      if (isSameResult(before, node.result)) node.result = before
      else {
        differing.push(node)
        if (node.symbol !== undefined) touched.add(node.symbol)
      }
    }
    differing.sort((a, b) => compare(a.place, b.place))
    return {
      lines: differing.map(({ result }) => result),
      quotes: changes.quotes || changes.settings ? quotes.all() : quotes.of(touched),
    }
  }

  return {
    apply,
    result: (id) => lines.nodes.get(id)?.result,
    results: () => Array.from(lines.order, ({ result }): LineResult => result),
    present: (id) => {
      const node = lines.nodes.get(id)
      return node && presentationOf(node, lines.symbols)
    },
    nomenclature: () => nomenclatureOf(lines.order),
  }
}

/** Numbers differ most often: they are looked at first. */
const isSameResult = (a: LineResult, b: LineResult): boolean =>
  a.id === b.id && Object.is(a.value?.si, b.value?.si) && same(a, b)

const circleOf = (nodes: readonly SheetNode[]): Circle => {
  const names = [...nodes].sort((a, b) => compare(a.place, b.place)).map(({ symbol = '' }) => symbol)
  return { names, symbols: new Set(names), key: names.join(' ') }
}

/** Who stands in a circle gives its readers nothing; who has left one is looked at afresh. */
const markCircles = (order: readonly SheetNode[], circles: readonly SheetNode[][]): void => {
  const found = new Map<SheetNode, Circle>()
  for (const nodes of circles) {
    const circle = circleOf(nodes)
    for (const node of nodes) found.set(node, circle)
  }
  for (const node of order) {
    const circle = found.get(node)
    if (circle?.key === node.circle?.key) continue
    node.circle = circle
    lacks(node, stale.links)
    if (!circle) continue
    node.published = { roots: [node.symbol ?? ''] }
    for (const dependent of dependentsOf(node)) lacks(dependent, stale.types)
  }
}
