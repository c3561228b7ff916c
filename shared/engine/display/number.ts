/**
 * Numbers as text, by significant digits: `84.2`, `0.00310`, `84.2×10⁶`. A number never claims digits
 * that were not asked for (no zeros to fill up), and one that is not zero never shows as 0.
 */
const superscripts: Record<string, string> = {
  '-': '⁻',
  0: '⁰',
  1: '¹',
  2: '²',
  3: '³',
  4: '⁴',
  5: '⁵',
  6: '⁶',
  7: '⁷',
  8: '⁸',
  9: '⁹',
}
const digitOf = new Map(Object.entries(superscripts).map(([digit, raised]) => [raised, digit]))

export const raise = (text: string): string => Array.from(text, (c) => superscripts[c] ?? c).join('')
export const lower = (text: string): string => Array.from(text, (c) => digitOf.get(c) ?? c).join('')

/** A written number: `-84.2×10⁶` is `{ negative: true, mantissa: '84.2', exponent: 6 }`. */
export interface WrittenNumber {
  negative: boolean
  /** Digits as written: `60.0` stays `60.0`. */
  mantissa: string
  exponent?: number
}

const written =
  /^([-−+]?)\s*(\d+\.?\d*|\.\d+)(?:[eE]([-+]?\d+)|\s*[*·×]\s*10\s*(?:\^\s*\(?\s*)?([-−]?\d+)\)?)?$/u

/** Reads a number as typed or as `formatNumber` wrote it; undefined where it is none. */
export const readNumber = (text: string): WrittenNumber | undefined => {
  // `10⁶` is lowered to `10^6` first, so that `×10⁶` and `*10^6` are read alike.
  const plain = text.trim().replace(/10([⁻⁰¹²³⁴⁵⁶⁷⁸⁹]+)$/u, (_, raised: string) => `10^${lower(raised)}`)
  const match = written.exec(plain)
  if (!match) return undefined
  const exponent = match[3] ?? match[4]?.replace('−', '-')
  return {
    negative: match[1] === '-' || match[1] === '−',
    mantissa: match[2] ?? '',
    ...(exponent !== undefined && { exponent: Number(exponent) }),
  }
}

const withExponent = (value: number, digits: number, exponent: number): string => {
  const [mantissa = '', scale = '0'] = value.toExponential(digits - 1).split('e')
  const bare = mantissa.replace('.', '')
  const places = Number(scale) - exponent + 1
  const sign = bare.startsWith('-') ? '-' : ''
  const figures = bare.replace('-', '')
  const shifted = figures.length > places ? `${figures.slice(0, places)}.${figures.slice(places)}` : figures
  return `${sign}${shifted}×10${raise(String(exponent))}`
}

/**
 * @param digits significant digits, 1 to 15.
 * Plain from 0.001 up to as many places as there are digits; three digits also show 1000 to 9999, whole
 * (1234 rpm, never 1.23×10³ rpm). Beyond, powers of ten in steps of three, and of one where a step of
 * three would have to fill up with zeros.
 */
export const formatNumber = (value: number, { digits = 3 }: { digits?: number } = {}): string => {
  if (value === 0) return '0'
  if (!Number.isFinite(value)) return 'not finite'
  const asked = Math.min(15, Math.max(1, Math.round(digits)))
  const scale = Number(value.toExponential(asked - 1).split('e')[1])
  if (asked === 3 && Math.abs(value) >= 999.5 && Math.abs(value) < 9999.5) return value.toFixed(0)
  if (scale >= -3 && scale < Math.min(asked, 9)) return value.toFixed(Math.max(0, asked - 1 - scale))
  const engineering = Math.floor(scale / 3) * 3
  return withExponent(value, asked, scale - engineering < asked ? engineering : scale)
}

/** `84.2 MPa`: number in `unit`, and the unit as typed. */
export const formatQuantity = (number: number, unit: string, digits?: number): string => {
  const text = formatNumber(number, digits === undefined ? {} : { digits })
  return unit.trim() === '' ? text : `${text} ${unit.trim()}`
}
