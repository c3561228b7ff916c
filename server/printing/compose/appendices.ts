/** What stands behind the sheet: assumptions, nomenclature, sources, origin, methods. */
import { analyses } from '@shared/analyses/registry'
import type { Analysis } from '@shared/engine/contracts'
import type { AnalysisLine, Given } from '@shared/sheet/kinds'
import type { Appendix, Piece } from '../pages'
import { confirmation } from './line'
import type { SheetScope } from './scope'
import { drawUnit } from '@shared/engine/display/unit'
import { cell, heads, math, quantityNode, symbolNode } from './shown'

const reference = (number: string): Piece[] => (number === '' ? [] : [{ is: 'reference', number }])

const references = (ids: readonly string[], scope: SheetScope): Piece[] =>
  ids.flatMap((id, index): Piece[] => [
    ...(index > 0 ? [{ is: 'text' as const, text: ', ' }] : []),
    ...reference(scope.numberOf(id)),
  ])

const givensOf = ({ lines }: SheetScope): Given[] => lines.filter((line) => line.kind === 'given')
const analysisLinesOf = ({ lines }: SheetScope): AnalysisLine[] =>
  lines.filter((line) => line.kind === 'analysis')

/** Each method once, with its lines. */
const methodsOf = (scope: SheetScope): { analysis: Analysis; lines: AnalysisLine[] }[] =>
  [...analyses.values()].flatMap((analysis) => {
    const lines = analysisLinesOf(scope).filter((line) => line.analysis.trim() === analysis.spec.kind)
    return lines.length === 0 ? [] : [{ analysis, lines }]
  })

const assumptions = (scope: SheetScope): Appendix => {
  const assumed = givensOf(scope).filter(({ nature }) => nature === 'assumption')
  const defaults = analysisLinesOf(scope).flatMap((line) =>
    (scope.results.get(line.id)?.analysis?.defaults ?? []).map((one) => ({ line, ...one })),
  )
  const valueOf = ({ id, value, unit }: Given): Piece[] => {
    const result = scope.results.get(id)?.value
    return result ? [math(quantityNode(result))] : cell(`${value} ${unit}`.trim())
  }
  return {
    title: 'Assumptions and defaults',
    paragraphs:
      assumed.length + defaults.length === 0 ? ['No given is an assumption, and no default was used.'] : [],
    table: {
      head: heads('Line', 'Symbol', 'Value', 'Basis'),
      parts: [0.6, 1.4, 1.5, 4.5],
      rows: [
        ...assumed.map((given) => [
          reference(scope.numberOf(given.id)),
          [math(symbolNode(given.symbol))],
          valueOf(given),
          cell(
            `${given.basis?.trim() || 'No basis given.'}${given.toConfirm ? ` ${confirmation(given.toConfirm)}` : ''}`,
          ),
        ]),
        ...defaults.map(({ line, label, shown, basis }) => [
          reference(scope.numberOf(line.id)),
          cell(label),
          cell(`${shown} (default)`),
          cell(basis),
        ]),
      ],
    },
    list: methodsOf(scope).flatMap(({ analysis: { spec } }) =>
      spec.assumptions.map((assumption) => `${spec.title}: ${assumption}`),
    ),
  }
}

const toConfirm = (scope: SheetScope): Appendix[] => {
  const open = givensOf(scope).filter((given) => given.toConfirm)
  return open.length === 0
    ? []
    : [
        {
          title: 'To be confirmed before issue',
          paragraphs: [],
          table: {
            head: heads('Line', 'Symbol', 'Meaning', 'By and due'),
            parts: [0.6, 1.4, 3.5, 2.5],
            rows: open.map((given) => [
              reference(scope.numberOf(given.id)),
              [math(symbolNode(given.symbol))],
              cell(given.note),
              cell(given.toConfirm ? confirmation(given.toConfirm) : ''),
            ]),
          },
        },
      ]
}

/** What a symbol means: its line's note, or for an output the words of its analysis. */
const meaningOf = (symbol: string, lineId: string, scope: SheetScope): string => {
  const line = scope.lines.find(({ id }) => id === lineId)
  const member = scope.results.get(lineId)?.analysis?.members[symbol.slice(symbol.indexOf('.') + 1)]
  if (symbol.includes('.') && member) return member.meaning
  if (line?.note.trim()) return line.note
  return line?.kind === 'analysis' ? (analyses.get(line.analysis.trim())?.spec.title ?? '') : ''
}

