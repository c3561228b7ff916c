/**
 * What a `/` divides, where a reader on paper and a grammar would differ. Both readings become repairs; none is
 * chosen silently, since the wrong one is off by a factor that nobody notices.
 */
import { ambiguousDivision } from '../../problems'
import { skipSpaces } from '../characters'
import type { Numeral } from '../numeral'
import type { Frame } from '../tokens'
import type { Reading } from './reading'

/** `16 T/pi d^3`, `E/2(1+nu)`: an implicit product within the divisor, which ends here. */
export const settleDivision = (reading: Reading, frame: Frame): void => {
  const { slash, gaps } = frame
  frame.slash = undefined
  if (slash === undefined || gaps.length === 0) return
  frame.gaps = []
  const { text, end } = reading
  const from = skipSpaces(text, slash)
  const divisor = text.slice(from, end)
  let apart = text.slice(from, gaps[0]?.from)
  for (const [place, gap] of gaps.entries()) apart += `*${text.slice(gap.to, gaps[place + 1]?.from ?? end)}`
  reading.problems.push(
    ambiguousDivision(
      `/${divisor}`,
      [`(${divisor})`, apart].map((divided) => ({
        shown: `/${divided}`,
        text: text.slice(0, from) + divided + text.slice(end),
      })),
      reading.span(slash - 1, end),
    ),
  )
}

/**
 * `E/2*10^3`: whether the power of ten, one token with its digits, is divided, too.
 * @param to end of the number with its unit phrase
 */
export const checkPowerOfTen = (reading: Reading, { times }: Numeral, to: number): void => {
  if (times === undefined || reading.operator !== '/' || reading.before !== 'operator') return
  const { text, at } = reading
  const apart = `${text.slice(at, times).trim()}*(${text.slice(skipSpaces(text, times + 1), to)})`
  reading.problems.push(
    ambiguousDivision(
      `/${text.slice(at, to)}`,
      [`(${text.slice(at, to)})`, apart].map((divided) => ({
        shown: `/${divided}`,
        text: text.slice(0, at) + divided + text.slice(to),
      })),
      reading.span(reading.operatorFrom, to),
    ),
  )
}
