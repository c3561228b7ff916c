import { z } from 'zod'
import { common, expressionText, rowName, shortText } from './shared'

/** Load cases: named rows, each replacing some givens. */
export const cases = z.object({
  ...common,
  kind: z.literal('cases'),
  rows: z
    .array(
      z.object({ name: rowName, title: shortText.optional(), cells: z.record(shortText, expressionText) }),
    )
    .max(1000)
    .default([]),
  outputs: z.array(expressionText).default([]),
  criteria: z.array(shortText).default([]),
})
