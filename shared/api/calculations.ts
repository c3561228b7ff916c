/**
 * Numbered calculations.
 *
 * - `GET /api/calculations?project=&state=&mine=&search=` → `calculationList`
 * - `POST /api/calculations` `newCalculation` → 201 `calculation`; 422 `unusable` for a given that the
 *   template does not take
 * - `GET /api/calculations/:id` → `calculation`
 * - `PATCH /api/calculations/:id` `changeTitleBlock` → `calculation`
 */
import { z } from 'zod'
import { parts, supervisionLevels } from '@shared/review/permissions'
import { revisionStates } from '@shared/review/states'
import { day, id, instant, line, personBrief } from './fields'
import { participation } from './participation'

export const calculationFilter = z.object({
  project: id.optional(),
  state: z.enum(revisionStates).optional(),
  /** Only those on which one has a part. */
  mine: z.enum(['true', 'false']).optional(),
  /** Words of number, title or project. */
  search: line(0, 200).optional(),
})
export type CalculationFilter = z.infer<typeof calculationFilter>

export const revisionBrief = z.object({
  id,
  letter: z.string(),
  state: z.enum(revisionStates),
  isOnHold: z.boolean(),
  createdAt: instant,
  stateChangedAt: instant,
})
export type RevisionBrief = z.infer<typeof revisionBrief>

export const projectBrief = z.object({
  id,
  number: z.string(),
  name: z.string(),
  client: z.string(),
  supervision: z.enum(supervisionLevels),
})
export type ProjectBrief = z.infer<typeof projectBrief>

export const calculationSummary = z.object({
  id,
  number: z.string(),
  title: z.string(),
  dueOn: day.nullable(),
  project: projectBrief,
  /** The latest revision. */
  revision: revisionBrief,
  people: z.array(z.object({ person: personBrief, part: z.enum(parts) })),
  myParts: z.array(z.enum(parts)),
  /** When its sheet was last written in. */
  changedAt: instant,
})
export type CalculationSummary = z.infer<typeof calculationSummary>

export const calculationList = z.object({ calculations: z.array(calculationSummary) })
export type CalculationList = z.infer<typeof calculationList>

export const calculation = z.object({
  id,
  number: z.string(),
  title: z.string(),
  dueOn: day.nullable(),
  project: projectBrief,
  /** Latest first. */
  revisions: z.array(revisionBrief.extend({ reason: z.string() })),
  participations: z.array(participation),
  myParts: z.array(z.enum(parts)),
  createdAt: instant,
  changedAt: instant,
})
export type Calculation = z.infer<typeof calculation>

/** What a new sheet begins with. */
export const beginning = z.discriminatedUnion('kind', [
  z.object({ kind: z.literal('empty') }),
  z.object({
    kind: z.literal('template'),
    /** The template's file name without `.md`. */
    template: line(1, 80),
    /** By symbol, a number and its unit as typed: `"60 mm"`. Givens that are left out keep the template's. */
    givens: z.record(z.string().max(200), z.string().max(400)).default({}),
  }),
  z.object({ kind: z.literal('copy'), revisionId: id }),
])
export type Beginning = z.infer<typeof beginning>

export const newCalculation = z.object({
  projectId: id,
  title: line(1, 200),
  dueOn: day.nullable().default(null),
  beginning: beginning.default({ kind: 'empty' }),
})
export type NewCalculation = z.infer<typeof newCalculation>
export type NewCalculationInput = z.input<typeof newCalculation>

export const changeTitleBlock = z.object({
  title: line(1, 200).optional(),
  dueOn: day.nullable().optional(),
  projectId: id.optional(),
})
export type ChangeTitleBlock = z.infer<typeof changeTitleBlock>
