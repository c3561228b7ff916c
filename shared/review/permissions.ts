import type { RevisionState } from './states'

export const firmRoles = ['administrator', 'steward', 'engineer', 'observer'] as const
export type FirmRole = (typeof firmRoles)[number]

export const parts = ['preparer', 'checker', 'approver', 'observer'] as const
export type Part = (typeof parts)[number]

export const supervisionLevels = ['DSL1', 'DSL2', 'DSL3'] as const
export type SupervisionLevel = (typeof supervisionLevels)[number]

export type { RevisionState }
