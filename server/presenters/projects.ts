import type { Project } from '@shared/api/projects'
import type { CountedProject } from '@server/services/projects/listProjects'

export const presentProject = ({ project, calculations }: CountedProject): Project => ({
  id: project.id,
  number: project.number,
  name: project.name,
  client: project.client,
  jurisdiction: project.jurisdiction,
  disciplines: project.disciplines,
  supervision: project.supervision,
  calculations,
  createdAt: project.createdAt.toISOString(),
})
