import type { Given } from '@shared/sheet/kinds'

type Tolerance = Given['tolerance']

/** A tolerance as it stands in its field: `0.1`, `+0.1/-0.2`, `k6`. */
export const toleranceText = (tolerance: Tolerance): string => {
  if (!tolerance) return ''
  if ('fit' in tolerance) return tolerance.fit
  return tolerance.plus === tolerance.minus ? tolerance.plus : `+${tolerance.plus}/-${tolerance.minus}`
}

/**
 * Reads what was typed: null for an empty field, undefined while it is not complete. Plus and minus keep
 * their digits as typed; a fit is a word of ISO 286 such as k6 or H7.
 */
export const readTolerance = (text: string): NonNullable<Tolerance> | null | undefined => {
  const typed = text.trim().replace(/−/g, '-')
  if (typed === '') return null
  if (/^[A-Za-z]{1,2}\d{1,2}$/.test(typed)) return { fit: typed }
  const number = String.raw`\d+(?:\.\d+)?(?:e[+-]?\d+)?`
  const sides = new RegExp(`^\\+\\s*(${number})\\s*/\\s*-\\s*(${number})$`, 'i').exec(typed)
  if (sides?.[1] !== undefined && sides[2] !== undefined) return { plus: sides[1], minus: sides[2] }
  const both = new RegExp(`^(?:\\+/-|±)?\\s*(${number})$`, 'i').exec(typed)
  return both?.[1] === undefined ? undefined : { plus: both[1], minus: both[1] }
}
