import type { Calculation, CalculationSummary, ProjectBrief, RevisionBrief } from '@shared/api/calculations'
import type { Participation as ShownParticipation } from '@shared/api/participation'
import type { Account, Participation, Project, Revision } from '@server/entities'
import type { CalculationRow } from '@server/repositories/calculations'
import type { ListedCalculation } from '@server/services/calculations/listCalculations'
import type { WholeCalculation } from '@server/services/calculations/readCalculation'
import { briefOf } from './people'

export const presentParticipations = (
  participations: Participation[],
  accounts: Map<string, Account>,
): ShownParticipation[] =>
  participations.map((one) => ({
    id: one.id,
    person: { ...briefOf(accounts, one.accountId), isActive: accounts.get(one.accountId)?.isActive ?? false },
    part: one.part,
    appointedBy: briefOf(accounts, one.appointedBy),
    appointedAt: one.appointedAt.toISOString(),
    note: one.note,
  }))

export const presentProjectBrief = ({ id, number, name, client, supervision }: Project): ProjectBrief => ({
  id,
  number,
  name,
  client,
  supervision,
})

export const projectBriefOfRow = (row: CalculationRow): ProjectBrief => ({
  id: row.projectId,
  number: row.projectNumber,
  name: row.projectName,
  client: row.projectClient,
  supervision: row.supervision,
})

const presentRevisionBrief = (revision: Revision): RevisionBrief => ({
  id: revision.id,
  letter: revision.letter,
  state: revision.state,
  isOnHold: revision.isOnHold,
  createdAt: revision.createdAt.toISOString(),
  stateChangedAt: revision.stateChangedAt.toISOString(),
})

const partsOfPerson = (participations: Participation[], accountId: string) =>
  participations.filter((one) => one.accountId === accountId).map((one) => one.part)

export const presentSummary = (
  { row, participations, accounts }: ListedCalculation,
  viewer: string,
): CalculationSummary => ({
  id: row.id,
  number: row.number,
  title: row.title,
  dueOn: row.dueOn,
  project: projectBriefOfRow(row),
  revision: {
    id: row.revisionId,
    letter: row.letter,
    state: row.state,
    isOnHold: row.isOnHold,
    createdAt: row.revisionCreatedAt.toISOString(),
    stateChangedAt: row.stateChangedAt.toISOString(),
  },
  people: participations.map(({ accountId, part }) => ({ person: briefOf(accounts, accountId), part })),
  myParts: partsOfPerson(participations, viewer),
  changedAt: row.changedAt.toISOString(),
})

export const presentCalculation = (
  { calculation, project, revisions, participations, accounts, changedAt }: WholeCalculation,
  viewer: string,
): Calculation => ({
  id: calculation.id,
  number: calculation.number,
  title: calculation.title,
  dueOn: calculation.dueOn,
  project: presentProjectBrief(project),
  revisions: revisions.map((revision) => ({ ...presentRevisionBrief(revision), reason: revision.reason })),
  participations: presentParticipations(participations, accounts),
  myParts: partsOfPerson(participations, viewer),
  createdAt: calculation.createdAt.toISOString(),
  changedAt: changedAt.toISOString(),
})
