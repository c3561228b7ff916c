/** Reads expressions in tests as a sheet would, from the units of its symbols alone. */
import { checkDimensions, type DimensionResult } from '@shared/engine/dimensions/check'
import { builtins } from '@shared/engine/evaluate/builtins'
import type { Expression, UnitPhrase } from '@shared/engine/parse/expression'
import { parseExpression, type ParseResult } from '@shared/engine/parse/parse'
import { dimensionOfUnit, readUnit } from '@shared/engine/units/unit'
import type { LooseProblem } from '@shared/errors/problem'

export const unit = (text: string): UnitPhrase => {
  const { phrase, problem } = readUnit(text)
  if (phrase === undefined) throw new Error(problem.message)
  return phrase
}

/** @param symbols of the sheet, separated by spaces */
export const read = (text: string, symbols = '', onlyUnit = false): ParseResult => {
  const defined = new Set(symbols.split(' '))
  return parseExpression(text, { isDefined: (name) => defined.has(name), functions: builtins, onlyUnit })
}

/** The tree as full brackets: `(16*T)/{(pi*(d^3))}`; groups as typed stand in braces, phrases in square brackets. */
export const shape = (node: Expression): string => {
  switch (node.type) {
    case 'number':
      return String(node.value)
    case 'quantity':
      return `${node.value}[${node.unit.text}]`
    case 'symbol':
      return node.name
    case 'unary':
      return `(${node.operator} ${shape(node.operand)})`
    case 'binary':
      return `(${shape(node.left)} ${node.operator} ${shape(node.right)})`
    case 'group':
      return `{${shape(node.inner)}}`
    case 'call':
      return `${node.name}<${node.arguments.map(shape).join(', ')}>`
    case 'conditional':
      return `(${shape(node.test)} ? ${shape(node.then)} : ${shape(node.otherwise)})`
    case 'word':
      return node.text
    case 'unit':
      return `[${node.unit.text}]`
  }
}

/** The shape of a text that must be readable. */
export const tree = (text: string, symbols = ''): string => {
  const { parsed, problems } = read(text, symbols)
  if (parsed === undefined) throw new Error(problems.map((problem) => problem.message).join(' '))
  return shape(parsed.root) + (parsed.to === undefined ? '' : ` to ${parsed.to.text}`)
}

export interface Said {
  code: string
  message: string
  /** The piece of text that is underlined. */
  at: string
  repairs: string[]
}

export const said = (text: string, problems: readonly LooseProblem[]): Said[] =>
  problems.map(({ code, message, span, repairs }) => ({
    code,
    message,
    at: text.slice(span?.from ?? 0, span?.to ?? text.length),
    repairs: (repairs ?? []).map(({ fields }) => Object.values(fields)[0] ?? ''),
  }))

/** What is wrong with a text, and the texts of its repairs. */
export const complaints = (text: string, symbols = ''): Said[] => said(text, read(text, symbols).problems)

/** Checks a formula whose symbols have these units. */
export const checked = (text: string, units: Record<string, string>): DimensionResult & { said: Said[] } => {
  const { parsed, problems } = read(text)
  if (parsed === undefined) throw new Error(problems.map((problem) => problem.message).join(' '))
  const known = new Map(Object.entries(units).map(([name, typed]) => [name, unit(typed)]))
  const result = checkDimensions(parsed, {
    dimensionOfSymbol: (name) => {
      const phrase = known.get(name)
      return phrase && dimensionOfUnit(phrase)
    },
    unitOfSymbol: (name) => known.get(name),
    functions: builtins,
  })
  return { ...result, said: said(text, result.problems) }
}
