import { z } from 'zod'
import { common, expressionText, shortText, source } from './shared'

/** Demand against limit. */
export const criterion = z.object({
  ...common,
  kind: z.literal('criterion'),
  title: shortText.default(''),
  demand: expressionText.default(''),
  relation: z.enum(['<=', '<', '>=', '>', 'within']).default('<='),
  limit: expressionText.default(''),
  /** Upper bound of *within*; `limit` is the lower one. */
  upper: expressionText.optional(),
  /** The demand's sign has a meaning: a negative one may pass an upper limit. */
  signed: z.boolean().optional(),
  source,
})
