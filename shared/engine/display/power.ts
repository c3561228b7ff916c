/** A power: the exponent raised, divisions in it on one line; a quantity with a unit as base gets brackets. */
import type { MathNode } from '../contracts'
import { atLeast, spokenAtLeast } from './brackets'
import { binding, type Drawn, type Setting } from './drawn'

/** The exponent's setting. */
export const inExponent = (setting: Setting): Setting => ({ ...setting, inline: true })

const raised = (base: MathNode, sup: MathNode): MathNode =>
  base.math === 'script' && !base.sup ? { ...base, sup } : { math: 'script', base, sup }

const spokenExponent = (exponent: Drawn): string => {
  if (exponent.tex === '2') return 'squared'
  if (exponent.tex === '3') return 'cubed'
  return `to the power ${spokenAtLeast(binding.negative, exponent)}`
}

export const drawPower = (base: Drawn, exponent: Drawn): Drawn => {
  const below = atLeast(binding.atom, base)
  return {
    tex: `${below.tex}^{${exponent.tex}}`,
    print: raised(below.print, exponent.print),
    speech: `${below.speech} ${spokenExponent(exponent)}`,
    binding: binding.power,
    height: below.height + 0.2,
    first: below.first,
    last: 'other',
  }
}
