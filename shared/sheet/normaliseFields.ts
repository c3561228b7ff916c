import { lineSchema } from './kinds'
import type { Line } from './kinds'
import type { Front } from './sheet'
import { frontSchema } from './sheet'

const unsayable = /(?![\t\n\r])[\p{Cc}\p{Cs}\p{Noncharacter_Code_Point}]/gu

/** Text that Markdown, XML and UTF-8 can say: halves of characters and control characters become U+FFFD. */
export const wellFormed = (text: string): string => text.replace(unsayable, '\uFFFD')

const isRecord = (value: unknown): value is Record<string, unknown> =>
  typeof value === 'object' && value !== null

/** Texts made well-formed everywhere, absent members left out. */
const clean = (value: unknown): unknown => {
  if (typeof value === 'string') return wellFormed(value)
  if (Array.isArray(value)) return value.map(clean)
  if (!isRecord(value)) return value
  const cleaned: Record<string, unknown> = {}
  for (const [key, member] of Object.entries(value)) {
    if (member === undefined) continue
    const name = wellFormed(key)
    Object.defineProperty(cleaned, name, {
      value: clean(member),
      enumerable: true,
      writable: true,
      configurable: true,
    })
  }
  return cleaned
}

/** Optional texts and records that say nothing are left out. */
const optional = ['tolerance', 'basis', 'toConfirm', 'range', 'register', 'upper', 'choices', 'list'] as const

const saysNothing = (value: unknown): boolean => {
  if (value === '') return true
  if (Array.isArray(value)) return value.length === 0
  return isRecord(value) && Object.values(value).every((member) => member === '')
}

export const normaliseLine = (line: Line): Line => {
  const cleaned = clean(line) as Record<string, unknown>
  for (const field of optional)
    if (field in cleaned && saysNothing(cleaned[field])) Reflect.deleteProperty(cleaned, field)
  for (const flag of ['reported', 'signed', 'plainRate'])
    if (cleaned[flag] === false) Reflect.deleteProperty(cleaned, flag)
  if (isRecord(cleaned.range)) {
    cleaned.range = Object.fromEntries(Object.entries(cleaned.range).filter(([, bound]) => bound !== ''))
  }
  return lineSchema.parse(cleaned)
}

export const normaliseFront = (front: Front): Front => frontSchema.parse(clean(front))
