import { z } from 'zod'
import { common, expressionText, shortText } from './shared'

/** The value of one given that just satisfies one criterion, rounded to the satisfied side. */
export const sizing = z.object({
  ...common,
  kind: z.literal('sizing'),
  vary: shortText.default(''),
  criterion: shortText.default(''),
  between: z.tuple([expressionText, expressionText]).default(['', '']),
  series: z.enum(['exact', 'R5', 'R10', 'R20', 'R40', 'list']).default('exact'),
  /** Stock sizes where `series` is `list`. */
  list: z.array(expressionText).optional(),
})
