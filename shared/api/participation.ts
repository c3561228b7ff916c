/**
 * The parts of people on a calculation.
 *
 * - `POST /api/calculations/:id/participations` `appoint` → 201 `participationList`
 * - `POST /api/calculations/:id/participations/:participation/hand-over` `handOver` → `participationList`
 * - `DELETE /api/calculations/:id/participations/:participation` → `participationList`: one's own is
 *   given up; another's is ended by a preparer or an administrator. 409 for the last preparer.
 */
import { z } from 'zod'
import { parts } from '@shared/review/permissions'
import { id, instant, line, personBrief } from './fields'

export const participation = z.object({
  id,
  person: personBrief.extend({ isActive: z.boolean() }),
  part: z.enum(parts),
  appointedBy: personBrief,
  appointedAt: instant,
  /** What is asked of the person, in the words of who appointed them. */
  note: z.string(),
})
export type Participation = z.infer<typeof participation>

export const participationList = z.object({ participations: z.array(participation) })
export type ParticipationList = z.infer<typeof participationList>

export const appoint = z.object({ accountId: id, part: z.enum(parts), note: line(0, 400).default('') })
export type Appoint = z.infer<typeof appoint>
export type AppointInput = z.input<typeof appoint>

export const handOver = z.object({ accountId: id, note: line(0, 400).default('') })
export type HandOver = z.infer<typeof handOver>
export type HandOverInput = z.input<typeof handOver>
