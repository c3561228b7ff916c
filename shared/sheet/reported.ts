import type { LineId } from '../errors/problem'
import { linesOf } from './lines'
import type { Sheet } from './sheet'

/** What the summary of results lists, in reading order: reported formulas and every criterion. */
export const reportedLines = (sheet: Sheet): { results: LineId[]; criteria: LineId[] } => {
  const lines = linesOf(sheet)
  return {
    results: lines.filter((line) => line.kind === 'formula' && line.reported).map((line) => line.id),
    criteria: lines.filter((line) => line.kind === 'criterion').map((line) => line.id),
  }
}
