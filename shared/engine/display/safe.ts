/**
 * The only way by which authored text enters TeX: letters, digits and a few marks by allow-list, all
 * else as an empty box. No command, brace, comment or environment can come through.
 */
const marks: Record<string, string> = {
  '\u2026': '\\ldots ',
  ' ': '\\ ',
  _: '\\_',
  '%': '\\%',
  '.': '.',
  ',': '{,}',
  '-': '\\text{-}',
  '+': '{+}',
  '/': '/',
  '(': '(',
  ')': ')',
  '·': '{\\cdot}',
  '\u00b0': '{}^{\\circ}',
  '\u00b5': '\\mu ',
  '\u03bc': '\\mu ',
  '\u03a9': '\\Omega ',
  '\u2126': '\\Omega ',
}

/** Latin letters with accents that KaTeX's text fonts have. */
const accented = /^[À-ÖØ-öø-ÿ]$/u

const safeCharacter = (character: string): string => {
  if (/^[A-Za-z0-9]$/.test(character)) return character
  if (accented.test(character)) return `\\text{${character}}`
  return Object.hasOwn(marks, character) ? (marks[character] ?? '') : '\\square '
}

export const safeTex = (text: string): string => Array.from(text, safeCharacter).join('')

/** Authored text set upright. */
export const uprightTex = (text: string): string => `\\mathrm{${safeTex(text)}}`
