import { z } from 'zod'
import { common, expressionText, shortText } from './shared'

/** Spread of outputs from the plus and minus of the givens. */
export const tolerance = z.object({
  ...common,
  kind: z.literal('tolerance'),
  outputs: z.array(expressionText).default([]),
  criteria: z.array(shortText).default([]),
  method: z.enum(['worst-case', 'root-sum-square', 'monte-carlo']).default('worst-case'),
  samples: z.number().int().min(100).max(10_000_000).default(100_000),
  seed: z.number().int().min(0).max(4_294_967_295).default(1),
})
