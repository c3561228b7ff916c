import { z } from 'zod'
import { common, expressionText, rowName, shortText } from './shared'

/** Rows of an input table, each with its fixed name. */
export const inputRows = z
  .array(z.object({ name: rowName, cells: z.record(shortText, expressionText) }))
  .max(2000)

/** A torsion analysis of a named kind; its inputs are described by the analysis' spec. */
export const analysis = z.object({
  ...common,
  kind: z.literal('analysis'),
  analysis: shortText.default(''),
  inputs: z.record(shortText, z.union([expressionText, inputRows])).default({}),
})
