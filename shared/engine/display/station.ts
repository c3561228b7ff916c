/** A quantity along a member at a station: `at(S1.T, x)` is set as S1.T(x), closed up where a product has its space. */
import { sized } from './brackets'
import { binding, row, type Drawn } from './drawn'

export const drawStation = (curve: Drawn, station: Drawn): Drawn => ({
  tex: `${curve.tex}${sized('(', station.tex, ')', station.height)}`,
  print: row(curve.print, { math: 'brackets', inner: station.print, open: '(', close: ')' }),
  speech: `${curve.speech} at ${station.speech}`,
  binding: binding.atom,
  height: Math.max(curve.height, station.height) + 0.1,
  first: 'other',
  last: 'bracket',
})
