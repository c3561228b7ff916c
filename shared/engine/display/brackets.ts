/**
 * Brackets: the pairs that precedence needs and those that were typed. Sized by the height of what they
 * hold, by `\bigl` and its kin: `\left` would close a group in which a long line cannot break.
 */
import { binding, type Binding, type Drawn } from './drawn'

const sizes = [
  { upTo: 1.3, size: '' },
  { upTo: 1.6, size: '\\big' },
  { upTo: 2, size: '\\Big' },
  { upTo: 2.6, size: '\\bigg' },
  { upTo: Infinity, size: '\\Bigg' },
]

/** A pair of delimiters around TeX of a height: `\biggl(…\biggr)`. */
export const sized = (open: string, tex: string, close: string, height: number): string => {
  const size = sizes.find(({ upTo }) => height <= upTo)?.size ?? ''
  return size === '' ? `${open}${tex}${close}` : `${size}l${open}${tex}${size}r${close}`
}

export const bracketed = (inner: Drawn): Drawn => ({
  tex: sized('(', inner.tex, ')', inner.height),
  print: { math: 'brackets', inner: inner.print, open: '(', close: ')' },
  speech: `open bracket ${inner.speech} close bracket`,
  binding: binding.atom,
  height: inner.height + 0.1,
  first: 'bracket',
  last: 'bracket',
})

/** Brackets where a piece binds less tightly than its place asks. */
export const atLeast = (needed: Binding, piece: Drawn): Drawn =>
  piece.binding < needed ? bracketed(piece) : piece

/** The same for what is only said: a bar or a root shows on paper how far it goes, a voice does not. */
export const spokenAtLeast = (needed: Binding, piece: Drawn): string =>
  piece.binding < needed ? `open bracket ${piece.speech} close bracket` : piece.speech
