/**
 * One revision: its title block, its people, and how its sheet is opened.
 *
 * - `GET /api/revisions/:id` → `revision`
 * - `GET /api/revisions/:id/history?subject=` → `history`: the edit record, latest first, of one line,
 *   heading or front text, or of the whole sheet
 */
import { z } from 'zod'
import { firmRoles, parts, supervisionLevels } from '@shared/review/permissions'
import { revisionStates } from '@shared/review/states'
import { projectBrief } from './calculations'
import { day, id, instant, line, personBrief } from './fields'
import { participation } from './participation'

/** What the live sheet needs to be opened: `/collaboration/<documentId>`. */
export const documentOpening = z.object({
  documentId: id,
  head: z.number().int(),
  epoch: z.number().int(),
  format: z.number().int(),
  mayWrite: z.boolean(),
  /** Why it opens for reading only; empty where it may be written in. */
  reason: z.string(),
})
export type DocumentOpening = z.infer<typeof documentOpening>

export const titleBlock = z.object({
  firm: z.string(),
  number: z.string(),
  title: z.string(),
  revision: z.string(),
  state: z.enum(revisionStates),
  isOnHold: z.boolean(),
  project: projectBrief,
  prepared: z.array(personBrief),
  checked: z.array(personBrief),
  approved: z.array(personBrief),
  dueOn: day.nullable(),
  /** When the sheet was last written in. */
  changedAt: instant,
})
export type TitleBlock = z.infer<typeof titleBlock>

export const revision = z.object({
  id,
  calculationId: id,
  letter: z.string(),
  state: z.enum(revisionStates),
  isOnHold: z.boolean(),
  reason: z.string(),
  createdAt: instant,
  titleBlock,
  participations: z.array(participation),
  document: documentOpening,
  /** The signed-in person's standing: what `may()` of shared/review/permissions asks for. */
  standing: z.object({
    role: z.enum(firmRoles),
    parts: z.array(z.enum(parts)),
    state: z.enum(revisionStates),
    supervision: z.enum(supervisionLevels),
  }),
})
export type Revision = z.infer<typeof revision>

export const historyQuery = z.object({ subject: line(1, 200).optional() })
export type HistoryQuery = z.infer<typeof historyQuery>

export const historyEntry = z.object({
  head: z.number().int(),
  /** Null where the program itself wrote. */
  person: personBrief.nullable(),
  subject: z.enum(['line', 'block', 'front']),
  subjectId: z.string(),
  field: z.string(),
  before: z.unknown(),
  after: z.unknown(),
  at: instant,
})
export type HistoryEntry = z.infer<typeof historyEntry>

export const history = z.object({
  entries: z.array(historyEntry),
  /** Whether older entries were left off. */
  isCut: z.boolean(),
})
export type History = z.infer<typeof history>
