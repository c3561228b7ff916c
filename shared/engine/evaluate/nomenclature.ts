import type { LineId, Quantity, SheetEngine } from '../contracts'
import { ownerOf } from '../graph/symbolTable'
import { isDefiner, type SheetNode } from './sheetNode'

type Row = ReturnType<SheetEngine['nomenclature']>[number]

/** Every symbol that stands for a quantity or an analysis, and the members of analyses that some line reads. */
export const nomenclatureOf = (nodes: Iterable<SheetNode>): Row[] => {
  const rows: Row[] = []
  for (const node of nodes) {
    const isQuantity =
      node.line.kind === 'given' || node.line.kind === 'formula' || node.line.kind === 'analysis'
    if (!isQuantity || !node.defines || node.symbol === undefined || !isDefiner(node)) continue
    const readers = [...(node.defines.readers ?? [])].sort((a, b) => a.place.label - b.place.label)
    rows.push(row(node.symbol, node.id, node.result.value, usersOf(node.symbol, readers)))
    rows.push(...memberRows(node, readers))
  }
  return rows
}

const row = (symbol: string, lineId: LineId, value: Quantity | undefined, usedIn: LineId[]): Row => ({
  symbol,
  lineId,
  ...(value && { value }),
  usedIn,
})

const usersOf = (name: string, readers: SheetNode[]): LineId[] =>
  readers
    .filter(({ reading }) => reading.reads.some((read) => read === name || ownerOf(read) === name))
    .map(({ id }) => id)

const memberRows = (node: SheetNode, readers: SheetNode[]): Row[] => {
  if (node.line.kind !== 'analysis') return []
  const members = Object.entries(node.result.analysis?.members ?? {})
  return members.flatMap(([member, value]) => {
    const name = `${node.symbol}.${member}`
    const usedIn = readers.filter(({ reading }) => reading.reads.includes(name)).map(({ id }) => id)
    return usedIn.length === 0 ? [] : [row(name, node.id, value, usedIn)]
  })
}
