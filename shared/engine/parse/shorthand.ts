/** The compact form of one line, as typed in a paragraph or in a block of the text form. */
import type { LibraryFunction } from '../contracts'
import { scanUnits } from '../units/scan'
import { readUnit } from '../units/unit'
import { isDigit, skipSpaces } from './characters'
import { splitTail, writeTail, type CompactTail } from './compactTail'
import { numeralAt } from './numeral'
import { readsAsExpression } from './prose'
import { canonicalName, readSymbolName } from './symbolName'

export type { CompactTail } from './compactTail'

export type Relation = '<=' | '<' | '>=' | '>' | 'within'

export type CompactGiven = CompactTail & {
  kind: 'given'
  symbol: string
  value: string
  unit: string
  tolerance?: { plus: string; minus: string } | { fit: string }
}

export type CompactFormula = CompactTail & {
  kind: 'formula'
  symbol: string
  expression: string
  unit: string
}

export type CompactCriterion = CompactTail & {
  kind: 'criterion'
  /** Empty where the author gave none. */
  symbol: string
  demand: string
  relation: Relation
  limit: string
  upper?: string
}

export type CompactFields = CompactGiven | CompactFormula | CompactCriterion

export type CompactReading =
  | { reading: 'line'; line: CompactFields }
  /** `b = 10 m` beside a symbol `m`: the author is asked. */
  | { reading: 'ambiguous'; given: CompactFields; formula: CompactFields }
  /** Ordinary text, or not readable where a line must stand: `message` says why. */
  | { reading: 'none'; message: string }

export interface CompactContext {
  isDefined(name: string): boolean
  /** Names of functions, refused as symbols; without them every called name counts as one. */
  functions?: ReadonlyMap<string, LibraryFunction>
  /** The info word of the block it stands in; absent in a paragraph. */
  block?: CompactFields['kind']
}

const none = (message: string): CompactReading => ({ reading: 'none', message })
const line = (fields: CompactFields): CompactReading => ({ reading: 'line', line: fields })

interface Division {
  at: number
  length: number
  sign: '=' | Relation
}

const signs: readonly [string, Division['sign']][] = [
  ['<=', '<='],
  ['>=', '>='],
  ['≤', '<='],
  ['≥', '>='],
  ['<', '<'],
  ['>', '>'],
]

/** The first `=` or relation outside brackets: what makes a text a definition or a criterion. */
const divisionOf = (text: string): Division | undefined => {
  let depth = 0
  for (let at = 0; at < text.length; at++) {
    const character = text[at]
    if (character === '(') depth++
    else if (character === ')') depth--
    if (depth > 0) continue
    if (character === '=' || character === '!') {
      if (text[at + 1] === '=') at++
      else if (character === '=') return { at, length: 1, sign: '=' }
      continue
    }
    const relation = signs.find(([sign]) => text.startsWith(sign, at))
    if (relation) return { at, length: relation[0].length, sign: relation[1] }
    if (character === 'w' && /^\swithin\s/.test(text.slice(at - 1, at + 7)))
      return { at, length: 6, sign: 'within' }
  }
  return undefined
}

const number = String.raw`(?:\d+(?:[.,]\d+)?|\.\d+)(?:[eE][+-]?\d+)?`
const plusMinus = new RegExp(String.raw`^(?:\+\/-|±|\+-)\s*(${number})\s*(.*)$`, 'su')
const plusAndMinus = new RegExp(
  String.raw`^([+−-])\s*(${number})\s*\/\s*([+−-]?)\s*(${number})\s*(.*)$`,
  'su',
)

type Tolerance = { plus: string; minus: string }

