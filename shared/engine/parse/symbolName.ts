/** Symbols: Greek typed or spelled is one symbol; what may be a name, and why something else may not. */
import { isNamePart, isNameStart, isPrime } from './characters'

const spelledLetters =
  'alpha beta gamma delta epsilon zeta eta theta iota kappa lambda mu nu xi omicron pi rho sigma tau upsilon phi chi psi omega'

const greek = new Map<string, string>()
for (const [place, spelled] of spelledLetters.split(' ').entries()) {
  const small = 'αβγδεζηθικλμνξοπρστυφχψω'[place] ?? ''
  greek.set(small, spelled)
  greek.set(small.toUpperCase(), spelled.charAt(0).toUpperCase() + spelled.slice(1))
}
/** Other characters for the same letters: micro and ohm signs, final sigma, symbol forms. */
for (const [sign, spelled] of [
  ['\u00b5', 'mu'],
  ['\u2126', 'Omega'],
  ['\u03c2', 'sigma'],
  ['\u03d1', 'theta'],
  ['\u03d5', 'phi'],
  ['\u03f0', 'kappa'],
  ['\u03f1', 'rho'],
  ['\u03f5', 'epsilon'],
] as const) {
  greek.set(sign, spelled)
}
const greekNames = new Set(greek.values())

const isPlain = (text: string): boolean => {
  for (let at = 0; at < text.length; at++) if (text.charCodeAt(at) > 127) return false
  return true
}

const primes = (sign: string): string => (sign === '″' ? "''" : "'")

/**
 * Greek letters, subscript digits and primes spelled out: `τ_max` → `tau_max`, `d₀` → `d_0`.
 * Takes what is made of name characters and says nothing on validity.
 */
export const canonicalName = (typed: string): string => {
  if (isPlain(typed)) return typed
  let name = ''
  for (const character of typed) {
    const code = character.charCodeAt(0)
    const spelled = greek.get(character)
    if (spelled !== undefined) name += spelled
    else if (code >= 0x2080 && code <= 0x2089) {
      const follows = /[_0-9]$/.test(name) && /_\d*$/.test(name)
      name += (follows ? '' : '_') + String(code - 0x2080)
    } else name += code > 127 && isPrime(code) ? primes(character) : character
  }
  return name
}

/** Words of the language; a symbol cannot have them. */
const words = new Map([
  ['pi', 'pi is the number 3.14159…'],
  ['to', 'to stands before a display unit'],
  ['and', 'and joins conditions'],
  ['or', 'or joins conditions'],
  ['not', 'not turns a condition round'],
  ['within', 'within stands in criteria'],
  ['unit', 'unit("…") writes a unit'],
])

export const isLanguageWord = (name: string): boolean => words.has(name)

export type SymbolReading = { name: string; message?: undefined } | { name?: undefined; message: string }

/** A letter of another word beside a Greek one that together spell a Greek letter: `bη` would read as beta. */
const spellsAnother = (typed: string): string | undefined => {
  if (isPlain(typed)) return undefined
  return typed
    .split(/[_.']/)
    .find((part) => [...part].length > 1 && !isPlain(part) && greekNames.has(canonicalName(part)))
}

/**
 * Canonical name of a symbol as typed: `τ_max` → `tau_max`, `d₀` → `d_0`; or what is wrong with it.
 * With `functions`, names of functions are refused.
 */
export const readSymbolName = (text: string, functions?: { has(name: string): boolean }): SymbolReading => {
  const typed = text.trim()
  if (typed === '') return { message: 'A symbol is missing.' }
  if (typed.length > 100) return { message: 'A symbol has at most 100 characters.' }
  if (typed.includes('.')) {
    return {
      message: `${typed} has a point in it. A point reads a value of an analysis; a symbol of its own has none.`,
    }
  }
  for (let at = 0; at < typed.length; at++) {
    const code = typed.charCodeAt(at)
    if (at === 0 ? isNameStart(code) : isNamePart(code) || isPrime(code)) continue
    const character = String.fromCodePoint(typed.codePointAt(at) ?? 0)
    if (at === 0 && code >= 48 && code <= 57)
      return { message: `${typed} begins with a digit. A symbol begins with a letter.` }
    if (/\s/u.test(character)) {
      return { message: `${typed} has a space in it. Write ${typed.replace(/\s+/g, '_')}.` }
    }
    return {
      message: `${character} cannot stand in a symbol. A symbol has letters, Greek letters, digits, _ and primes: d_o, τ_max, T'.`,
    }
  }
  if (/^_+'*$/.test(typed) || typed.startsWith('_'))
    return { message: `${typed} begins with _. A symbol begins with a letter.` }
  if (/'[^'_]/.test(typed.replace(/[′’″]/g, "'")))
    return { message: `${typed} has a prime inside. Primes stand at the end: T_1'.` }
  const mixed = spellsAnother(typed)
  if (mixed !== undefined) {
    return {
      message: `${mixed} would read as the Greek letter ${canonicalName(mixed)}. Put _ between the letters.`,
    }
  }
  const name = canonicalName(typed)
  const taken = words.get(name)
  if (taken !== undefined) return { message: `${typed} cannot be a symbol: ${taken}.` }
  if (functions?.has(name)) return { message: `${typed} cannot be a symbol: it is a function.` }
  return { name }
}
