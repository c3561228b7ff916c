/**
 * Reusable sheets. Using one is `POST /api/calculations` with `beginning: { kind: 'template', … }`.
 *
 * - `GET /api/templates` → `templateList`
 * - `GET /api/templates/:name` → `template`
 */
import { z } from 'zod'
import { sheetSchema } from '@shared/sheet/sheet'

export const templateSummary = z.object({
  /** Its file name without `.md`; what the address uses. */
  name: z.string(),
  title: z.string(),
  edition: z.string(),
  purpose: z.string(),
  method: z.string(),
  unitSystem: z.enum(['SI', 'US']),
  lines: z.number().int(),
  criteria: z.number().int(),
})
export type TemplateSummary = z.infer<typeof templateSummary>

export const templateList = z.object({ templates: z.array(templateSummary) })
export type TemplateList = z.infer<typeof templateList>

/** One field of the form of a template's givens. */
export const templateGiven = z.object({
  line: z.string(),
  symbol: z.string(),
  note: z.string(),
  value: z.string(),
  unit: z.string(),
  source: z.string(),
  nature: z.enum(['input', 'assumption', 'constant']),
  range: z.object({ from: z.string().optional(), to: z.string().optional() }).nullable(),
  choices: z.array(z.string()),
})
export type TemplateGiven = z.infer<typeof templateGiven>

export const template = templateSummary.extend({
  givens: z.array(templateGiven),
  sheet: sheetSchema,
})
export type Template = z.infer<typeof template>
