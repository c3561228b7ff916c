import { z } from 'zod'
import { common, expressionText, shortText, source } from './shared'

/** Symbol = expression. */
export const formula = z.object({
  ...common,
  kind: z.literal('formula'),
  expression: expressionText.default(''),
  /** Display unit; the text form writes it as a trailing `to`. */
  unit: shortText.default(''),
  digits: z.number().int().min(1).max(15).optional(),
  /** Stands in the summary of results. */
  reported: z.boolean().optional(),
  source,
})
