/** A unit or a bare word where a function takes one: `numerical_value(x, MPa)`, `preferred(x, R40)`. */
import type { LooseProblem } from '../../../errors/problem'
import { syntax } from '../../problems'
import { readUnit } from '../../units/unit'
import { isSpace, skipSpaces } from '../characters'
import { quotedUnitAt } from './quotedUnit'
import type { Reading } from './reading'

/** End of the text up to the next comma or bracket, trailing spaces apart. */
const argumentEnd = (text: string, from: number): number => {
  let to = from
  while (to < text.length && text[to] !== ',' && text[to] !== ')') to++
  while (to > from && isSpace(text.charCodeAt(to - 1))) to--
  return to
}

const unitWanted = (
  problem: LooseProblem | undefined,
  name: string | undefined,
  typed: string,
): LooseProblem =>
  problem !== undefined && typed !== ''
    ? { code: problem.code, message: problem.message }
    : { code: problem?.code ?? 'syntax', message: `${name} takes a unit here, such as MPa.` }

const readUnitArgument = (reading: Reading, name: string | undefined, from: number, to: number): void => {
  const quoted = quotedUnitAt(reading, from)
  if (quoted) {
    if (quoted.problem) reading.problems.push(quoted.problem)
    reading.value({ type: 'unit', unit: quoted.unit, range: { from, to: quoted.to } }, 'symbol')
    return
  }
  const typed = reading.text.slice(from, to)
  const { phrase, problem } = readUnit(typed, reading.field)
  if (typed === '' || phrase === undefined) {
    reading.fail({
      ...unitWanted(problem, name, typed),
      span: reading.span(from, Math.max(to, from + 1)),
    })
  }
  reading.value({ type: 'unit', unit: phrase, range: { from, to } }, 'symbol')
}

/** Reads the argument that begins here, where it is no value; else the expression goes on as usual. */
export const readBareArgument = (reading: Reading): void => {
  const { call } = reading.frame()
  const kind = call?.kinds[call.argument]
  if (kind === undefined || kind === 'value') return
  const { text } = reading
  const from = skipSpaces(text, reading.at)
  const to = argumentEnd(text, from)
  if (kind === 'unit') return readUnitArgument(reading, call?.name, from, to)
  const typed = text.slice(from, to)
  if (!/^[A-Za-z0-9][A-Za-z0-9_+./-]*$/.test(typed)) {
    reading.fail(
      syntax(
        `${call?.name} takes a bare word here, such as ${kind === 'fit' ? 'k6' : 'R40'}.`,
        reading.span(from, Math.max(to, from + 1)),
      ),
    )
  }
  reading.value({ type: 'word', text: typed, range: { from, to } }, 'symbol')
}
