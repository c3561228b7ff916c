/** What the server answers when it will not do what was asked. One shape for every route. */
import { z } from 'zod'

export const errorCodes = [
  /** 400: the request does not have the shape of its resource; `fields` says where. */
  'bad-input',
  /** 401: nobody is signed in. */
  'not-signed-in',
  /** 401: address and password do not belong together; never says which is wrong. */
  'sign-in-refused',
  /** 403: signed in, but this is not theirs to do; the message says why. */
  'not-allowed',
  /** 403: signed in, with several firms, none chosen yet. */
  'no-firm',
  /** 403: the request came from another site. */
  'wrong-origin',
  /** 404: not there, or in another firm. */
  'not-found',
  /** 409: somebody else was faster, or a rule of the work stands against it. */
  'conflict',
  /** 410: a one-time link that was used or is too old. */
  'link-expired',
  /** 413 */
  'too-large',
  /** 422: understood, but what it names cannot be used, as a given outside its range. */
  'unusable',
  /** 429 */
  'too-many',
  /** 500: ours; `reference` finds it in the log. */
  'internal',
  /** 503: the database does not answer. */
  'unavailable',
] as const
export type ErrorCode = (typeof errorCodes)[number]

export const errorBody = z.object({
  error: z.object({
    code: z.enum(errorCodes),
    /** A sentence for the person: what, where, what to do. */
    message: z.string(),
    /** Stands in the log beside what happened. */
    reference: z.string(),
    /** Which fields of the request are wrong, by path as `person.email`. */
    fields: z.array(z.object({ path: z.string(), message: z.string() })).optional(),
  }),
})
export type ErrorBody = z.infer<typeof errorBody>
