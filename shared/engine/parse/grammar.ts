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
  content?: GrammarNode
  condition?: GrammarNode
  trueExpr?: GrammarNode
  falseExpr?: GrammarNode
}

const grammar: { parse: (source: string) => unknown } = create(parseDependencies ?? {})

/** Formulas of one shape (`v*v/(v^v)`) are parsed once; the nodes are never changed. */
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

/** Takes a shape over, and the leaves in their order: the order of the text is that of the tree. */
class Conversion {
  private next = 0

  constructor(
    private readonly text: string,
    private readonly leaves: readonly Leaf[],
  ) {}

  of(node: GrammarNode | undefined): Expression {
    switch (node?.type) {
      case 'SymbolNode': {
        const leaf = this.leaves[this.next++]
        if (leaf === undefined || leaf.type === 'function') throw new NotAllowed(node.name)
        return leaf
      }
      case 'OperatorNode':
        return this.operator(node)
      case 'ParenthesisNode': {
        const { text } = this
        const inner = this.of(node.content)
        return {
          type: 'group',
          inner,
          range: { from: before(text, inner.range.from), to: after(text, inner.range.to) + 1 },
        }
      }
      case 'FunctionNode':
        return this.call(node)
      case 'ConditionalNode': {
        const test = this.of(node.condition)
        const then = this.of(node.trueExpr)
        const otherwise = this.of(node.falseExpr)
        const range = { from: test.range.from, to: otherwise.range.to }
        return { type: 'conditional', test, then, otherwise, range }
      }
      default:
        throw new NotAllowed(node?.type)
    }
  }

  private call(node: GrammarNode): Expression {
    const leaf = this.leaves[this.next++]
    if (leaf?.type !== 'function') throw new NotAllowed(leaf?.type)
    const given = (node.args ?? []).map((argument) => this.of(argument))
    const end = given.at(-1)?.range.to ?? after(this.text, leaf.range.to) + 1
    const range = { from: leaf.range.from, to: after(this.text, end) + 1 }
    return { type: 'call', name: leaf.name, arguments: given, range }
  }

  private operator(node: GrammarNode): Expression {
    const given = node.args ?? []
    const left = this.of(given[0])
    if (given.length === 1) return this.unary(node.op, left)
    const operator = binaryOperators.get(node.op ?? '')
    if (operator === undefined || given.length !== 2) throw new NotAllowed(node.op)
    const right = this.of(given[1])
    return { type: 'binary', operator, left, right, range: { from: left.range.from, to: right.range.to } }
  }

  private unary(operator: string | undefined, operand: Expression): Expression {
    if (operator !== '-' && operator !== '+' && operator !== 'not') throw new NotAllowed(operator)
    const sign = before(this.text, operand.range.from)
    const range = { from: operator === 'not' ? sign - 2 : sign, to: operand.range.to }
    // -20 degC is a temperature below zero, not the negative of an absolute one.
    if (operator === '-' && operand.type === 'quantity' && isOffset(operand.unit)) {
      return { ...operand, value: -operand.value, text: `-${operand.text}`, range }
    }
    return { type: 'unary', operator, operand, range }
  }
}

/** The tree of a text that the lexer has read. Throws where the grammar does not allow it. */
export const treeOf = (text: string, { source, leaves }: Lexed): Expression =>
  new Conversion(text, leaves).of(parseShape(source))
