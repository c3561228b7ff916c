import * as Y from 'yjs'
import type { Problem } from '../errors/problem'
import { documentParts } from './document'
import { readFields } from './documentFields'
import { readFront } from './documentFront'
import type { Line } from './kinds'
import { readBlocks } from './pageReading'
import { readLine } from './readLine'
import type { Block, Sheet } from './sheet'

export interface ReadSheet {
  sheet: Sheet
  problems: Problem[]
  /** Lines that stand nowhere on the page: removed, and perhaps changed by somebody at the same moment. */
  setAside: Line[]
}

const repeated = (lineId: string): Problem => ({
  lineId,
  code: 'repeated-line',
  severity: 'error',
  message: 'This line stands on the page twice, as when two people move it at once. The first one counts.',
  repairs: [{ label: 'Make it a line of its own', lineId, fields: {} }],
})

const withoutFields = (lineId: string): Problem => ({
  lineId,
  code: 'invalid-field',
  severity: 'error',
  message: 'The content of this line is gone. Remove the line or write it again.',
})

/**
 * Joins the three parts of a document into a sheet. Never throws for what stands in the document:
 * what cannot be read is a problem, and everything else is there.
 */
export const readSheet = (doc: Y.Doc): ReadSheet => {
  const { page, lines, front } = documentParts(doc)
  const { front: readableFront, problems } = readFront(front)
  const blocks: Block[] = []
  const placed = new Set<string>()
  for (const block of readBlocks(page)) {
    if (block.type !== 'place') {
      blocks.push(block)
      continue
    }
    if (typeof block.id !== 'string' || block.id === '') continue
    if (placed.has(block.id)) {
      problems.push(repeated(block.id))
      continue
    }
    placed.add(block.id)
    const fields: unknown = lines.get(block.id)
    if (!(fields instanceof Y.Map)) {
      problems.push(withoutFields(block.id))
      continue
    }
    const read = readLine(readFields(block.id, fields))
    problems.push(...read.problems)
    if (read.line) {
      problems.push(...repeatedRows(read.line))
      blocks.push({ type: 'line', line: read.line })
    }
  }
  const setAside: Line[] = []
  for (const [id, fields] of lines.entries()) {
    if (placed.has(id) || !((fields as unknown) instanceof Y.Map)) continue
    const { line } = readLine(readFields(id, fields))
    if (line) setAside.push(line)
  }
  return { sheet: { front: readableFront, blocks }, problems, setAside }
}

const repeatedNames = (lineId: string, field: string, rows: readonly { name: string }[]): Problem[] => {
  const seen = new Set<string>()
  return rows.flatMap(({ name }, index): Problem[] => {
    if (!seen.has(name)) {
      seen.add(name)
      return []
    }
    return [
      {
        lineId,
        code: 'invalid-field',
        severity: 'error',
        message: `Two rows are called ${name}. Remove one of them, or add it again as a new row.`,
        span: { field: `${field}.${index}.name` },
      },
    ]
  })
}

/** Rows of one name: members such as `S1.tau_2` would mean either. */
export const repeatedRows = (line: Line): Problem[] => {
  if (line.kind === 'cases' || line.kind === 'table') return repeatedNames(line.id, 'rows', line.rows)
  if (line.kind !== 'analysis') return []
  return Object.entries(line.inputs).flatMap(([name, input]) =>
    typeof input === 'string' ? [] : repeatedNames(line.id, `inputs.${name}`, input),
  )
}
