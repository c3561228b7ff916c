/**
 * Who is signed in.
 *
 * - `GET /api/session` → `sessionStatus`, also when nobody is signed in
 * - `POST /api/session` `signIn` → `me`; 401 `sign-in-refused`, 429 `too-many`
 * - `DELETE /api/session` → 204
 * - `PUT /api/session/firm` `chooseFirm` → `me`
 * - `PUT /api/session/password` `changePassword` → 204; 401 `sign-in-refused` where the current one is wrong
 * - `GET /api/demo/people` → `demoPeople`; `POST /api/demo/session` `demoSignIn` → `me` (demo on loopback only, else 404)
 * - `POST /api/links/look-up` `linkLookUp` → `link`; 410 `link-expired`
 * - `POST /api/links/password` `setPassword` → 204; 410 `link-expired`
 */
import { z } from 'zod'
import { firmRoles, parts } from '@shared/review/permissions'
import { email, id, instant, line, newPassword, personBrief } from './fields'

export const signIn = z.object({
  email: line(1, 254),
  password: z.string().min(1, 'Your password is needed.').max(200),
})
export type SignIn = z.infer<typeof signIn>

export const firmBrief = z.object({
  id,
  name: z.string(),
  /** IANA name of the zone in which times are shown. */
  timeZone: z.string(),
  numberPrefix: z.string(),
})
export type FirmBrief = z.infer<typeof firmBrief>

export const me = z.object({
  account: personBrief.extend({ email: z.string(), isDemo: z.boolean() }),
  /** The firm at work in; null until one of several is chosen. */
  firm: firmBrief.nullable(),
  role: z.enum(firmRoles).nullable(),
  /** The person's present parts in that firm. */
  parts: z.array(z.object({ calculationId: id, part: z.enum(parts) })),
  /** All firms the person may choose from. */
  firms: z.array(firmBrief.extend({ role: z.enum(firmRoles) })),
})
export type Me = z.infer<typeof me>

export const sessionStatus = z.object({
  me: me.nullable(),
  /** Whether *Continue as…* is offered. */
  demo: z.boolean(),
  /** Whether there is no firm yet. */
  needsSetup: z.boolean(),
})
export type SessionStatus = z.infer<typeof sessionStatus>

export const chooseFirm = z.object({ firmId: id })
export type ChooseFirm = z.infer<typeof chooseFirm>

export const changePassword = z.object({ current: z.string().min(1).max(200), next: newPassword })
export type ChangePassword = z.infer<typeof changePassword>

export const demoPeople = z.object({
  people: z.array(
    personBrief.extend({
      role: z.enum(firmRoles),
      firm: z.string(),
      /** What waits for this person, in one sentence. */
      waiting: z.string(),
    }),
  ),
})
export type DemoPeople = z.infer<typeof demoPeople>

export const demoSignIn = z.object({ accountId: id })
export type DemoSignIn = z.infer<typeof demoSignIn>

/** The secret of a one-time link: what stands after `#` in its address, which browsers send to no server. */
export const linkToken = line(20, 100)
export const linkLookUp = z.object({ token: linkToken })
export type LinkLookUp = z.infer<typeof linkLookUp>

export const link = z.object({ name: z.string(), email, firm: z.string().nullable(), expiresAt: instant })
export type Link = z.infer<typeof link>

export const setPassword = z.object({ token: linkToken, password: newPassword })
export type SetPassword = z.infer<typeof setPassword>