/** `+/- q`, `+q/-q`, in the unit of the given, which may be repeated. */
const readTolerance = (text: string, unit: string): Tolerance | undefined => {
  const symmetric = plusMinus.exec(text)
  if (symmetric) {
    const [, size = '', rest = ''] = symmetric
    return rest === '' || rest === unit ? { plus: size, minus: size } : undefined
  }
  const sides = plusAndMinus.exec(text)
  if (!sides) return undefined
  const [, above = '', plus = '', below = '', minus = '', rest = ''] = sides
  if (rest !== '' && rest !== unit) return undefined
  return { plus: above === '+' ? plus : `-${plus}`, minus: below === '+' ? `-${minus}` : minus }
}

const writeTolerance = ({ plus, minus }: Tolerance): string => {
  if (plus === minus) return ` +/- ${plus}`
  const above = plus.startsWith('-') ? plus : `+${plus}`
  return ` ${above}/${minus.startsWith('-') ? `+${minus.slice(1)}` : `-${minus}`}`
}

interface GivenSide {
  value: string
  unit: string
  tolerance?: Tolerance
  /** Last name of its unit, which may also be a symbol of the sheet. */
  lastUnit?: string
}

/** A right side that is exactly a number, a unit phrase or none, and a tolerance or none. */
const readGivenSide = (text: string, mustBe: boolean): GivenSide | undefined => {
  const signed = text[0] === '-' || text[0] === '−' || text[0] === '+' ? skipSpaces(text, 1) : 0
  if (!isDigit(text.charCodeAt(signed)) && !(text[signed] === '.' && isDigit(text.charCodeAt(signed + 1))))
    return undefined
  const { to } = numeralAt(text, signed, true)
  const rest = text.slice(to).trim()
  const start = rest.search(/(?:\+\/-|±|\+-|[+−-]\s*[\d.]+(?:e[+-]?\d+)?\s*\/)/iu)
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

/** A trailing `to U` is the unit field. */
const readFormulaSide = (text: string): { expression: string; unit: string } => {
  const asked = /^(.*[\s)])to\s+(\S[^()]*)$/su.exec(text)
  const [, expression, unit] = asked ?? []
  return expression === undefined || unit === undefined || expression.trim() === ''
    ? { expression: text, unit: '' }
    : { expression: expression.trim(), unit: unit.trim() }
}

const readDefinition = (
  left: string,
  right: string,
  tail: CompactTail,
  context: CompactContext,
): CompactReading => {
  const { block } = context
  const reading = readSymbolName(left, context.functions)
  if (reading.name === undefined && block === undefined) return none(reading.message)
  const symbol = reading.name ?? left
  const { tolerance: fit, ...fields } = tail.fields
  const side = block === 'formula' ? undefined : readGivenSide(right, block === 'given')
  const given = side && {
    ...tail,
    kind: 'given' as const,
    symbol,
    value: side.value,
    unit: side.unit,
    fields: fit === undefined || side.tolerance ? tail.fields : fields,
    ...(side.tolerance ? { tolerance: side.tolerance } : fit === undefined ? {} : { tolerance: { fit } }),
  }
  if (block === 'given') {
    return given
      ? line(given)
      : none(
          `${right} is no number with a unit. A given holds one number; write what is computed as a formula.`,
        )
  }
  const formula: CompactFormula = { ...tail, kind: 'formula', symbol, ...readFormulaSide(right) }
  if (block === 'formula') return line(formula)
  if (given) {
    const last = side.lastUnit === undefined ? undefined : canonicalName(side.lastUnit)
    const asks =
      last !== undefined && last !== symbol && side.tolerance === undefined && context.isDefined(last)
    return asks ? { reading: 'ambiguous', given, formula } : line(given)
  }
  return readsAsExpression(right, context) ? line(formula) : none(`${right} is no expression.`)
}

