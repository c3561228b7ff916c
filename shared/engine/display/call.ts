/**
 * A function with its arguments. Those of mathematics have their own signs; those of the library keep the
 * name that is typed, upright, so that a reader finds it again.
 */
import type { MathNode } from '../contracts'
import { bracketed, sized } from './brackets'
import { binding, row, space, upright, type Drawn } from './drawn'
import { safeTex } from './safe'

interface Known {
  tex: string
  /** Set upright, with an index where it has one. */
  name: string
  index?: string
  speech: string
}

/** Functions of mathematics, by the names under which they are typed (ISO 80000-2, 13 and 14). */
const known: Record<string, Known> = {
  sin: { tex: '\\sin', name: 'sin', speech: 'sine' },
  cos: { tex: '\\cos', name: 'cos', speech: 'cosine' },
  tan: { tex: '\\tan', name: 'tan', speech: 'tangent' },
  asin: { tex: '\\arcsin', name: 'arcsin', speech: 'arc sine' },
  acos: { tex: '\\arccos', name: 'arccos', speech: 'arc cosine' },
  atan: { tex: '\\arctan', name: 'arctan', speech: 'arc tangent' },
  sinh: { tex: '\\sinh', name: 'sinh', speech: 'hyperbolic sine' },
  cosh: { tex: '\\cosh', name: 'cosh', speech: 'hyperbolic cosine' },
  tanh: { tex: '\\tanh', name: 'tanh', speech: 'hyperbolic tangent' },
  exp: { tex: '\\exp', name: 'exp', speech: 'exponential' },
  ln: { tex: '\\ln', name: 'ln', speech: 'natural logarithm' },
  log10: { tex: '\\log_{10}', name: 'log', index: '10', speech: 'decimal logarithm' },
  min: { tex: '\\min', name: 'min', speech: 'minimum' },
  max: { tex: '\\max', name: 'max', speech: 'maximum' },
}

const named = (name: string): Known =>
  (Object.hasOwn(known, name) ? known[name] : undefined) ?? {
    tex: `\\operatorname{${safeTex(name)}}`,
    name,
    speech: name.replaceAll('_', ' '),
  }

export const drawCall = (name: string, args: Drawn[]): Drawn => {
  const { tex, name: shown, index, speech } = named(name)
  const height = Math.max(1, ...args.map((argument) => argument.height))
  const list = args.map((argument) => argument.tex).join(',\\ ')
  const inner = args.flatMap((argument, i) =>
    i === 0 ? [argument.print] : [upright(','), space, argument.print],
  )
  const isSum = args.length === 1 && (args[0]?.binding ?? binding.atom) < binding.product
  const said = args.map((argument) => (isSum ? bracketed(argument) : argument).speech).join(' and ')
  const script: MathNode = index
    ? { math: 'script', base: upright(shown), sub: { math: 'number', text: index } }
    : upright(shown)
  return {
    tex: `${tex}${sized('(', list, ')', height)}`,
    print: row(script, { math: 'brackets', inner: row(...inner), open: '(', close: ')' }),
    speech: `${speech} of ${said}`,
    binding: binding.atom,
    height: height + 0.1,
    first: 'other',
    last: 'bracket',
  }
}

/** An absolute value, between bars. */
export const drawAbsolute = (argument: Drawn): Drawn => ({
  tex: sized('\\lvert ', argument.tex, '\\rvert ', argument.height),
  print: { math: 'brackets', inner: argument.print, open: '|', close: '|' },
  speech: `absolute value of ${argument.binding < binding.quantity ? bracketed(argument).speech : argument.speech}`,
  binding: binding.atom,
  height: argument.height + 0.1,
  first: 'bracket',
  last: 'bracket',
})
