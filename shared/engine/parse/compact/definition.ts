/** `symbol = …`: a given where the right side is one number, a formula where it computes. */
import { scanUnits } from '../../units/scan'
import { readUnit } from '../../units/unit'
import { isDigit, skipSpaces } from '../characters'
import { numeralAt } from '../numeral'
import { readsAsExpression } from '../prose'
import { canonicalName, readSymbolName } from '../symbolName'
import {
  line,
  none,
  type CompactContext,
  type CompactFormula,
  type CompactGiven,
  type CompactReading,
} from './fields'
import type { CompactTail } from './tail'
import { readTolerance, toleranceStart, type Tolerance } from './tolerance'

interface GivenSide {
  value: string
  unit: string
  tolerance?: Tolerance
  /** Last name of its unit, which may also be a symbol of the sheet. */
  lastUnit?: string
}

/**
 * A right side that is exactly a number, a unit phrase or none, and a tolerance or none.
 * @param mustBe in a block of givens: a misspelt unit is kept there, and the line says so
 */
const readGivenSide = (text: string, mustBe: boolean): GivenSide | undefined => {
  const signed = text[0] === '-' || text[0] === '−' || text[0] === '+' ? skipSpaces(text, 1) : 0
  if (!isDigit(text.charCodeAt(signed)) && !(text[signed] === '.' && isDigit(text.charCodeAt(signed + 1))))
    return undefined
  const { to } = numeralAt(text, signed, true)
  const rest = text.slice(to).trim()
  const start = toleranceStart(rest)
  const unit = (start < 0 ? rest : rest.slice(0, start)).trim()
  const tolerance = start < 0 ? undefined : readTolerance(rest.slice(start), unit)
  if (start >= 0 && tolerance === undefined) return undefined
  if (unit !== '' && readUnit(unit).phrase === undefined && !(mustBe && /^[^\s*/+\-(),]+$/.test(unit)))
    return undefined
  const lastUnit = scanUnits(unit, 0).at(-1)?.name
  return {
    value: text.slice(0, to).trim(),
    unit,
    ...(tolerance === undefined ? {} : { tolerance }),
    ...(lastUnit === undefined ? {} : { lastUnit }),
  }
}

/** A fit such as k6 stands among the fields of the tail; a tolerance typed behind the number goes before it. */
const givenOf = (symbol: string, side: GivenSide, tail: CompactTail): CompactGiven => {
  const { tolerance: fit, ...fields } = tail.fields
  const given = { ...tail, kind: 'given' as const, symbol, value: side.value, unit: side.unit }
  if (side.tolerance) return { ...given, tolerance: side.tolerance }
  return fit === undefined ? given : { ...given, fields, tolerance: { fit } }
}

/** A trailing `to U` is the unit field. */
const formulaOf = (symbol: string, text: string, tail: CompactTail): CompactFormula => {
  const [, expression = '', unit = ''] = /^(.*[\s)])to\s+(\S[^()]*)$/su.exec(text) ?? []
  const sides =
    expression.trim() === ''
      ? { expression: text, unit: '' }
      : { expression: expression.trim(), unit: unit.trim() }
  return { ...tail, kind: 'formula', symbol, ...sides }
}

/** `b = 10 m` beside a symbol `m`; a tolerance leaves no doubt, and nothing is defined by itself. */
const asksWhich = (symbol: string, { lastUnit, tolerance }: GivenSide, context: CompactContext): boolean => {
  if (lastUnit === undefined || tolerance !== undefined) return false
  const name = canonicalName(lastUnit)
  return name !== symbol && context.isDefined(name)
}

export const readDefinition = (
  left: string,
  right: string,
  tail: CompactTail,
  context: CompactContext,
): CompactReading => {
  const { block } = context
  const reading = readSymbolName(left, context.functions)
  if (reading.name === undefined && block === undefined) return none(reading.message)
  // In a block the line stands with its symbol as typed, and says what is wrong with it.
  const symbol = reading.name ?? left
  const formula = formulaOf(symbol, right, tail)
  if (block === 'formula') return line(formula)
  const side = readGivenSide(right, block === 'given')
  const given = side && givenOf(symbol, side, tail)
  if (block === 'given') {
    return given
      ? line(given)
      : none(
          `${right} is no number with a unit. A given holds one number; write what is computed as a formula.`,
        )
  }
  if (given) {
    return asksWhich(symbol, side, context) ? { reading: 'ambiguous', given, formula } : line(given)
  }
  return readsAsExpression(right, context) ? line(formula) : none(`${right} is no expression.`)
}
