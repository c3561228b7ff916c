/** What can be read off a tree without computing. */
import type { Expression, TextRange } from '../parse/expression'
import type { Call } from './compileContext'

const partsOf = (expression: Expression): Expression[] => {
  switch (expression.type) {
    case 'unary':
      return [expression.operand]
    case 'binary':
      return [expression.left, expression.right]
    case 'group':
      return [expression.inner]
    case 'call':
      return expression.arguments
    case 'conditional':
      return [expression.test, expression.then, expression.otherwise]
    default:
      return []
  }
}

/** The quantity along a member that an `at()` asks for, by its full name. */
export const alongName = (call: Call): string | undefined => {
  const [first] = call.arguments
  return call.name === 'at' && first?.type === 'symbol' ? first.name : undefined
}

/** Names that stand as the first argument of an `at()`. */
export const alongNames = (expression: Expression): string[] => {
  const name = expression.type === 'call' ? alongName(expression) : undefined
  const inParts = partsOf(expression).flatMap(alongNames)
  return name === undefined ? inParts : [name, ...inParts]
}

/** Where a symbol stands first. */
export const firstPlace = (expression: Expression, name: string): TextRange | undefined => {
  if (expression.type === 'symbol' && expression.name === name) return expression.range
  for (const part of partsOf(expression)) {
    const place = firstPlace(part, name)
    if (place) return place
  }
  return undefined
}
