/**
 * A line from its parts: symbol = symbolic = substituted = result. Each part begins with its own equals
 * sign, which cannot be parted from it, and none repeats the part that follows.
 */
import type { FormulaParts, LineId, MathNode, Presentation, PrintParts } from '../contracts'
import { operator, row, type Drawn } from './drawn'

export interface DrawnParts {
  symbol: Drawn
  symbolic?: Drawn
  substituted?: Drawn
  result?: Drawn
}

const names = ['symbolic', 'substituted', 'result'] as const

/** Leaves out a part that says the same as the result, and a substituted form in which nothing was substituted. */
export const withoutRepetition = ({ symbol, symbolic, substituted, result }: DrawnParts): DrawnParts => {
  const repeats = (part: Drawn | undefined, ...others: (Drawn | undefined)[]): boolean =>
    part !== undefined && others.some((other) => other?.tex === part.tex)
  return {
    symbol,
    ...(symbolic && !repeats(symbolic, result) && { symbolic }),
    ...(substituted && !repeats(substituted, symbolic, result) && { substituted }),
    ...(result && { result }),
  }
}

/** The sentence of a line: `tau max equals 16 T over pi d cubed, 84.2 megapascal`. */
const sentence = (parts: DrawnParts, verb: string, waitsFor: readonly Drawn[]): string => {
  const said = [parts.symbolic, parts.result].flatMap((part) => (part ? [part.speech] : []))
  const start = said.length === 0 ? parts.symbol.speech : `${parts.symbol.speech}${verb} ${said.join(', ')}`
  return waitsFor.length === 0
    ? start
    : `${start}, waits for ${waitsFor.map(({ speech }) => speech).join(' and ')}`
}

interface Style {
  /** False for a criterion, whose symbol is a label: its parts are statements, not values. */
  equals: boolean
  waitsFor?: readonly Drawn[]
}

/** The three forms of a line of these parts. */
export const present = (id: LineId, parts: DrawnParts, { equals, waitsFor = [] }: Style): Presentation => {
  const tex = (part: Drawn): string => (equals ? `{=}\\;${part.tex}` : part.tex)
  const node = (part: Drawn): MathNode => (equals ? row(operator('='), part.print) : part.print)
  const screen: FormulaParts = { symbol: parts.symbol.tex }
  const print: PrintParts = { symbol: parts.symbol.print }
  for (const name of names) {
    const part = parts[name]
    if (!part) continue
    screen[name] = tex(part)
    print[name] = node(part)
  }
  return { id, screen, print, speech: sentence(parts, equals ? ' equals' : ':', waitsFor) }
}
