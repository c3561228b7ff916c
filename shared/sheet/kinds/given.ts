import { z } from 'zod'
import { common, longText, shortText, source } from './shared'

/** An input: what is known before anything is computed. */
export const given = z.object({
  ...common,
  kind: z.literal('given'),
  /** The number as typed: `60.0` stays `60.0`; an expression never stands here. */
  value: shortText.default(''),
  unit: shortText.default(''),
  tolerance: z
    .union([z.object({ plus: shortText, minus: shortText }), z.object({ fit: shortText })])
    .optional(),
  spread: z.enum(['normal', 'uniform', 'triangular']).optional(),
  nature: z.enum(['input', 'assumption', 'constant']).default('input'),
  /** Why this is assumed. */
  basis: longText.optional(),
  toConfirm: z.object({ owner: shortText, due: shortText }).optional(),
  /** Range of validity, numbers in the given's unit. */
  range: z.object({ from: shortText.optional(), to: shortText.optional() }).optional(),
  choices: z.array(shortText).optional(),
  /** A rate in `1/s` of which the author has said that it is neither rpm nor rad/s. */
  plainRate: z.boolean().optional(),
  source,
  register: z.object({ material: shortText, property: shortText, version: shortText }).optional(),
})
