/** A product: a thin space between symbols, a dot where numbers or units would run together. */
import { atLeast } from './brackets'
import { binding, operator, row, space, type Drawn } from './drawn'

const joint = (left: Drawn, right: Drawn) => {
  // After a unit everything would read as a further unit, before a number everything as its digits.
  if (right.first === 'number' || left.last === 'unit')
    return { tex: '\\cdot ', print: operator('·'), speech: ' times ' }
  const runsOn = [left.last, right.first].some((end) => end === 'fraction' || end === 'bracket')
  return { tex: '\\,', print: space, speech: runsOn ? ' times ' : ' ' }
}

export const drawProduct = (first: Drawn, second: Drawn): Drawn => {
  // A minus sign may open a product, never stand inside one.
  const left = atLeast(first.binding === binding.negative ? binding.negative : binding.product, first)
  const right = atLeast(binding.product, second)
  const { tex, print, speech } = joint(left, right)
  return {
    tex: left.tex + tex + right.tex,
    print: row(left.print, print, right.print),
    speech: left.speech + speech + right.speech,
    binding: left.binding === binding.negative ? binding.negative : binding.product,
    height: Math.max(left.height, right.height),
    first: left.first,
    last: right.last,
  }
}
