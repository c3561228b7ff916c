/** A given: the number and the unit exactly as typed, with its tolerance. */
import type { Presentation } from '../contracts'
import { binding, operator, row, space, upright, type Drawn } from './drawn'
import { drawNumber } from './numeral'
import { present } from './parts'
import { drawQuantityText } from './quantity'
import { uprightTex } from './safe'
import { drawSymbol } from './symbol'
import type { GivenView } from './views'

type Tolerance = NonNullable<GivenView['tolerance']>

const withFit = (value: Drawn, fit: string): Drawn => ({
  ...value,
  tex: `${value.tex}\\ ${uprightTex(fit)}`,
  print: row(value.print, space, upright(fit)),
  speech: `${value.speech}, fit ${fit}`,
})

const withTolerance = (value: Drawn, tolerance: Tolerance, unit: string): Drawn => {
  if ('fit' in tolerance) return withFit(value, tolerance.fit)
  const plus = drawNumber(tolerance.plus.replace(/^\s*\+/, ''))
  const minus = drawNumber(tolerance.minus.replace(/^\s*[-−]/, ''))
  if (plus.tex === minus.tex) {
    const deviation = drawQuantityText(tolerance.plus.replace(/^\s*\+/, ''), unit)
    return {
      ...value,
      tex: `${value.tex}\\pm ${deviation.tex}`,
      print: row(value.print, operator('±'), deviation.print),
      speech: `${value.speech} plus or minus ${deviation.speech}`,
    }
  }
  return {
    ...value,
    tex: `${value.tex}\\,{}^{+${plus.tex}}_{-${minus.tex}}`,
    print: row(value.print, space, {
      math: 'script',
      base: upright(''),
      sup: row(operator('+'), plus.print),
      sub: row(operator('−'), minus.print),
    }),
    speech: `${value.speech} plus ${plus.speech} minus ${minus.speech}`,
    binding: binding.sum,
  }
}

/** A given without a number shows its symbol alone. */
export const presentGiven = ({ id, symbol, value, unit, tolerance }: GivenView): Presentation => {
  const name = drawSymbol(symbol)
  if (value.trim() === '') return present(id, { symbol: name }, { equals: true })
  const typed = drawQuantityText(value, unit)
  const result = tolerance ? withTolerance(typed, tolerance, unit) : typed
  return present(id, { symbol: name, result }, { equals: true })
}
