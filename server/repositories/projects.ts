import { Project } from '../entities'
import type { FirmTransaction } from './transaction'

export const findProject = (tx: FirmTransaction, id: string): Promise<Project | null> =>
  tx.manager.findOneBy(Project, { firmId: tx.scope.firmId, id })

export const listProjectRows = (tx: FirmTransaction): Promise<Project[]> =>
  tx.manager.find(Project, { where: { firmId: tx.scope.firmId }, order: { number: 'ASC' } })

export const insertProject = async (
  tx: FirmTransaction,
  project: Omit<Project, 'firmId' | 'createdAt'>,
): Promise<void> => {
  await tx.manager.insert(Project, { ...project, firmId: tx.scope.firmId })
}

export const updateProject = async (
  tx: FirmTransaction,
  id: string,
  change: Partial<Omit<Project, 'id' | 'firmId' | 'createdAt'>>,
): Promise<void> => {
  await tx.manager.update(Project, { firmId: tx.scope.firmId, id }, change)
}

export const countCalculations = async (tx: FirmTransaction): Promise<Map<string, number>> => {
  const rows: { id: string; count: number }[] = await tx.manager.query(
    'SELECT project_id AS id, count(*)::int AS count FROM calculation WHERE firm_id = $1 GROUP BY project_id',
    [tx.scope.firmId],
  )
  return new Map(rows.map((row) => [row.id, row.count]))
}
