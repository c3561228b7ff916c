import { isDimensionless, quotient, type Dimension } from './dimension'
import { inWords } from './words'

const hasNoName = (words: string): boolean => words.startsWith('a quantity in')

/** The factor that would mend a dimension, as a sentence behind the message; empty where none can be named. */
export const mending = (own: Dimension, wanted: Dimension): string => {
  if (isDimensionless(own)) return ' A bare number needs a unit there.'
  if (isDimensionless(wanted)) return ''
  const surplus = inWords(quotient(own, wanted))
  if (!hasNoName(surplus)) return ` Divided by ${surplus}, it would be ${inWords(wanted)}.`
  const missing = inWords(quotient(wanted, own))
  return hasNoName(missing) ? '' : ` Times ${missing}, it would be ${inWords(wanted)}.`
}
