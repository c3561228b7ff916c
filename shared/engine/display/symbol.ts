/**
 * A symbol: `tau_max`, `d_o_2`, `T'`, `S1.phi_end`. Quantities are set in italic, words and numbers in
 * their indices upright, axes in indices italic (ISO 80000-1, 7.1.4). Different names never look alike.
 */
import type { MathNode } from '../contracts'
import { binding, row, upright, type Drawn } from './drawn'
import { greekLetter } from './greek'
import { uprightTex } from './safe'

interface Piece {
  tex: string
  print: MathNode
  speech: string
}

const letter = (character: string, tex = character): Pick<Piece, 'tex' | 'print'> => ({
  tex,
  print: { math: 'letter', text: character },
})

/** A name without index and primes: one letter, a Greek letter, `Delta` before either, or a word. */
const head = (name: string): Piece => {
  const greek = greekLetter(name)
  if (greek) return { ...letter(greek.character, greek.tex), speech: greek.speech }
  if (/^[A-Za-z]$/.test(name)) return { ...letter(name), speech: name }
  const rest = name.startsWith('Delta') ? name.slice('Delta'.length) : ''
  if (/^[A-Za-z]$/.test(rest) || greekLetter(rest)) {
    const difference = upright('Δ')
    const of = head(rest)
    return { tex: `\\Delta ${of.tex}`, print: row(difference, of.print), speech: `delta ${of.speech}` }
  }
  return { tex: uprightTex(name), print: upright(name), speech: name }
}

const indexPart = (part: string): Piece => {
  if (part === '') return { tex: '\\_', print: upright('_'), speech: 'underscore' }
  const { bare, primes } = withoutPrimes(part)
  const isQuantity = greekLetter(bare) !== undefined || /^[xyz]$/.test(bare)
  const base = isQuantity ? head(bare) : { tex: uprightTex(bare), print: upright(bare), speech: bare }
  return primes === 0 ? base : primed(base, primes)
}

const withoutPrimes = (name: string): { bare: string; primes: number } => {
  const bare = name.replace(/['′]+$/u, '')
  return { bare, primes: name.length - bare.length }
}

const primeWords = (primes: number): string =>
  primes === 0 ? '' : primes === 1 ? ' prime' : primes === 2 ? ' double prime' : ` ${primes} primes`

const primed = (base: Piece, primes: number): Piece => ({
  tex: base.tex + "'".repeat(primes),
  print: { math: 'script', base: base.print, primes },
  speech: base.speech + primeWords(primes),
})

const index = (parts: string[]): Piece | undefined => {
  if (parts.length === 0) return undefined
  const pieces = parts.map(indexPart)
  return {
    tex: pieces.map((piece) => piece.tex).join('{,}'),
    print: row(...pieces.flatMap((piece, i) => (i === 0 ? [piece.print] : [upright(','), piece.print]))),
    speech: pieces.map((piece) => piece.speech).join(' '),
  }
}

/** One name, without members. */
const simple = (name: string): Piece => {
  const [first = '', ...parts] = name.split('_')
  const { bare, primes } = withoutPrimes(first)
  const base = head(bare)
  const sub = index(parts)
  if (!sub) return primes === 0 ? base : primed(base, primes)
  return {
    // The index before the primes: TeX takes a power after these, but no second superscript after an index.
    tex: `${base.tex}_{${sub.tex}}${"'".repeat(primes)}`,
    print: { math: 'script', base: base.print, sub: sub.print, ...(primes > 0 && { primes }) },
    speech: `${base.speech}${primeWords(primes)} ${sub.speech}`,
  }
}

/** @param name canonical name, Greek spelled out, members after points. */
export const drawSymbol = (name: string): Drawn => {
  const names = name.split('.')
  const last = simple(names.at(-1) ?? '')
  const owners = names.slice(0, -1).map((owner) => simple(owner))
  const owner = (piece: Piece): MathNode[] => [piece.print, upright('.')]
  return {
    tex: owners.map((piece) => `${piece.tex}\\mathrm{.}`).join('') + last.tex,
    print: row(...owners.flatMap(owner), last.print),
    speech: [last, ...owners.reverse()].map((piece) => piece.speech).join(' of '),
    binding: binding.atom,
    height: 1,
    first: 'other',
    last: 'other',
  }
}
