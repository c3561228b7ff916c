/** Texts of repairs: the expression as typed, with some of its pieces replaced or left out. */
import type { Expression, ParsedExpression } from '../parse/expression'

/** By node: what takes its place; null leaves it out. */
export type Edits = ReadonlyMap<Expression, string | null>

const slice = (text: string, node: Expression): string => text.slice(node.range.from, node.range.to)

/** `node` as typed, with `edits`; null where nothing is left of it. Only products are opened. */
export const rewritten = (text: string, node: Expression, edits: Edits): string | null => {
  const edit = edits.get(node)
  if (edit !== undefined) return edit
  switch (node.type) {
    case 'group': {
      const inner = rewritten(text, node.inner, edits)
      if (inner === null) return null
      if (inner === slice(text, node.inner)) return slice(text, node)
      return /^[A-Za-z_0-9.]+(?:\([^()]*\))?$/.test(inner) ? inner : `(${inner})`
    }
    case 'unary': {
      const operand = rewritten(text, node.operand, edits)
      if (operand === slice(text, node.operand)) return slice(text, node)
      return operand === null ? null : `${node.operator}${operand}`
    }
    case 'binary': {
      if (node.operator !== '*' && node.operator !== '/') return slice(text, node)
      const left = rewritten(text, node.left, edits)
      const right = rewritten(text, node.right, edits)
      if (left === slice(text, node.left) && right === slice(text, node.right)) return slice(text, node)
      if (right === null) return left
      if (left === null) return node.operator === '*' ? right : `1/${right}`
      return `${left}${node.operator}${right}`
    }
    default:
      return slice(text, node)
  }
}

/** The whole text with `by` in the place of `node`. */
export const withNode = ({ text }: ParsedExpression, node: Expression, by: string): string =>
  text.slice(0, node.range.from) + by + text.slice(node.range.to)
