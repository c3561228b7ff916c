import type { ChangeProject } from '@shared/api/projects'
import { recordEvent } from '@server/repositories/auditEvents'
import { updateProject } from '@server/repositories/projects'
import { inTransaction } from '@server/repositories/transaction'
import type { FirmScope } from '@server/repositories/transaction'
import { authoriseInFirm } from '../authorise'
import { isTaken } from '../refusals'
import { numberTaken } from './createProject'
import { readCounted } from './listProjects'
import type { CountedProject } from './listProjects'

export const changeProject = async (
  scope: FirmScope,
  id: string,
  change: ChangeProject,
): Promise<CountedProject> => {
  authoriseInFirm(scope, 'change-project')
  const given = Object.fromEntries(Object.entries(change).filter(([, value]) => value !== undefined))
  try {
    return await inTransaction(scope, async (tx) => {
      await readCounted(tx, id)
      if (Object.keys(given).length > 0) {
        await updateProject(tx, id, given)
        await recordEvent(tx, { action: 'project.change', subjectId: id, details: given })
      }
      return readCounted(tx, id)
    })
  } catch (error) {
    if (isTaken(error, 'project_number')) throw numberTaken(change.number ?? '')
    throw error
  }
}
