/**
 * A function with its arguments. Those of mathematics have their own signs; those of the library keep the
 * name that is typed, upright, so that a reader finds it again.
 */
import { bracketed, sized } from './brackets'
import { binding, row, space, upright, type Drawn } from './drawn'
import { safeTex } from './safe'

/** Functions that TeX sets by itself, with the space that belongs to them. */
const known = new Set(['sin', 'cos', 'tan', 'sinh', 'cosh', 'tanh', 'ln', 'exp', 'min', 'max'])

/** Names of mathematics that are typed differently from how they are said or set. */
const renamed: Record<string, { name: string; speech: string }> = {
  asin: { name: 'arcsin', speech: 'arc sine' },
  acos: { name: 'arccos', speech: 'arc cosine' },
  atan: { name: 'arctan', speech: 'arc tangent' },
  log: { name: 'ln', speech: 'natural logarithm' },
  ln: { name: 'ln', speech: 'natural logarithm' },
  sin: { name: 'sin', speech: 'sine' },
  cos: { name: 'cos', speech: 'cosine' },
  tan: { name: 'tan', speech: 'tangent' },
  exp: { name: 'exp', speech: 'exponential' },
  min: { name: 'min', speech: 'minimum' },
  max: { name: 'max', speech: 'maximum' },
}

export const drawCall = (name: string, args: Drawn[]): Drawn => {
  const shown = Object.hasOwn(renamed, name) ? renamed[name] : undefined
  const set = shown?.name ?? name
  const height = Math.max(1, ...args.map((argument) => argument.height))
  const list = args.map((argument) => argument.tex).join(',\\ ')
  const inner = args.flatMap((argument, i) =>
    i === 0 ? [argument.print] : [upright(','), space, argument.print],
  )
  const compound =
    args.length === 1 && args[0] && args[0].binding < binding.product ? bracketed(args[0]) : undefined
  return {
    tex: `${known.has(set) ? `\\${set}` : `\\operatorname{${safeTex(set)}}`}${sized('(', list, ')', height)}`,
    print: row(upright(set), { math: 'brackets', inner: row(...inner), open: '(', close: ')' }),
    speech: `${shown?.speech ?? set.replaceAll('_', ' ')} of ${compound?.speech ?? args.map((argument) => argument.speech).join(' and ')}`,
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
