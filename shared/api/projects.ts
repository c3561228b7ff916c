/**
 * The firm's jobs.
 *
 * - `GET /api/projects` → `projectList`
 * - `POST /api/projects` `newProject` → 201 `project`; 409 when the number is taken
 * - `GET /api/projects/:id` → `project`
 * - `PATCH /api/projects/:id` `changeProject` → `project`
 */
import { z } from 'zod'
import { supervisionLevels } from '@shared/review/permissions'
import { id, instant, line } from './fields'

export const project = z.object({
  id,
  number: z.string(),
  name: z.string(),
  client: z.string(),
  jurisdiction: z.string(),
  disciplines: z.array(z.string()),
  supervision: z.enum(supervisionLevels),
  calculations: z.number().int(),
  createdAt: instant,
})
export type Project = z.infer<typeof project>

export const projectList = z.object({ projects: z.array(project) })
export type ProjectList = z.infer<typeof projectList>

export const newProject = z.object({
  number: line(1, 40),
  name: line(1, 200),
  client: line(0, 200).default(''),
  jurisdiction: line(0, 120).default(''),
  disciplines: z.array(line(1, 80)).max(12).default([]),
  supervision: z.enum(supervisionLevels).default('DSL2'),
})
export type NewProject = z.infer<typeof newProject>
/** As typed: what may be left out is left out. */
export type NewProjectInput = z.input<typeof newProject>

export const changeProject = z.object({
  number: line(1, 40).optional(),
  name: line(1, 200).optional(),
  client: line(0, 200).optional(),
  jurisdiction: line(0, 120).optional(),
  disciplines: z.array(line(1, 80)).max(12).optional(),
  supervision: z.enum(supervisionLevels).optional(),
})
export type ChangeProject = z.infer<typeof changeProject>
