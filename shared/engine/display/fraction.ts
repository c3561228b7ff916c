/** A quotient: a bar, the outermost one full size; on one line in exponents. */
import { atLeast, spokenAtLeast } from './brackets'
import { binding, operator, row, type Drawn, type Setting } from './drawn'

const onOneLine = (over: Drawn, under: Drawn): Drawn => {
  const left = atLeast(binding.product, over)
  const right = atLeast(binding.quantity, under)
  return {
    tex: `${left.tex}/${right.tex}`,
    print: row(left.print, operator('/'), right.print),
    speech: `${left.speech} over ${right.speech}`,
    binding: binding.product,
    height: Math.max(left.height, right.height),
    first: left.first,
    last: 'fraction',
  }
}

/** How deep the parts of a fraction are set. */
export const insideFraction = (setting: Setting): Setting => ({ ...setting, depth: setting.depth + 1 })

/** `setting` is that of the fraction; its parts are drawn in `insideFraction(setting)`. */
export const drawFraction = (over: Drawn, under: Drawn, setting: Setting): Drawn => {
  if (setting.inline) return onOneLine(over, under)
  const outermost = setting.depth === 0
  const said = (part: Drawn): string =>
    part.binding === binding.fraction || part.last === 'fraction'
      ? `open bracket ${part.speech} close bracket`
      : spokenAtLeast(binding.negative, part)
  return {
    tex: `${outermost ? '\\dfrac' : '\\frac'}{${over.tex}}{${under.tex}}`,
    print: { math: 'fraction', over: over.print, under: under.print },
    speech: `${said(over)} over ${said(under)}`,
    binding: binding.fraction,
    height: (over.height + under.height + 0.3) * (outermost ? 1 : 0.7),
    first: 'fraction',
    last: 'fraction',
  }
}
