import { z } from 'zod'
import { common, longText, shortText, source } from './shared'

/** A picture: an attachment with its caption. */
export const figure = z.object({
  ...common,
  kind: z.literal('figure'),
  attachment: shortText.default(''),
  caption: longText.default(''),
  source,
})
