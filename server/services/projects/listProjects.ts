import type { Project } from '@server/entities'
import { countCalculations, findProject, listProjectRows } from '@server/repositories/projects'
import { inTransaction } from '@server/repositories/transaction'
import type { FirmScope, FirmTransaction } from '@server/repositories/transaction'
import { authoriseInFirm } from '../authorise'
import { notFound } from '../refusals'

export interface CountedProject {
  project: Project
  calculations: number
}

export const listProjects = (scope: FirmScope): Promise<CountedProject[]> => {
  authoriseInFirm(scope, 'see-projects')
  return inTransaction(scope, async (tx) => {
    const counts = await countCalculations(tx)
    const projects = await listProjectRows(tx)
    return projects.map((project) => ({ project, calculations: counts.get(project.id) ?? 0 }))
  })
}

export const readProject = (scope: FirmScope, id: string): Promise<CountedProject> => {
  authoriseInFirm(scope, 'see-projects')
  return inTransaction(scope, (tx) => readCounted(tx, id))
}

/** @throws {Refusal} when the firm has no such project */
export const readCounted = async (tx: FirmTransaction, id: string): Promise<CountedProject> => {
  const project = await findProject(tx, id)
  if (project === null) throw notFound('project')
  return { project, calculations: (await countCalculations(tx)).get(id) ?? 0 }
}
