import { z } from 'zod'
import { common, expressionText, shortText } from './shared'

const points = z.number().int().min(2).max(10_000)

/** Outputs over a range of one given, or two. */
export const parametric = z.object({
  ...common,
  kind: z.literal('parametric'),
  vary: shortText.default(''),
  from: expressionText.default(''),
  to: expressionText.default(''),
  points: points.default(21),
  vary2: shortText.optional(),
  from2: expressionText.optional(),
  to2: expressionText.optional(),
  points2: points.optional(),
  outputs: z.array(expressionText).default([]),
})
