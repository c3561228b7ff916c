import { randomUUID } from 'node:crypto'
import type { NewProject } from '@shared/api/projects'
import { recordEvent } from '@server/repositories/auditEvents'
import { insertProject } from '@server/repositories/projects'
import { inTransaction } from '@server/repositories/transaction'
import type { FirmScope } from '@server/repositories/transaction'
import { authoriseInFirm } from '../authorise'
import { conflict, isTaken } from '../refusals'
import { readCounted } from './listProjects'
import type { CountedProject } from './listProjects'

export const createProject = async (scope: FirmScope, project: NewProject): Promise<CountedProject> => {
  authoriseInFirm(scope, 'create-project')
  const id = randomUUID()
  try {
    return await inTransaction(scope, async (tx) => {
      await insertProject(tx, { id, ...project })
      await recordEvent(tx, {
        action: 'project.create',
        subjectId: id,
        details: { number: project.number, supervision: project.supervision },
      })
      return readCounted(tx, id)
    })
  } catch (error) {
    if (isTaken(error, 'project_number')) throw numberTaken(project.number)
    throw error
  }
}

export const numberTaken = (number: string) =>
  conflict(`There is a project ${number} already. Choose another number.`)
