/**
 * Numbers and payloads of the socket's messages; README.md beside this file shows them byte by byte.
 * 0 to 3 are those of y-protocols; ours begin at 10.
 */
import { z } from 'zod'
import { limits } from './limits'
import { penKeyPattern } from './penKeys'
import { personHereSchema } from './presence'

export const messages = {
  sync: 0,
  awareness: 1,
  queryAwareness: 3,
  /** Server → client, first of all. */
  welcome: 10,
  /** Client → server: a numbered update. */
  change: 11,
  /** Server → client: that number is committed. */
  stored: 12,
  /** Client → server: take, keep or release pens. */
  askPens: 13,
  /** Server → client: the answer to one such question. */
  answerPens: 14,
  /** Server → client: who holds which pens now, all of them. */
  pens: 15,
  /** Server → client: what this person may do has changed. */
  rights: 16,
} as const

export const syncSteps = { stateVector: 0, state: 1, update: 2 } as const

const penKey = z.string().regex(penKeyPattern)
export const heldPenSchema = z.object({ key: penKey, holder: personHereSchema, until: z.string() })
export type HeldPen = z.infer<typeof heldPenSchema>

export const welcomeSchema = z.object({
  document: z.string(),
  format: z.number().int(),
  epoch: z.number().int(),
  head: z.number().int(),
  /** Whether this person may change the sheet now. */
  mayWrite: z.boolean(),
  person: personHereSchema,
  pens: z.array(heldPenSchema),
})
export type Welcome = z.infer<typeof welcomeSchema>

export const askPensSchema = z.object({
  request: z.number().int().min(0),
  act: z.enum(['take', 'keep', 'release']),
  keys: z.array(penKey).min(1).max(limits.pensAtOnce),
})
export type AskPens = z.infer<typeof askPensSchema>

/** All or none: `granted` is true only if every key was. `head` is applied by the asker before it writes. */
export const answerPensSchema = z.object({
  request: z.number().int(),
  granted: z.boolean(),
  head: z.number().int(),
  /** The pens that stood in the way. */
  taken: z.array(heldPenSchema),
})
export type AnswerPens = z.infer<typeof answerPensSchema>

export const pensSchema = z.object({ pens: z.array(heldPenSchema) })
export const rightsSchema = z.object({ mayWrite: z.boolean() })
