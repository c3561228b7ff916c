/** A number, as written: digits in groups of three from five on, powers of ten (ISO 80000-1, 7.3). */
import type { MathNode } from '../contracts'
import { binding, operator, row, space, type Drawn } from './drawn'
import { readNumber, type WrittenNumber } from './number'
import { safeTex } from './safe'

/** `12345.6` → `['12', '345.6']`: where thin spaces go. */
const groups = (mantissa: string): string[] => {
  const [whole = '', fraction] = mantissa.split('.')
  const left = whole.length < 5 ? [whole] : whole.replace(/\B(?=(\d{3})+$)/g, ' ').split(' ')
  if (fraction === undefined) return left
  const right = fraction.length < 5 ? [fraction] : (fraction.match(/\d{1,3}/g) ?? [])
  const joint = `${left.pop() ?? ''}.${right.shift() ?? ''}`
  return [...left, joint, ...right]
}

const withSpaces = (parts: string[]): MathNode[] =>
  parts.flatMap((text, i): MathNode[] => (i === 0 ? [] : [space]).concat({ math: 'number', text }))

const spokenPower = (exponent: number): string =>
  ` times 10 to the power ${exponent < 0 ? `minus ${-exponent}` : exponent}`

const minus = operator('−')

export const drawWritten = ({ negative, mantissa, exponent }: WrittenNumber): Drawn => {
  const parts = groups(mantissa)
  const grouped = parts.join('\\,')
  const ten: MathNode[] =
    exponent === undefined
      ? []
      : [
          operator('×'),
          {
            math: 'script',
            base: { math: 'number', text: '10' },
            sup: row(...(exponent < 0 ? [minus] : []), { math: 'number', text: String(Math.abs(exponent)) }),
          },
        ]
  return {
    // In braces, so that no line breaks between a number and its power of ten.
    tex: `${negative ? '{-}' : ''}${exponent === undefined ? grouped : `{${grouped}\\times 10^{${exponent}}}`}`,
    print: row(...(negative ? [minus] : []), ...withSpaces(parts), ...ten),
    speech: `${negative ? 'minus ' : ''}${mantissa}${exponent === undefined ? '' : spokenPower(exponent)}`,
    binding: negative ? binding.negative : exponent === undefined ? binding.atom : binding.quantity,
    height: 1,
    first: negative ? 'other' : 'number',
    last: 'number',
  }
}

/** @param text as typed or as `formatNumber` wrote it; anything else is set upright, letter by letter. */
export const drawNumber = (text: string): Drawn => {
  const number = readNumber(text)
  if (number) return drawWritten(number)
  return {
    tex: `\\mathrm{${safeTex(text)}}`,
    print: { math: 'upright', text },
    speech: text,
    binding: binding.atom,
    height: 1,
    first: 'number',
    last: 'number',
  }
}
