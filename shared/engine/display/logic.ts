/** `and`, `or`, `not`, as words. */
import { atLeast } from './brackets'
import { binding, row, space, upright, type Drawn } from './drawn'

export const drawLogic = (first: Drawn, word: 'and' | 'or', second: Drawn): Drawn => {
  const level = binding[word]
  const left = atLeast(level, first)
  const right = atLeast(word === 'and' ? binding.not : binding.and, second)
  return {
    tex: `${left.tex}\\ \\text{${word}}\\ ${right.tex}`,
    print: row(left.print, space, upright(word), space, right.print),
    speech: `${left.speech} ${word} ${right.speech}`,
    binding: level,
    height: Math.max(left.height, right.height),
    first: left.first,
    last: right.last,
  }
}

export const drawNot = (operand: Drawn): Drawn => {
  const inner = atLeast(binding.not, operand)
  return {
    tex: `\\text{not}\\ ${inner.tex}`,
    print: row(upright('not'), space, inner.print),
    speech: `not ${inner.speech}`,
    binding: binding.not,
    height: inner.height,
    first: 'other',
    last: inner.last,
  }
}
