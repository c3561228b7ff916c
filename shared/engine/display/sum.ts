/** Sums, differences and signs. */
import { atLeast } from './brackets'
import { binding, operator, row, type Drawn } from './drawn'

const words = { '+': 'plus', '-': 'minus' } as const
const signNode = (sign: '+' | '-') => operator(sign === '-' ? '−' : '+')

export const drawSum = (first: Drawn, sign: '+' | '-', second: Drawn): Drawn => {
  const left = atLeast(binding.sum, first)
  const right = atLeast(binding.product, second)
  return {
    tex: `${left.tex}${sign}${right.tex}`,
    print: row(left.print, signNode(sign), right.print),
    speech: `${left.speech} ${words[sign]} ${right.speech}`,
    binding: binding.sum,
    height: Math.max(left.height, right.height),
    first: left.first,
    last: right.last,
  }
}

export const drawSign = (sign: '+' | '-', operand: Drawn): Drawn => {
  const inner = atLeast(binding.product, operand)
  return {
    // In braces: a sign, not an operator with its spaces.
    tex: `{${sign}}${inner.tex}`,
    print: row(signNode(sign), inner.print),
    speech: `${words[sign]} ${inner.speech}`,
    binding: binding.negative,
    height: inner.height,
    first: 'other',
    last: inner.last,
  }
}
