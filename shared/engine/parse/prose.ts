/** Tells an expression from ordinary words that happen to have an equals sign among them. */
import type { LibraryFunction } from '../contracts'
import type { Expression } from './expression'
import { parseExpression } from './parse'

interface Names {
  isDefined(name: string): boolean
  functions?: ReadonlyMap<string, LibraryFunction>
}

/** Takes every called name for a function; used where nobody says which there are. */
class AnyFunction extends Map<string, LibraryFunction> {
  override get(name: string): LibraryFunction {
    return {
      name,
      parameters: [],
      variadic: true,
      dimension: () => [],
      evaluate: () => Number.NaN,
      help: { title: name, source: '' },
    }
  }
}
const anyFunction = new AnyFunction()

const edge = (node: Expression, side: 'left' | 'right'): Expression => {
  if (node.type === 'binary') return edge(node[side], side)
  return node.type === 'unary' ? edge(node.operand, side) : node
}

/** Two names side by side, one of them unknown to the sheet: words rather than a product. */
const hasWords = (node: Expression, text: string, isDefined: (name: string) => boolean): boolean => {
  switch (node.type) {
    case 'binary': {
      if (node.operator === '*' && text.slice(node.left.range.to, node.right.range.from).trim() === '') {
        const pair = [edge(node.left, 'right'), edge(node.right, 'left')]
        const names = pair.flatMap((side) => (side.type === 'symbol' ? [side.name] : []))
        if (names.length === 2 && !names.every((name) => name === 'pi' || isDefined(name))) return true
      }
      return hasWords(node.left, text, isDefined) || hasWords(node.right, text, isDefined)
    }
    case 'unary':
      return hasWords(node.operand, text, isDefined)
    case 'group':
      return hasWords(node.inner, text, isDefined)
    case 'call':
      return node.arguments.some((argument) => hasWords(argument, text, isDefined))
    case 'conditional':
      return [node.test, node.then, node.otherwise].some((part) => hasWords(part, text, isDefined))
    default:
      return false
  }
}

/** Slips that the line itself shows with their repair; the text is an expression all the same. */
const shownOnTheLine = new Set(['ambiguous-unit', 'ambiguous-division', 'decimal-comma', 'unknown-unit'])

export const readsAsExpression = (text: string, { isDefined, functions }: Names): boolean => {
  const { parsed, problems } = parseExpression(text, { isDefined, functions: functions ?? anyFunction })
  if (parsed === undefined)
    return problems.length > 0 && problems.every(({ code }) => shownOnTheLine.has(code))
  return !hasWords(parsed.root, text, isDefined)
}
