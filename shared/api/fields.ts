/** Fields that several resources share, each with the words for what is wrong. */
import { z } from 'zod'

/** In small letters, as the database gives them back: one person is never taken for two. */
export const id = z.uuid({ error: 'This is not an identifier of ours.' }).toLowerCase()
/** An instant, ISO 8601 in UTC. */
export const instant = z.iso.datetime()
/** A day without a time, as `2026-05-31`. */
export const day = z.iso.date({ error: 'A date is needed, as 2026-05-31.' })

/** One line of text without control characters, trimmed. */
export const line = (least: number, most: number) =>
  z
    .string()
    .trim()
    .min(least, least === 1 ? 'This is needed.' : `At least ${least} characters are needed.`)
    .max(most, `At most ${most} characters fit.`)
    .regex(/^\P{Cc}*$/u, 'Control characters cannot stand here.')

export const email = z
  .string()
  .trim()
  .toLowerCase()
  .max(254, 'This address is too long.')
  .pipe(z.email({ error: 'This is not an e-mail address.' }))

/** What a new password must be; signing in accepts any text. No rules of composition: length is what counts. */
export const newPassword = z
  .string()
  .min(8, 'A password needs at least 8 characters; 15 or more are better.')
  .max(200, 'A password may have at most 200 characters.')

export const personBrief = z.object({
  id,
  name: z.string(),
  /** Two letters that stand for the person beside a line. */
  initials: z.string(),
})
export type PersonBrief = z.infer<typeof personBrief>
