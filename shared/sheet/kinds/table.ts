import { z } from 'zod'
import { common, rowName, shortText, source } from './shared'

/** A data table, read by `interpolate` and `entry`. */
export const table = z.object({
  ...common,
  kind: z.literal('table'),
  columns: z
    .array(z.object({ name: rowName, unit: shortText.default('') }))
    .max(200)
    .default([]),
  rows: z
    .array(z.object({ name: rowName, cells: z.record(shortText, shortText) }))
    .max(100_000)
    .default([]),
  source,
})
