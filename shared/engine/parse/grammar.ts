/**
 * The grammar proper. mathjs parses placeholders and operators, nothing else; what it answers is taken over
 * node by node, from a list of what is allowed.
 */
import { create, parseDependencies } from 'mathjs/number'
import type { BinaryOperator, Expression } from './expression'
import { isSpace } from './characters'
import { isOffset } from '../units/unit'
import type { Leaf, Lexed } from './tokens'

interface GrammarNode {
  type: string
  op?: string
  name?: string
  args?: GrammarNode[]
  fn?: GrammarNode | string
  content?: GrammarNode
  condition?: GrammarNode
  trueExpr?: GrammarNode
  falseExpr?: GrammarNode
}

const grammar: { parse: (source: string) => unknown } = create(parseDependencies ?? {})

/** Formulas of one shape (`v0*v1/c2`) are parsed once; the nodes are never changed. */
const shapes = new Map<string, GrammarNode>()
const SHAPES_KEPT = 1000

const parseShape = (source: string): GrammarNode => {
  const kept = shapes.get(source)
  if (kept !== undefined) return kept
  const node = grammar.parse(source) as GrammarNode
  if (shapes.size >= SHAPES_KEPT) shapes.clear()
  shapes.set(source, node)
  return node
}

const binaryOperators = new Map<string, BinaryOperator>(
  (['+', '-', '*', '/', '^', '<', '<=', '>', '>=', '==', '!=', 'and', 'or'] as const).map((operator) => [
    operator,
    operator,
  ]),
)

/** The grammar answered something that the lexer should have refused. */
export class NotAllowed extends Error {}

/** Offset of the last character before `at` that is no space. */
const before = (text: string, at: number): number => {
  let place = at - 1
  while (place > 0 && isSpace(text.charCodeAt(place))) place--
  return place
}

const after = (text: string, at: number): number => {
  while (isSpace(text.charCodeAt(at))) at++
  return at
}

const convert = (node: GrammarNode | undefined, text: string, leaves: readonly Leaf[]): Expression => {
  switch (node?.type) {
    case 'SymbolNode': {
      const leaf = leaves[Number(node.name?.slice(1))]
      if (leaf === undefined || leaf.type === 'function') throw new NotAllowed(node.name)
      return leaf
    }
    case 'ParenthesisNode': {
      const inner = convert(node.content, text, leaves)
      return {
        type: 'group',
        inner,
        range: { from: before(text, inner.range.from), to: after(text, inner.range.to) + 1 },
      }
    }
    case 'OperatorNode':
      return convertOperator(node, text, leaves)
    case 'FunctionNode': {
      const named = typeof node.fn === 'string' ? node.fn : node.fn?.name
      const leaf = leaves[Number(named?.slice(1))]
      if (leaf?.type !== 'function') throw new NotAllowed(named)
      const given = (node.args ?? []).map((argument) => convert(argument, text, leaves))
      const end = given.at(-1)?.range.to ?? after(text, leaf.range.to) + 1
      return {
        type: 'call',
        name: leaf.name,
        arguments: given,
        range: { from: leaf.range.from, to: after(text, end) + 1 },
      }
    }
    case 'ConditionalNode': {
      const test = convert(node.condition, text, leaves)
      const then = convert(node.trueExpr, text, leaves)
      const otherwise = convert(node.falseExpr, text, leaves)
      return {
        type: 'conditional',
        test,
        then,
        otherwise,
        range: { from: test.range.from, to: otherwise.range.to },
      }
    }
    default:
      throw new NotAllowed(node?.type)
  }
}

const convertOperator = (node: GrammarNode, text: string, leaves: readonly Leaf[]): Expression => {
  const [first, second] = node.args ?? []
  const left = convert(first, text, leaves)
  if (second === undefined) {
    const { op } = node
    if (op !== '-' && op !== '+' && op !== 'not') throw new NotAllowed(op)
    const sign = before(text, left.range.from)
    const from = op === 'not' ? sign - 2 : sign
    // -20 degC is a temperature below zero, not the negative of an absolute one.
    if (op === '-' && left.type === 'quantity' && isOffset(left.unit)) {
      return { ...left, value: -left.value, text: `-${left.text}`, range: { from, to: left.range.to } }
    }
    return { type: 'unary', operator: op, operand: left, range: { from, to: left.range.to } }
  }
  const operator = binaryOperators.get(node.op ?? '')
  if (operator === undefined || (node.args?.length ?? 0) > 2) throw new NotAllowed(node.op)
  const right = convert(second, text, leaves)
  return { type: 'binary', operator, left, right, range: { from: left.range.from, to: right.range.to } }
}

/** The tree of a text that the lexer has read. Throws where the grammar does not allow it. */
export const treeOf = (text: string, { source, leaves }: Lexed): Expression =>
  convert(parseShape(source), text, leaves)
