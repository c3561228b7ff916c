/** Fields that every kind of line has, and the pieces that several kinds are made of. */
import { z } from 'zod'

export const lineId = z.string().regex(/^[A-Za-z0-9_-]{1,64}$/)

/** Authored text is bounded everywhere: an expression of 10 000 characters is kept and refused by the engine. */
export const shortText = z.string().max(400)
export const longText = z.string().max(20_000)
export const expressionText = z.string().max(20_000)

export const origin = z.object({ template: shortText, edition: shortText, line: shortText })

/** The name of a table row: fixed when the row is made, never given again, so that members keep their meaning. */
export const rowName = z.string().regex(/^[A-Za-z0-9]{1,24}$/)

export const common = {
  id: lineId,
  symbol: z.string().max(200).default(''),
  note: longText.default(''),
  origin: origin.optional(),
  /** A second version of the authored fields that somebody wrote while offline; somebody chooses. */
  contested: z.object({ fields: z.record(z.string(), z.unknown()), by: shortText, at: shortText }).optional(),
}

export const source = shortText.default('')
