/** Quoted values of the prose: each follows the line whose symbol it names. */
import type { LooseProblem, Quantity, Quote, QuoteResult } from '../contracts'
import { inWords } from '../dimensions/words'
import { sameDimension } from '../dimensions/dimension'
import { nothingToRead, unknownMember, unknownSymbol } from '../graph/problems'
import { memberOf, ownerOf, type SymbolTable } from '../graph/symbolTable'
import { canonicalName } from '../parse/symbolName'
import { dimensionOfUnit, readUnit } from '../units/unit'
import { formatQuantity } from '../display/number'
import { quantityOf } from './quantity'
import type { SheetNode } from './sheetNode'

export class Quotes {
  private quotes: readonly Quote[] = []
  private bySymbol = new Map<string, Quote[]>()

  constructor(private readonly symbols: SymbolTable<SheetNode>) {}

  replace(quotes: readonly Quote[]): void {
    this.quotes = quotes
    this.bySymbol = new Map()
    for (const quote of quotes) {
      const owner = ownerOf(canonicalName(quote.symbol.trim()))
      const others = this.bySymbol.get(owner)
      if (others) others.push(quote)
      else this.bySymbol.set(owner, [quote])
    }
  }

  all(): QuoteResult[] {
    return this.quotes.map((quote) => this.result(quote))
  }

  of(symbols: Iterable<string>): QuoteResult[] {
    return [...symbols]
      .flatMap((symbol) => this.bySymbol.get(symbol) ?? [])
      .map((quote) => this.result(quote))
  }

  private result(quote: Quote): QuoteResult {
    const { id } = quote
    const name = canonicalName(quote.symbol.trim())
    const definer = this.symbols.get(ownerOf(name))?.definers[0]
    if (!definer) return refused(id, unknownSymbol(name, [], undefined, undefined))
    const value = valueOf(definer, memberOf(name))
    if (value) return shown(quote, value)
    const { publication } = definer.published
    if (publication?.type === 'nothing') return refused(id, nothingToRead(name, publication.what, undefined))
    if (publication && !hasMember(publication, memberOf(name))) {
      return refused(id, unknownMember(ownerOf(name), memberOf(name) || '…', [], undefined, undefined))
    }
    return { id, state: 'waits' }
  }
}

type Publication = NonNullable<SheetNode['published']['publication']>

const hasMember = (publication: Publication, member: string): boolean =>
  publication.type === 'analysis' ? publication.members.has(member) : member === ''

const valueOf = ({ result }: SheetNode, member: string): Quantity | undefined =>
  member === '' ? result.value : result.analysis?.members[member]

const refused = (id: string, problem: LooseProblem): QuoteResult => ({
  id,
  state: 'problem',
  problem: { ...problem, severity: 'error' },
})

const shown = ({ id, unit, digits }: Quote, value: Quantity): QuoteResult => {
  if (unit === undefined || unit.trim() === '') {
    if (digits === undefined) return { id, state: 'value', value }
    return {
      id,
      state: 'value',
      value: { ...value, shown: formatQuantity(value.number, value.unit, digits) },
    }
  }
  const { phrase, problem } = readUnit(unit)
  if (!phrase) return refused(id, problem)
  if (!sameDimension(dimensionOfUnit(phrase), value.dimension))
    return refused(id, otherUnit(value, phrase.text))
  return { id, state: 'value', value: quantityOf(value.si, value.dimension, phrase, digits ?? 3) }
}

const otherUnit = (value: Quantity, unit: string): LooseProblem => ({
  code: 'unit-mismatch',
  message: `The quoted value is ${inWords(value.dimension)}: it cannot be shown in ${unit}.`,
})
