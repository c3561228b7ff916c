/**
 * What waits for the signed-in person.
 *
 * - `GET /api/in-tray` → `inTray`
 */
import { z } from 'zod'
import { parts } from '@shared/review/permissions'
import { revisionStates } from '@shared/review/states'
import { day, id, instant } from './fields'

export const inTrayEntry = z.object({
  /** What to do, first word of the entry: *Prepare*, *Check*, *Approve*, *Read*. */
  verb: z.string(),
  calculationId: id,
  revisionId: id,
  number: z.string(),
  letter: z.string(),
  title: z.string(),
  project: z.string(),
  state: z.enum(revisionStates),
  part: z.enum(parts).nullable(),
  /** What stands behind the title, in words: who changed what, what is waited for. */
  detail: z.string(),
  /** What was asked for by who appointed the person; the reason to open it first. */
  note: z.string(),
  dueOn: day.nullable(),
  at: instant,
})
export type InTrayEntry = z.infer<typeof inTrayEntry>

export const inTray = z.object({
  waitsForMe: z.array(inTrayEntry),
  iWaitFor: z.array(inTrayEntry),
  changed: z.array(inTrayEntry),
})
export type InTray = z.infer<typeof inTray>
