/** A line that is kept, numbered and checked, but has nothing to compute here. */
import type { EngineLine } from '../../contracts'
import { withoutReferences, type Reading } from '../stages'

const what: Record<string, string> = {
  cases: 'a table of load cases',
  sizing: 'a sizing',
  parametric: 'a parametric study',
  tolerance: 'a tolerance analysis',
  table: 'a data table',
  figure: 'a figure',
}

export const readInert = (line: Extract<EngineLine, { kind: 'inert' }>): Reading => ({
  ...withoutReferences,
  problems: [],
  check: () => ({
    problems: [],
    publication: { type: 'nothing', what: what[line.note ?? ''] ?? 'a line without a value' },
  }),
})
