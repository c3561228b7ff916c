/**
 * Typst ends at a certain depth of calls, and the whole document with it. Mathematics nested deeper than
 * anybody reads it as fractions is therefore written on one line from that depth on.
 */
import type { MathNode } from '@shared/engine/contracts'

const DEEPEST = 14

const upright = (text: string): MathNode => ({ math: 'upright', text })
const bracketed = (inner: MathNode): MathNode[] => [upright('('), ...onOneLine(inner), upright(')')]

/** Leaves only, so that the line can break at each of its signs. */
const onOneLine = (node: MathNode): MathNode[] => {
  switch (node.math) {
    case 'row':
      return node.items.flatMap(onOneLine)
    case 'fraction':
      return [...bracketed(node.over), { math: 'operator', text: '/' }, ...bracketed(node.under)]
    case 'root':
      return [upright('√'), ...bracketed(node.radicand)]
    case 'script': {
      const { sup, ...rest } = node
      return [
        ...(isLeaf(node.base) ? [rest] : onOneLine(node.base)),
        ...(sup ? [upright('^'), ...bracketed(sup)] : []),
      ]
    }
    case 'brackets':
      return [upright(node.open), ...onOneLine(node.inner), upright(node.close)]
    default:
      return [node]
  }
}

const isLeaf = ({ math }: MathNode): boolean => math === 'letter' || math === 'upright' || math === 'number'

const shallowNode = (node: MathNode, depth: number): MathNode => {
  if (depth > DEEPEST) return { math: 'row', items: onOneLine(node) }
  const deeper = (inner: MathNode) => shallowNode(inner, depth + 1)
  switch (node.math) {
    case 'row':
      return { ...node, items: node.items.map(deeper) }
    case 'fraction':
      return { ...node, over: deeper(node.over), under: deeper(node.under) }
    case 'root':
      return { ...node, radicand: deeper(node.radicand) }
    case 'script':
      return { ...node, base: deeper(node.base), ...(node.sup && { sup: deeper(node.sup) }) }
    case 'brackets':
      return { ...node, inner: deeper(node.inner) }
    default:
      return node
  }
}

/** The tree, no deeper than the press can draw. */
export const shallow = (node: MathNode): MathNode => shallowNode(node, 0)
