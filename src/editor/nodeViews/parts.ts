/** Pieces that the views of several kinds are made of. */
import type { FormulaParts, Presentation, Quantity } from '@shared/engine/contracts'
import type { Line } from '@shared/sheet/kinds'
import { symbolParts, symbolText } from '@/editor/symbolText'
import { element } from '../element'
import { typeset } from '../katex'
import type { Desk } from '../desk'

export interface LineDrawing {
  /** What stands right of the equals axis, for the eye. */
  body: HTMLElement[]
  /** What is said about the line, after its note: what it rests on, and where it is reported. */
  remarks?: HTMLElement[]
  /** The line as one would say it, where the engine has not said it yet. */
  speech: string
}

export type DrawLine<L extends Line = Line> = (line: L, desk: Desk) => LineDrawing

/** Mathematics with a plain text to read until KaTeX is there. */
export const mathematics = (tex: string, className: string, plain: string): HTMLElement => {
  const made = element('span', { class: className, 'aria-hidden': 'true' }, plain)
  typeset(made, tex)
  return made
}

/**
 * The parts of a line of mathematics: symbolic, substituted, result. Each begins with its equals sign
 * and wraps onto its own row; the result never scrolls.
 */
export const formulaParts = (parts: FormulaParts | undefined, plain: string, stale: boolean): HTMLElement => {
  const row = element('div', { class: 'line__parts', 'aria-hidden': 'true' })
  if (!parts || !(parts.symbolic || parts.substituted || parts.result)) {
    row.append(element('span', { class: 'line__part line__part--plain' }, plain))
    return row
  }
  const { symbolic, substituted, result } = parts
  if (symbolic) row.append(mathematics(symbolic, 'line__part', ''))
  if (substituted) row.append(mathematics(substituted, 'line__part', ''))
  if (result)
    row.append(mathematics(result, `line__part line__result${stale ? ' line__result--stale' : ''}`, plain))
  return row
}

export const symbolShown = (presentation: Presentation | undefined, line: Line): HTMLElement =>
  presentation?.screen.symbol
    ? mathematics(presentation.screen.symbol, 'line__symbol-tex', symbolText(line.symbol))
    : element('span', { class: 'line__symbol-tex', 'aria-hidden': 'true' }, symbolText(line.symbol))

export const spoken = (symbol: string, quantity: Quantity | undefined): string =>
  quantity ? `${symbolText(symbol)} equals ${quantity.shown}` : symbolText(symbol)

/**
 * Whether a symbol is wider than its place left of the equals axis, and takes a row of its own. Estimated
 * from its letters: measuring would lay out every line once more.
 */
export const isWiderThanHang = (symbol: string): boolean => {
  const { base, index } = symbolParts(symbol)
  return base.length * 10 + index.length * 6.5 > 62
}
