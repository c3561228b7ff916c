import type { History, Revision } from '@shared/api/revisions'
import type { Part } from '@shared/review/permissions'
import type { OpenedRevision } from '@server/services/revisions/readRevision'
import type { RevisionHistory } from '@server/services/revisions/readHistory'
import { presentParticipations, presentProjectBrief } from './calculations'
import { briefOf } from './people'

export const presentRevision = (opened: OpenedRevision): Revision => {
  const { calculation, revision, project, standing, firm, document, participations, accounts } = opened
  const peopleWith = (part: Part) =>
    participations.filter((one) => one.part === part).map((one) => briefOf(accounts, one.accountId))
  return {
    id: revision.id,
    calculationId: calculation.id,
    letter: revision.letter,
    state: revision.state,
    isOnHold: revision.isOnHold,
    reason: revision.reason,
    createdAt: revision.createdAt.toISOString(),
    titleBlock: {
      firm: firm.name,
      number: calculation.number,
      title: calculation.title,
      revision: revision.letter,
      state: revision.state,
      isOnHold: revision.isOnHold,
      project: presentProjectBrief(project),
      prepared: peopleWith('preparer'),
      checked: peopleWith('checker'),
      approved: peopleWith('approver'),
      dueOn: calculation.dueOn,
      changedAt: document.changedAt.toISOString(),
    },
    participations: presentParticipations(participations, accounts),
    document: {
      documentId: document.id,
      head: document.head,
      epoch: document.epoch,
      format: document.format,
      mayWrite: opened.mayWrite,
      reason: opened.reason,
    },
    standing: {
      role: standing.role,
      parts: [...standing.parts],
      state: standing.state,
      supervision: standing.supervision,
    },
  }
}

const parsed = (text: string | null): unknown => {
  if (text === null) return null
  try {
    return JSON.parse(text)
  } catch {
    return text
  }
}

export const presentHistory = ({ rows, accounts, isCut }: RevisionHistory): History => ({
  entries: rows.map((row) => ({
    head: row.head,
    person: row.accountId === null ? null : briefOf(accounts, row.accountId),
    subject: row.subject,
    subjectId: row.subjectId,
    field: row.field,
    before: parsed(row.before),
    after: parsed(row.after),
    at: row.at.toISOString(),
  })),
  isCut,
})
