/** What people type that this language does not have, and what to write for it. */
import type { LooseProblem } from '../../errors/problem'
import { mendable, syntax } from '../problems'

/** Called, these would be read as a symbol times a bracket; nobody means that. */
const unavailable = new Set([
  'import',
  'createUnit',
  'evaluate',
  'parse',
  'compile',
  'simplify',
  'derivative',
  'resolve',
  'config',
  'help',
  'chain',
  'eval',
  'constructor',
])

export const isUnavailable = (name: string): boolean => unavailable.has(name)

const replacements: Readonly<Record<string, readonly [string, string]>> = {
  '[': ['Square brackets cannot stand in an expression. Write ( ).', '('],
  ']': ['Square brackets cannot stand in an expression. Write ( ).', ')'],
  '{': ['Curly brackets cannot stand in an expression. Write ( ).', '('],
  '}': ['Curly brackets cannot stand in an expression. Write ( ).', ')'],
  '√': ['A root is written sqrt(…).', 'sqrt'],
  '&': ['Conditions are joined with the word and.', ' and '],
}

const messages: Readonly<Record<string, string>> = {
  '=': '= cannot stand in an expression. To compare two values, write ==.',
  '!': '! cannot stand in an expression. To turn a condition round, write not.',
  '|': 'Bars cannot stand in an expression. Write abs(x) for a magnitude, or for an alternative.',
  ';': 'A semicolon cannot stand in an expression. One formula holds one value.',
  '"': 'Quotation marks stand only in unit("…").',
  "'": 'A prime stands directly after the letters of a symbol.',
  '.': 'A point stands between digits, or between a symbol and one of its values.',
  '∞': 'Infinity is no number here.',
}

/** A character that cannot stand where it does. */
export const strayCharacter = (text: string, at: number, field: string): LooseProblem => {
  const character = String.fromCodePoint(text.codePointAt(at) ?? 0)
  const span = { field, from: at, to: at + character.length }
  const replacement = Object.hasOwn(replacements, character) ? replacements[character] : undefined
  if (replacement) {
    const [message, by] = replacement
    const doubled = text.startsWith(character, at + 1) && character === '&' ? 2 : 1
    const mended = '[]{}'.includes(character)
      ? text.replace(/[[{]/g, '(').replace(/[\]}]/g, ')')
      : text.slice(0, at) + by + text.slice(at + doubled)
    return mendable(message, text, span, `Write ${by.trim()}`, mended)
  }
  const known = Object.hasOwn(messages, character) ? messages[character] : undefined
  return syntax(known ?? `${character} cannot stand in an expression.`, span)
}
