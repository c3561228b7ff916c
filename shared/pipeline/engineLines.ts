/** From a sheet to what the engine reads: its lines in reading order, its quoted values, its settings. */
import type { EngineLine, Quote, Settings } from '../engine/contracts'
import type { Line } from '../sheet/kinds'
import type { Block, Inline, Prose, Sheet } from '../sheet/sheet'

/** Significant digits of results where nobody has said otherwise. */
export const DEFAULT_DIGITS = 3

export const settingsOf = (sheet: Sheet): Settings => ({
  unitSystem: sheet.front.unitSystem,
  digits: DEFAULT_DIGITS,
})

/** One line of a sheet as the engine reads it. */
export const engineLine = (line: Line): EngineLine => {
  const base = { id: line.id, symbol: line.symbol, ...(line.contested ? { contested: true } : {}) }
  switch (line.kind) {
    case 'given': {
      const { value, unit, tolerance, range, plainRate } = line
      return { ...base, kind: 'given', value, unit, tolerance, range, plainRate }
    }
    case 'formula':
      return { ...base, kind: 'formula', expression: line.expression, unit: line.unit, digits: line.digits }
    case 'criterion': {
      const { demand, relation, limit, upper, signed } = line
      return { ...base, kind: 'criterion', demand, relation, limit, upper, signed }
    }
    case 'analysis':
      return { ...base, kind: 'analysis', analysis: line.analysis, inputs: line.inputs }
    case 'cases':
    case 'sizing':
    case 'parametric':
    case 'tolerance':
    case 'table':
    case 'figure':
      return { ...base, kind: 'inert', note: line.kind }
  }
}

/** All lines of a sheet in reading order. An id that stands again gets one of its own here and says whose it repeats. */
export const engineLines = (sheet: Sheet): EngineLine[] => {
  const times = new Map<string, number>()
  return sheet.blocks.flatMap((block: Block) => {
    if (block.type !== 'line') return []
    const { id } = block.line
    const time = (times.get(id) ?? 0) + 1
    times.set(id, time)
    const line = engineLine(block.line)
    return [time === 1 ? line : { ...line, id: `${id}~${time}`, repeats: id }]
  })
}

/** Quoted values in reading order; `id` is the block's place and the quote's number in it: `4:0`. */
export const quotesOf = (sheet: Sheet): Quote[] =>
  sheet.blocks.flatMap((block, place) =>
    block.type === 'line'
      ? []
      : inlinesOf(block)
          .filter((inline) => inline.type === 'quote')
          .map(({ symbol, unit, digits }, index) => ({ id: `${place}:${index}`, symbol, unit, digits })),
  )

const inlinesOf = (prose: Prose): Inline[] => {
  switch (prose.type) {
    case 'paragraph':
    case 'heading':
      return prose.content
    case 'bullets':
    case 'numbers':
      return prose.items.flatMap((item) => item.flatMap(inlinesOf))
    case 'grid':
      return prose.rows.flatMap((row) => row.flatMap((cell) => cell.content))
  }
}
