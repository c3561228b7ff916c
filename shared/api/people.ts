/**
 * The people of the firm.
 *
 * - `GET /api/people` → `peopleList`
 * - `POST /api/people` `addPerson` → 201 `invited` (administrators); 409 `conflict` when already a member
 * - `PATCH /api/people/:id` `changePerson` → `person` (administrators); 409 for the last administrator
 * - `POST /api/people/:id/link` → `invited` (administrators): a new one-time link for somebody who has
 *   never set a password; 409 otherwise
 */
import { z } from 'zod'
import { firmRoles } from '@shared/review/permissions'
import { email, instant, line, personBrief } from './fields'

export const person = personBrief.extend({
  email: z.string(),
  role: z.enum(firmRoles),
  isActive: z.boolean(),
  /** Whether the one-time link has been used. */
  hasPassword: z.boolean(),
  /** How many calculations the person has a part on. */
  calculations: z.number().int(),
  since: instant,
})
export type Person = z.infer<typeof person>

export const peopleList = z.object({ people: z.array(person) })
export type PeopleList = z.infer<typeof peopleList>

export const addPerson = z.object({ name: line(1, 120), email, role: z.enum(firmRoles) })
export type AddPerson = z.infer<typeof addPerson>

export const invited = z.object({
  person,
  /** To be handed to the person; shown once. Null where they already sign in here with a password. */
  link: z.object({ path: z.string(), expiresAt: instant }).nullable(),
})
export type Invited = z.infer<typeof invited>

export const changePerson = z
  .object({ role: z.enum(firmRoles).optional(), isActive: z.boolean().optional() })
  .refine((change) => change.role !== undefined || change.isActive !== undefined, {
    error: 'Nothing to change was given.',
  })
export type ChangePerson = z.infer<typeof changePerson>
