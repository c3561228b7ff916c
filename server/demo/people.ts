/** The invented firm of the demo and its people, one for every role and part. */
import type { FirmRole } from '@shared/review/permissions'

export const firm = {
  name: 'Quillon & Thorne, Mechanical Engineers',
  timeZone: 'Europe/London',
  numberPrefix: 'TF',
}

/** The same for everybody; the start prints it, and it is refused wherever the demo is not on. */
export const DEMO_PASSWORD = 'sluice gate hoist 1872'

export interface DemoPerson {
  key: string
  name: string
  role: FirmRole
  /** What this person does here, for the start's list. */
  does: string
}

/** The first is the administrator who sets the firm up. */
export const people = [
  { key: 'mara', name: 'Mara Quillon', role: 'administrator', does: 'administers people and projects' },
  { key: 'lena', name: 'Lena Brandt', role: 'engineer', does: 'prepares' },
  { key: 'tomas', name: 'Tomas Arkwright', role: 'engineer', does: 'prepares together with Lena' },
  { key: 'noor', name: 'Noor Haddad', role: 'engineer', does: 'checks' },
  { key: 'viktor', name: 'Viktor Selim', role: 'engineer', does: 'approves' },
  { key: 'idris', name: 'Idris Thorne', role: 'steward', does: 'keeps the templates' },
  { key: 'ada', name: 'Ada Finch', role: 'observer', does: 'reads for the client' },
] as const satisfies readonly DemoPerson[]

export type PersonKey = (typeof people)[number]['key']

export const emailOf = (key: string): string => `${key}@quillon-thorne.example`
