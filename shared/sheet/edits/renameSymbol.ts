import * as Y from 'yjs'
import { documentParts } from '../document'
import type { Line } from '../kinds'
import { linesOf } from '../lines'
import { readSheet } from '../readSheet'
import { setField } from './fields'
import { renameInText } from './renameInText'
import type { Renaming } from './renameInText'
import { renameColumn } from './rows'
import { asOneStep, ownEdit } from './transaction'

type Rename = (text: string) => string

/** Every authored field of a line that reads symbols, by path, with its new text. */
const renamedFields = (line: Line, rename: Rename): [path: string, value: unknown][] => {
  const texts = (field: string, value: string | undefined): [string, unknown][] =>
    value === undefined ? [] : [[field, rename(value)]]
  const lists = (field: string, value: string[] | undefined): [string, unknown][] =>
    value === undefined ? [] : [[field, value.map(rename)]]
  const rows = (field: string, value: readonly { cells: Record<string, string> }[]): [string, unknown][] =>
    value.flatMap(({ cells }, index) =>
      Object.entries(cells).map(([column, text]): [string, unknown] => [
        `${field}.${index}.cells.${column}`,
        rename(text),
      ]),
    )
  switch (line.kind) {
    case 'formula':
      return texts('expression', line.expression)
    case 'criterion':
      return [...texts('demand', line.demand), ...texts('limit', line.limit), ...texts('upper', line.upper)]
    case 'analysis':
      return Object.entries(line.inputs).flatMap(([name, input]) =>
        typeof input === 'string' ? texts(`inputs.${name}`, input) : rows(`inputs.${name}`, input),
      )
    case 'cases':
      return [
        ...rows('rows', line.rows),
        ...lists('outputs', line.outputs),
        ...lists('criteria', line.criteria),
      ]
    case 'sizing':
      return [
        ...texts('vary', line.vary),
        ...texts('criterion', line.criterion),
        ...lists('between', line.between),
        ...lists('list', line.list),
      ]
    case 'parametric':
      return [
        ...(['vary', 'from', 'to', 'vary2', 'from2', 'to2'] as const).flatMap((field) =>
          texts(field, line[field]),
        ),
        ...lists('outputs', line.outputs),
      ]
    case 'tolerance':
      return [...lists('outputs', line.outputs), ...lists('criteria', line.criteria)]
    default:
      return []
  }
}

const quotesIn = (node: Y.XmlFragment): Y.XmlElement[] =>
  node.toArray().flatMap((child) => {
    if (!(child instanceof Y.XmlElement)) return []
    return child.nodeName === 'quote' ? [child] : quotesIn(child)
  })

/**
 * Renames a symbol where it is defined and everywhere it is read: expressions, inputs, columns of load
 * cases, outputs, quoted values; one step. Answers the ids of all lines that change, for their pens:
 * call it with `dry` to know them first.
 */
export const renameSymbol = (
  doc: Y.Doc,
  from: string,
  to: string,
  { origin = ownEdit, dry = false }: { origin?: unknown; dry?: boolean } = {},
): string[] => {
  const lines = linesOf(readSheet(doc).sheet)
  const cases = new Set(lines.filter((line) => line.kind === 'cases').map((line) => line.symbol))
  const renaming: Renaming = { from, to, isCases: (symbol) => cases.has(symbol) }
  const rename: Rename = (text) => renameInText(text, renaming)
  const touched = lines.filter(
    (line) =>
      line.symbol === from ||
      JSON.stringify(renamedFields(line, rename)) !== JSON.stringify(renamedFields(line, (text) => text)) ||
      (line.kind === 'cases' && line.rows.some(({ cells }) => Object.hasOwn(cells, from))),
  )
  if (!dry) {
    asOneStep(doc, origin, () => {
      for (const line of touched) {
        for (const [path, value] of renamedFields(line, rename)) setField(doc, line.id, path, value, origin)
        if (line.symbol === from) setField(doc, line.id, 'symbol', to, origin)
        if (line.kind === 'cases') renameColumn(doc, line.id, 'rows', from, to, origin)
      }
      for (const quote of quotesIn(documentParts(doc).page)) {
        const symbol = quote.getAttribute('symbol') ?? ''
        const renamed = rename(symbol)
        if (renamed !== symbol) quote.setAttribute('symbol', renamed)
      }
    })
  }
  return touched.map((line) => line.id)
}
