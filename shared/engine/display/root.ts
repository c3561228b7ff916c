/** Square and cube roots. */
import { spokenAtLeast } from './brackets'
import { binding, type Drawn } from './drawn'

const ofDegree = (radicand: Drawn, index: string, name: string): Drawn => ({
  tex: `\\sqrt${index === '' ? '' : `[${index}]`}{${radicand.tex}}`,
  print: {
    math: 'root',
    radicand: radicand.print,
    ...(index !== '' && { index: { math: 'number', text: index } }),
  },
  // What follows a root when said would belong to it: more than one factor is bracketed.
  speech: `${name} of ${spokenAtLeast(radicand.last === 'fraction' ? binding.atom : binding.quantity, radicand)}`,
  binding: binding.atom,
  height: radicand.height + 0.3,
  first: 'other',
  last: 'other',
})

export const drawSquareRoot = (radicand: Drawn): Drawn => ofDegree(radicand, '', 'square root')
export const drawCubeRoot = (radicand: Drawn): Drawn => ofDegree(radicand, '3', 'cube root')
