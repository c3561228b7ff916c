import type { Relation } from './fields'

/** Where a statement divides into its two sides, and by what. */
export interface Division {
  at: number
  length: number
  sign: '=' | Relation
}

const signs: readonly [string, Relation][] = [
  ['<=', '<='],
  ['>=', '>='],
  ['≤', '<='],
  ['≥', '>='],
  ['<', '<'],
  ['>', '>'],
]

/** The first `=` or relation outside brackets: what makes a text a definition or a criterion. */
export const divisionOf = (text: string): Division | undefined => {
  let depth = 0
  for (let at = 0; at < text.length; at++) {
    const character = text[at]
    if (character === '(') depth++
    else if (character === ')') depth--
    if (depth > 0) continue
    if (character === '=' || character === '!') {
      // == and != compare within a formula; they divide no line.
      if (text[at + 1] === '=') at++
      else if (character === '=') return { at, length: 1, sign: '=' }
      continue
    }
    const relation = signs.find(([sign]) => text.startsWith(sign, at))
    if (relation) return { at, length: relation[0].length, sign: relation[1] }
    if (character === 'w' && /^\swithin\s/.test(text.slice(at - 1, at + 7)))
      return { at, length: 6, sign: 'within' }
  }
  return undefined
}
