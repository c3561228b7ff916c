/** `unit("N m")`: a unit that cannot be read as anything else, whatever symbols the sheet has. */
import { readUnit } from '../../units/unit'
import { skipSpaces } from '../characters'
import type { PhraseReading } from '../phrases'
import type { Reading } from './reading'

/** Longer than this it is no unit; the pattern is not tried on the rest of a long text. */
const LONGEST = 200

/** The quoted unit at `at`, spaces before it skipped; undefined where none stands. */
export const quotedUnitAt = ({ text, field }: Reading, at: number): PhraseReading | undefined => {
  const start = skipSpaces(text, at)
  if (!text.startsWith('unit', start)) return undefined
  const match = /^unit\s*\(\s*(["“”])([^"“”]*)["“”]\s*\)/.exec(text.slice(start, start + LONGEST))
  if (!match) return undefined
  const [whole, mark = '"', quoted = ''] = match
  const to = start + whole.length
  const reading = readUnit(quoted, field)
  if (reading.phrase) return { unit: reading.phrase, to }
  const from = start + whole.indexOf(mark) + 1
  // The repairs of a bad unit rewrite a unit field as a whole; here they would overwrite the expression.
  const { code, message } = reading.problem
  return { unit: { text: quoted, factors: [] }, to, problem: { code, message, span: { field, from, to } } }
}
