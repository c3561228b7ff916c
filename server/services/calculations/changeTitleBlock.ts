import type { ChangeTitleBlock } from '@shared/api/calculations'
import { may, supervisionLevels } from '@shared/review/permissions'
import type { Project } from '@server/entities'
import { recordEvent } from '@server/repositories/auditEvents'
import { updateCalculation } from '@server/repositories/calculations'
import { findProject } from '@server/repositories/projects'
import { inTransaction } from '@server/repositories/transaction'
import type { FirmScope } from '@server/repositories/transaction'
import { authoriseCalculation } from '../authorise'
import { notAllowed, notFound } from '../refusals'
import { readWhole } from './readCalculation'
import type { WholeCalculation } from './readCalculation'

/** Title, due day and project; the number stays for ever, and the level of supervision is not lowered. */
export const changeTitleBlock = (
  scope: FirmScope,
  id: string,
  change: ChangeTitleBlock,
): Promise<WholeCalculation> =>
  inTransaction(scope, async (tx) => {
    const { project } = await authoriseCalculation(tx, id, 'change-title-block', 'lock')
    const { projectId } = change
    const wanted = projectId === undefined ? project : await findProject(tx, projectId)
    if (wanted === null) throw notFound('project')
    refuseWeakerSupervision(scope, project, wanted)
    const given = Object.fromEntries(Object.entries(change).filter(([, value]) => value !== undefined))
    if (Object.keys(given).length > 0) {
      await updateCalculation(tx, id, given)
      await recordEvent(tx, { action: 'calculation.change-title-block', subjectId: id, details: given })
    }
    return readWhole(tx, id)
  })

/** Whom a level binds does not lower it by moving the work: that is a change of the level, and asked as one. */
const refuseWeakerSupervision = (scope: FirmScope, from: Project, to: Project): void => {
  if (supervisionLevels.indexOf(to.supervision) >= supervisionLevels.indexOf(from.supervision)) return
  if (may('change-project', { role: scope.role, parts: [] }).allowed) return
  throw notAllowed(
    `Project ${to.number} is supervised at ${to.supervision}, this calculation at ${from.supervision}: only an administrator moves it to a lower level.`,
  )
}
