import { isDigit, isNamePart, isNameStart, isPrime, skipSpaces } from '../../engine/parse/characters'
import { readSymbolName } from '../../engine/parse/symbolName'

/** One-word units that are also likely symbols: after a number and `*` or `/` they are taken as units. */
const unitWords = new Set(
  'm s g h N K W J A V l L t min rad deg rev in ft yd lb lbf kip Pa bar psi ksi hp kg mm cm'.split(' '),
)

export interface Renaming {
  from: string
  to: string
  /** Whether this symbol is that of load cases, whose members are named by symbols: `LC1.a.tau`. */
  isCases?: (symbol: string) => boolean
}

const canonical = (name: string): string => readSymbolName(name).name ?? name

const nameEnd = (text: string, at: number): number => {
  let end = at
  while (end < text.length && isNamePart(text.charCodeAt(end))) end++
  while (end < text.length && isPrime(text.charCodeAt(end))) end++
  return end
}

const numberEnd = (text: string, at: number): number => {
  const found = /^\d+(?:\.\d+)?(?:[eE][+-]?\d+)?/.exec(text.slice(at, at + 60))
  return at + (found?.[0].length ?? 1)
}

/**
 * Whether the name that starts at `at` continues a unit phrase which began with a number: `10 m`,
 * `800 N m`, `9.81 m/s^2`. `phraseEnd` is where that phrase ended so far.
 */
const continuesUnit = (text: string, at: number, phraseEnd: number, name: string): boolean => {
  if (phraseEnd < 0) return false
  const between = text.slice(phraseEnd, at)
  if (between.trim() === '') return true
  return /^(?:\^-?\d+)?\s*(?:[*/·]\s*)?$/.test(between) && (unitWords.has(name) || !/[*/·]/.test(between))
}

const renamedChain = (names: string[], { from, to, isCases }: Renaming): string[] => {
  const head = canonical(names[0] ?? '')
  return names.map((name, depth) => {
    if (depth === 0) return head === from ? to : name
    return depth === 2 && isCases?.(head) && canonical(name) === from ? to : name
  })
}

/** The text with one symbol renamed wherever it is read; units of the same name stay units. */
export const renameInText = (text: string, renaming: Renaming): string => {
  const target = /^(.*\S)\s+to\s+[^()]*$/.exec(text)
  const readTo = target?.[1] === undefined ? text.length : target[1].length
  let result = ''
  let at = 0
  let phraseEnd = -1
  while (at < readTo) {
    const code = text.charCodeAt(at)
    if (isDigit(code)) {
      const end = numberEnd(text, at)
      result += text.slice(at, end)
      if (text[at - 1] !== '^' && text[at - 1] !== '-') phraseEnd = end
      else if (phraseEnd >= 0) phraseEnd = end
      at = end
      continue
    }
    if (!isNameStart(code)) {
      if (code === 40 || code === 41 || code === 44 || code === 43) phraseEnd = -1
      result += text[at]
      at++
      continue
    }
    const names: string[] = []
    let end = at
    do {
      const start = names.length === 0 ? end : end + 1
      end = nameEnd(text, start)
      names.push(text.slice(start, end))
    } while (text[end] === '.' && isNamePart(text.charCodeAt(end + 1)))
    const word = text.slice(at, end)
    const isUnit = continuesUnit(text, at, phraseEnd, word) || isUnitArgument(text, at, end)
    if (isUnit && phraseEnd >= 0) phraseEnd = end
    else phraseEnd = -1
    result += isUnit ? word : renamedChain(names, renaming).join('.')
    at = end
  }
  return result + text.slice(readTo)
}

/** `MPa` in `numerical_value(x, MPa)`. */
const isUnitArgument = (text: string, at: number, end: number): boolean =>
  text[skipSpaces(text, end)] === ')' &&
  /numerical_value\([^()]*(?:\([^()]*\)[^()]*)*,\s*$/.test(text.slice(0, at))