const readCriterion = (
  statement: string,
  division: Division | undefined,
  symbol: string,
  tail: CompactTail,
  context: CompactContext,
): CompactReading => {
  if (division === undefined || division.sign === '=') {
    return none('A criterion compares two sides: tau <= tau_allow, or phi within phi_1 .. phi_2.')
  }
  const demand = statement.slice(0, division.at).trim()
  const other = statement.slice(division.at + division.length).trim()
  let sides = [other]
  if (division.sign === 'within') {
    const [lower = '', ...rest] = other.split(/\s*(?:\.{2,3}|…)\s*/u)
    if (rest.length !== 1) return none('within takes two bounds: x within a .. b.')
    sides = [lower, ...rest]
  }
  if (demand === '' || sides.includes('')) return none('A side of the criterion is missing.')
  if (context.block === undefined && ![demand, ...sides].every((side) => readsAsExpression(side, context))) {
    return none('This is no comparison of two expressions.')
  }
  const [limit = '', upper] = sides
  return line({
    ...tail,
    kind: 'criterion',
    symbol,
    demand,
    relation: division.sign,
    limit,
    ...(upper === undefined ? {} : { upper }),
  })
}

/** Reads the text of a whole paragraph, or one line of a compact block. */
export const readCompact = (text: string, context: CompactContext): CompactReading => {
  const split = splitTail(text)
  if (split === undefined) return none('The braces at the end hold no fields. Write {key=value}.')
  const { statement, tail } = split
  const label = /^([\p{L}_][\p{L}\p{N}_'′]*)\s*:\s*(?=\S)/u.exec(statement)
  const labelled = label?.[1]
  if (label && labelled !== undefined && context.block !== 'given' && context.block !== 'formula') {
    const rest = statement.slice(label[0].length)
    const name = readSymbolName(labelled, context.functions)
    if (name.name !== undefined) return readCriterion(rest, divisionOf(rest), name.name, tail, context)
  }
  const division = divisionOf(statement)
  if (context.block === 'criterion') return readCriterion(statement, division, '', tail, context)
  if (division === undefined) return none('This is ordinary text.')
  if (division.sign !== '=') {
    return context.block === undefined
      ? readCriterion(statement, division, '', tail, context)
      : none(`A ${context.block} is written symbol = …`)
  }
  const left = statement.slice(0, division.at).trim()
  const right = statement.slice(division.at + 1).trim()
  if (right === '') return none('The right side is missing.')
  return readDefinition(left, right, tail, context)
}

const statementOf = (fields: CompactFields): string => {
  switch (fields.kind) {
    case 'given': {
      const { tolerance } = fields
      const spread = tolerance === undefined || 'fit' in tolerance ? '' : writeTolerance(tolerance)
      return `${fields.symbol} = ${fields.value}${fields.unit === '' ? '' : ` ${fields.unit}`}${spread}`
    }
    case 'formula':
      return `${fields.symbol} = ${fields.expression}${fields.unit === '' ? '' : ` to ${fields.unit}`}`
    case 'criterion': {
      const limit = fields.upper === undefined ? fields.limit : `${fields.limit} .. ${fields.upper}`
      return `${fields.symbol === '' ? '' : `${fields.symbol}: `}${fields.demand} ${fields.relation} ${limit}`
    }
  }
}

const canonical = (value: unknown): string =>
  JSON.stringify(value, (_key, part: unknown) =>
    part !== null && typeof part === 'object' && !Array.isArray(part)
      ? Object.fromEntries(Object.entries(part).sort(([a], [b]) => (a < b ? -1 : 1)))
      : part,
  )

/** The one-line form that `readCompact` reads as the same fields; undefined where only YAML can hold them. */
export const writeCompact = (fields: CompactFields): string | undefined => {
  const fit =
    fields.kind === 'given' && fields.tolerance && 'fit' in fields.tolerance
      ? fields.tolerance.fit
      : undefined
  const tail = fit === undefined ? fields : { ...fields, fields: { tolerance: fit, ...fields.fields } }
  const text = statementOf(fields) + writeTail(tail)
  if (/[\r\n\u2028\u2029]/u.test(text)) return undefined
  const back = readCompact(text, { isDefined: () => false, block: fields.kind })
  return back.reading === 'line' && canonical(back.line) === canonical(fields) ? text : undefined
}
