/** A name: a quantity of the sheet, a function with its bracket, or a unit in quotation marks. */
import { syntax } from '../../problems'
import { isDigit, isNamePart, isNameStart, isPrime, skipSpaces } from '../characters'
import { signatureOf, type CallSignature } from '../specialForms'
import { canonicalName } from '../symbolName'
import { isUnavailable } from '../unavailable'
import { readBareArgument } from './bareArguments'
import { openFrame } from './brackets'
import { multiplyImplicitly } from './operands'
import { quotedUnitAt } from './quotedUnit'
import type { Reading } from './reading'

/** A reference is name{.name}, four names at most: `C.heavy.S1.phi_end`. */
const MOST_NAMES = 4

/** End of the name that begins at the place of reading, with its members. */
export const nameEnd = (reading: Reading): number => {
  const { text, at } = reading
  let to = at
  for (let names = 1; ; names++) {
    while (isNamePart(text.charCodeAt(to)) || isPrime(text.charCodeAt(to))) to++
    const next = text.charCodeAt(to + 1)
    if (text[to] !== '.' || !(isNameStart(next) || isDigit(next))) return to
    if (names === MOST_NAMES) {
      reading.fail(
        syntax(
          `${text.slice(at, to)}… has too many points. A reference has at most three.`,
          reading.span(at, to + 1),
        ),
      )
    }
    to++
  }
}

/** `unit("N m")` without a number before it is one of that unit. */
const readQuotedUnit = (reading: Reading, bracket: number): void => {
  const { at } = reading
  const quoted = quotedUnitAt(reading, at)
  if (!quoted) {
    reading.fail(
      syntax('unit takes a unit between quotation marks: unit("N m").', reading.span(at, bracket + 1)),
    )
  }
  multiplyImplicitly(reading, at)
  if (quoted.problem) reading.problems.push(quoted.problem)
  const range = { from: at, to: quoted.to }
  reading.value({ type: 'quantity', value: 1, text: '1', unit: quoted.unit, range }, 'quantity')
}

const readCall = (
  reading: Reading,
  name: string,
  { parameters, variadic }: CallSignature,
  to: number,
  bracket: number,
): void => {
  multiplyImplicitly(reading, reading.at)
  reading.functionName(name, reading.at, to)
  reading.at = bracket
  const kinds = parameters.map((parameter) => parameter.kind)
  openFrame(reading, { name, kinds: variadic === true ? [...kinds, kinds.at(-1)] : kinds, argument: 0 })
  readBareArgument(reading)
}

/** @param to end of the name */
export const readName = (reading: Reading, to: number): void => {
  const { text, at } = reading
  const name = canonicalName(text.slice(at, to))
  const bracket = skipSpaces(text, to)
  const isCalled = text[bracket] === '('
  if (name === 'unit' && isCalled) return readQuotedUnit(reading, bracket)
  const signature = isCalled ? signatureOf(name, reading.vocabulary) : undefined
  if (signature) return readCall(reading, name, signature, to, bracket)
  if (isCalled && isUnavailable(name)) {
    reading.fail(syntax(`${name} is not available in an expression.`, reading.span(at, to)))
  }
  multiplyImplicitly(reading, at)
  if (reading.isFunction(name)) {
    reading.fail(
      syntax(
        `${name} is a function: its arguments stand in brackets after it, ${name}(…).`,
        reading.span(at, to),
      ),
    )
  }
  reading.value({ type: 'symbol', name, range: { from: at, to } }, 'symbol')
}
