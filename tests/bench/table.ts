/** Measures the rows and prints the table. A further row is one file in `rows/` and one name below. */
import { cpus, loadavg } from 'node:os'
import { firstEvaluation } from './rows/firstEvaluation'
import { flatness } from './rows/flatness'
import { monteCarlo } from './rows/monteCarlo'
import { oneGivenAgainstTenLines, oneGivenAgainstWholeSheet } from './rows/oneGiven'
import type { Measurement, Row } from './row'

const rows: Row[] = [
  oneGivenAgainstTenLines,
  flatness,
  oneGivenAgainstWholeSheet,
  firstEvaluation,
  monteCarlo,
]

const measured = async (row: Row): Promise<Measurement> => {
  try {
    return await row.measure()
  } catch (error) {
    return { ratio: '–', isReached: false, detail: error instanceof Error ? error.message : String(error) }
  }
}

const table = (head: string[], body: string[][]): string => {
  const widths = head.map((cell, i) => Math.max(cell.length, ...body.map((row) => (row[i] ?? '').length)))
  const line = (cells: string[]) => `| ${cells.map((cell, i) => cell.padEnd(widths[i] ?? 0)).join(' | ')} |`
  return [line(head), line(widths.map((width) => '-'.repeat(width))), ...body.map(line)].join('\n')
}

const only = process.argv.slice(2)
const body: string[][] = []
for (const row of rows) {
  if (only.length > 0 && !only.some((word) => row.what.includes(word) || row.baseline.includes(word)))
    continue
  process.stderr.write(`${row.what} …\n`)
  const { ratio, isReached, detail } = await measured(row)
  body.push([row.what, row.baseline, ratio, row.target, isReached ? 'yes' : 'no', detail])
}
console.log(table(['what', 'baseline in the same run', 'ratio', 'to reach', 'reached', 'times'], body))
console.log(
  `\nNode ${process.version}, ${cpus().length} × ${cpus()[0]?.model ?? 'processor'}, load ${loadavg()[0]?.toFixed(1)}`,
)
