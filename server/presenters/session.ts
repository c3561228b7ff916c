import type { DemoPeople, FirmBrief, Me } from '@shared/api/session'
import type { Firm, Participation } from '@server/entities'
import type { DemoPerson } from '@server/services/session/demoPeople'
import type { Identity } from '@server/services/session/identity'
import { presentBrief } from './people'

const presentFirm = ({ id, name, timeZone, numberPrefix }: Firm): FirmBrief => ({
  id,
  name,
  timeZone,
  numberPrefix,
})

export const presentMe = (
  { account, memberships }: Identity,
  currentFirmId: string | null,
  parts: Participation[],
): Me => {
  const current = memberships.find(({ firm }) => firm.id === currentFirmId)
  return {
    account: { ...presentBrief(account), email: account.email, isDemo: account.isDemo },
    firm: current ? presentFirm(current.firm) : null,
    role: current?.role ?? null,
    parts: parts.map(({ calculationId, part }) => ({ calculationId, part })),
    firms: memberships.map(({ firm, role }) => ({ ...presentFirm(firm), role })),
  }
}

export const presentDemoPeople = (people: DemoPerson[]): DemoPeople => ({
  people: people.map(({ account, role, firm, waiting }) => ({
    ...presentBrief(account),
    role,
    firm,
    waiting,
  })),
})
