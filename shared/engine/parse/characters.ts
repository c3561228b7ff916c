/** Characters of the expression language, by code: what may stand for what. */

/** Offsets of names and digits by table: a lexer asks this for every character. */
const Class = {
  digit: 1,
  letter: 2,
  joiner: 4,
  space: 8,
} as const

const classes = new Uint8Array(128)
for (let code = 48; code <= 57; code++) classes[code] = Class.digit
for (let code = 65; code <= 90; code++) classes[code] = Class.letter
for (let code = 97; code <= 122; code++) classes[code] = Class.letter
classes[95] = Class.joiner
for (const code of [9, 10, 11, 12, 13, 32]) classes[code] = Class.space

const classOf = (code: number): number => (code < 128 ? (classes[code] ?? 0) : 0)

export const isDigit = (code: number): boolean => code >= 48 && code <= 57

const isGreekLetter = (code: number): boolean =>
  (code >= 0x391 && code <= 0x3a9) || (code >= 0x3b1 && code <= 0x3c9) || code === 0x3d1 || code === 0x3d5

/** µ (micro), ϕ and ϑ, Ω (ohm), ε as ϵ, and the Greek letters themselves. */
const isOtherLetter = (code: number): boolean =>
  isGreekLetter(code) ||
  code === 0xb5 ||
  code === 0x2126 ||
  code === 0x3f5 ||
  code === 0x3f0 ||
  code === 0x3f1

const isSubscriptDigit = (code: number): boolean => code >= 0x2080 && code <= 0x2089

export const isNameStart = (code: number): boolean =>
  code < 128 ? (classOf(code) & (Class.letter | Class.joiner)) !== 0 : isOtherLetter(code)

export const isNamePart = (code: number): boolean =>
  code < 128
    ? (classOf(code) & (Class.letter | Class.digit | Class.joiner)) !== 0
    : isOtherLetter(code) || isSubscriptDigit(code)

export const isPrime = (code: number): boolean =>
  code === 39 || code === 0x2032 || code === 0x2019 || code === 0x2033

export const isSpace = (code: number): boolean =>
  code < 128
    ? classOf(code) === Class.space
    : code === 0xa0 ||
      (code >= 0x2000 && code <= 0x200b) ||
      code === 0x202f ||
      code === 0x3000 ||
      code === 0xfeff

export const skipSpaces = (text: string, at: number): number => {
  while (isSpace(text.charCodeAt(at))) at++
  return at
}

/** Its digit, or -1: ⁰ ¹ ² ³ ⁴ … */
export const superscriptDigit = (code: number): number => {
  if (code === 0xb9) return 1
  if (code === 0xb2) return 2
  if (code === 0xb3) return 3
  if (code === 0x2070 || (code >= 0x2074 && code <= 0x2079)) return code - 0x2070
  return -1
}