const nomenclature = (scope: SheetScope): Appendix[] => {
  const rows = scope.nomenclature
  if (rows.length === 0) return []
  return [
    {
      title: 'Nomenclature',
      paragraphs: [],
      table: {
        head: heads('Symbol', 'Meaning', 'Value', 'Unit', 'Defined in', 'Used in'),
        parts: [1.2, 3.4, 1.2, 0.9, 0.9, 1.6],
        rows: rows.map(({ symbol, lineId, value, usedIn }) => [
          [math(symbolNode(symbol))],
          cell(meaningOf(symbol, lineId, scope)),
          value ? [math(quantityNode({ ...value, ...numberOnly(value) }))] : [],
          value?.unit ? [math(drawUnit(value.unit).print)] : [],
          reference(scope.numberOf(lineId)),
          references(usedIn, scope),
        ]),
      },
    },
  ]
}

const numberOnly = ({ shown, unit }: { shown: string; unit: string }) => ({
  shown: unit !== '' && shown.endsWith(unit) ? shown.slice(0, -unit.length).trim() : shown,
  unit: '',
})

const sources = (scope: SheetScope): Appendix[] => {
  const named = Object.entries(scope.sheet.front.sources)
  const citing = (key: string) =>
    scope.lines.filter((line) => 'source' in line && cites(line.source, key)).map(({ id }) => id)
  const ofMethods = methodsOf(scope).flatMap(({ analysis: { spec } }) =>
    spec.sources.map(({ text, clause }) => `${spec.title}: ${[text, clause].filter(Boolean).join(', ')}`),
  )
  if (named.length + ofMethods.length === 0) return []
  return [
    {
      title: 'Sources',
      paragraphs: [],
      table: {
        head: heads('Key', 'Title', 'Edition', 'Clause', 'Filed', 'Lines'),
        parts: [1.1, 3.6, 1.1, 1, 1.1, 1.2],
        rows: named.map(([key, source]) => [
          cell(key),
          cell(source.title),
          cell(source.edition ?? ''),
          cell(source.clause ?? ''),
          cell(source.filed ?? ''),
          references(citing(key), scope),
        ]),
      },
      list: ofMethods,
    },
  ]
}

/** `EN 10025` cites the source of that key, and so does `EN 10025, table 7`. */
const cites = (text: string, key: string): boolean =>
  text === key || (text.startsWith(key) && /^[\s,:;(]/.test(text.slice(key.length)))

const origin = (scope: SheetScope): Appendix[] => {
  const byEdition = new Map<string, string[]>()
  for (const { id, origin } of scope.lines) {
    if (!origin) continue
    const key = `${origin.template}, edition ${origin.edition}`
    byEdition.set(key, [...(byEdition.get(key) ?? []), id])
  }
  if (byEdition.size === 0) return []
  return [
    {
      title: 'Templates used',
      paragraphs: [],
      table: {
        head: heads('Template', 'Lines'),
        parts: [2, 3],
        rows: [...byEdition].map(([name, ids]) => [cell(name), references(ids, scope)]),
      },
    },
  ]
}

const methods = (scope: SheetScope): Appendix[] => {
  const used = methodsOf(scope)
  return used.length === 0
    ? []
    : [
        {
          title: 'Methods of the analyses',
          paragraphs: [],
          table: {
            head: heads('Method', 'Version', 'Lines'),
            parts: [3, 1, 3],
            rows: used.map(({ analysis: { spec }, lines }) => [
              cell(spec.title),
              cell(String(spec.version)),
              references(
                lines.map(({ id }) => id),
                scope,
              ),
            ]),
          },
        },
      ]
}

export const appendicesOf = (scope: SheetScope): Appendix[] => [
  ...toConfirm(scope),
  assumptions(scope),
  ...nomenclature(scope),
  ...sources(scope),
  ...origin(scope),
  ...methods(scope),
]

const GENERAL_CAUTIONS = [
  'The responsible engineer must judge whether the methods, inputs and criteria suit the case.',
  'Local codes and the licensing law of the place govern.',
  'A satisfied criterion is not by itself a safe design.',
  'Values marked from memory must be confirmed before issue.',
]

/** The general ones, then each analysis' own, once. */
export const cautionsOf = (scope: SheetScope): string[] => [
  ...new Set([
    ...GENERAL_CAUTIONS,
    ...methodsOf(scope).flatMap(({ analysis: { spec } }) =>
      spec.cautions.map((caution) => `${spec.title}: ${caution}`),
    ),
  ]),
]
