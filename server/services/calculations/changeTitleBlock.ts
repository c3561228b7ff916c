import type { ChangeTitleBlock } from '@shared/api/calculations'
import { recordEvent } from '@server/repositories/auditEvents'
import { updateCalculation } from '@server/repositories/calculations'
import { findProject } from '@server/repositories/projects'
import { inTransaction } from '@server/repositories/transaction'
import type { FirmScope } from '@server/repositories/transaction'
import { authoriseCalculation } from '../authorise'
import { notFound } from '../refusals'
import { readWhole } from './readCalculation'
import type { WholeCalculation } from './readCalculation'

/** Title, due day and project; the number stays for ever. */
export const changeTitleBlock = (
  scope: FirmScope,
  id: string,
  change: ChangeTitleBlock,
): Promise<WholeCalculation> =>
  inTransaction(scope, async (tx) => {
    await authoriseCalculation(tx, id, 'change-title-block', 'lock')
    const { projectId } = change
    if (projectId !== undefined && (await findProject(tx, projectId)) === null) throw notFound('project')
    const given = Object.fromEntries(Object.entries(change).filter(([, value]) => value !== undefined))
    if (Object.keys(given).length > 0) {
      await updateCalculation(tx, id, given)
      await recordEvent(tx, { action: 'calculation.change-title-block', subjectId: id, details: given })
    }
    return readWhole(tx, id)
  })
