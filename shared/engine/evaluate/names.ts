/** What is wrong with the names that a line reads or defines, by the rest of the sheet. */
import type { LooseProblem } from '../contracts'
import {
  circular,
  contested,
  duplicateSymbol,
  inapplicableMember,
  memberWanted,
  nothingToRead,
  unknownMember,
  unknownSymbol,
  usedBeforeDefined,
} from '../graph/problems'
import { compare } from '../graph/readingOrder'
import { memberOf, ownerOf, type SymbolTable } from '../graph/symbolTable'
import { nearestNames } from '../parse/nearest'
import { either } from '../problems'
import { isUnitName, unitSpellings } from '../units/registry'
import { authoredText } from './authoredText'
import { builtins } from './builtins'
import { isDefiner, type SheetNode } from './sheetNode'

/** Problems that depend on who defines what and where; found again when that changes. */
export const linkProblemsOf = (node: SheetNode, symbols: SymbolTable<SheetNode>): LooseProblem[] => {
  const problems: LooseProblem[] = []
  if (node.symbolProblem) problems.push(node.symbolProblem)
  if (node.line.contested) problems.push(contested)
  if (node.defines && node.symbol !== undefined && !isDefiner(node)) {
    problems.push(duplicateSymbol(node.symbol, nextFree(node.symbol, node, symbols)))
  }
  const { circle, reading } = node
  if (circle) {
    const within = reading.reads.find((name) => circle.symbols.has(ownerOf(name)))
    problems.push(circular(circle.names, within === undefined ? undefined : reading.where(within)))
  }
  const told: string[] = []
  for (const name of reading.reads) {
    const owner = ownerOf(name)
    const definer = symbols.get(owner)?.definers[0]
    if (!definer) problems.push(unknown(name, node, symbols))
    else if (!circle && !told.includes(owner) && compare(definer.place, node.place) > 0) {
      told.push(owner)
      problems.push(usedBeforeDefined(owner, reading.where(name)))
    }
  }
  return problems
}

const unknown = (name: string, node: SheetNode, symbols: SymbolTable<SheetNode>): LooseProblem => {
  const owner = ownerOf(name)
  const span = node.reading.where(name)
  const near = nearestNames(owner, symbols.near(owner)).filter((candidate) => candidate !== node.symbol)
  const text = owner === name && span ? authoredText(node.line, span.field) : undefined
  return unknownSymbol(owner, near, span, text, otherMeaning(owner))
}

/** What the reader of a handbook means by a name that no line defines. */
const handbookNames = new Map([
  ['log', 'Write log10(x) or ln(x).'],
  ['lg', 'Write log10(x).'],
  ['arcsin', 'Write asin(x).'],
  ['arccos', 'Write acos(x).'],
  ['arctan', 'Write atan(x).'],
  ['tg', 'Write tan(x).'],
  ['e', 'Write exp(x) for a power of e.'],
])

/** A name that is a unit, or nearly one, or a function in other letters. */
const otherMeaning = (name: string): string => {
  const handbook = handbookNames.get(name.toLowerCase())
  if (handbook !== undefined) return handbook
  const small = name.toLowerCase()
  if (small !== name && (small === 'pi' || builtins.has(small))) return `Write ${small}.`
  if (isUnitName(name))
    return `${name} is a unit: a unit stands directly after its number, as in 5 ${name} or 5 ${name}^-1.`
  const units = small.length < 2 ? [] : unitSpellings().filter((unit) => unit.toLowerCase() === small)
  return units.length === 0 ? '' : `Small and capital letters differ; a unit is spelled ${either(units)}.`
}

/** `d_o` → `d_o_2`, or the next number that is free. */
const nextFree = (symbol: string, node: SheetNode, symbols: SymbolTable<SheetNode>): string => {
  for (let number = 2; ; number += 1) {
    const name = `${symbol}_${number}`
    node.asks ??= new Set()
    node.asks.add(name)
    symbols.ask(name, node)
    if (!symbols.isDefined(name)) return name
  }
}

/** Problems that depend on what kind of thing a name stands for; found again when that changes. */
export const nameProblemsOf = (node: SheetNode, symbols: SymbolTable<SheetNode>): LooseProblem[] =>
  node.circle
    ? []
    : node.reading.reads.flatMap((name) => {
        const publication = symbols.get(ownerOf(name))?.definers[0]?.published.publication
        if (!publication || (publication.type === 'quantity' && !name.includes('.'))) return []
        const owner = ownerOf(name)
        const member = memberOf(name)
        const span = node.reading.where(name)
        const text = span && authoredText(node.line, span.field)
        if (node.reading.whole.has(name) && publication.type !== 'nothing') return []
        if (publication.type === 'nothing') return [nothingToRead(owner, publication.what, span)]
        if (publication.type === 'quantity')
          return member === '' ? [] : [unknownMember(owner, member, [], span, text)]
        const members = node.reading.along.has(name) ? publication.along : publication.members
        if (member === '') return [memberWanted(owner, [...members.keys()], span)]
        return members.has(member)
          ? []
          : [unknownMember(owner, member, nearestNames(member, members.keys()), span, text)]
      })

/** Members that exist by name but have no value now: an output per row that does not apply to this one. */
export const absentMembersOf = (node: SheetNode, symbols: SymbolTable<SheetNode>): LooseProblem[] => {
  const problems: LooseProblem[] = []
  for (const name of node.reading.reads) {
    const member = memberOf(name)
    if (member === '' || node.reading.along.has(name)) continue
    const owner = ownerOf(name)
    const numbers = symbols.get(owner)?.definers[0]?.published.numbers
    if (numbers && !(member in numbers))
      problems.push(inapplicableMember(owner, member, node.reading.where(name)))
  }
  return problems
}
