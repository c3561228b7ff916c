/** The numerical value of a quantity in a unit: {x} with the unit as index (ISO 80000-1, 6.1). */
import { sized } from './brackets'
import { binding, type Drawn } from './drawn'
import { drawUnit } from './unit'

export const drawNumericalValue = (quantity: Drawn, unit: string): Drawn => {
  const named = drawUnit(unit)
  return {
    tex: `${sized('\\{', quantity.tex, '\\}', quantity.height)}_{${named.tex}}`,
    print: {
      math: 'script',
      base: { math: 'brackets', inner: quantity.print, open: '{', close: '}' },
      sub: named.print,
    },
    speech: `numerical value of ${quantity.speech} in ${named.speech}`,
    binding: binding.atom,
    height: quantity.height + 0.2,
    first: 'bracket',
    last: 'bracket',
  }
}
