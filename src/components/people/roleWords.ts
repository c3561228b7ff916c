import type { FirmRole, Part, SupervisionLevel } from '@shared/review/permissions'

/** What each role is called, and what giving it means. */
export const roleWords: Record<FirmRole, { word: string; consequence: string }> = {
  administrator: {
    word: 'Administrator',
    consequence: 'Adds people, changes roles and deactivates accounts. Does not thereby approve anything.',
  },
  steward: {
    word: 'Steward',
    consequence:
      'Writes and checks calculations like an engineer, and keeps the firm’s templates and materials.',
  },
  engineer: {
    word: 'Engineer',
    consequence: 'Starts projects and calculations, prepares them, and checks where appointed.',
  },
  observer: {
    word: 'Observer',
    consequence: 'Reads the calculations to which this person is invited, and writes in none.',
  },
}

/** What each part on a calculation is called and lets one do. */
export const partWords: Record<Part, { word: string; plural: string; meaning: string }> = {
  preparer: {
    word: 'Preparer',
    plural: 'Prepared by',
    meaning: 'writes the sheet and submits it for checking',
  },
  checker: {
    word: 'Checker',
    plural: 'Checked by',
    meaning: 'reads it and ticks it line by line; does not write in it',
  },
  approver: {
    word: 'Approver',
    plural: 'Approved by',
    meaning: 'reads it and stamps it; does not write in it',
  },
  observer: { word: 'Observer', plural: 'Observed by', meaning: 'reads it' },
}

/** Supervision levels in plain words (names after EN 1990, Annex B). */
export const supervisionWords: Record<SupervisionLevel, string> = {
  DSL1: 'self-checking (DSL1)',
  DSL2: 'checked by another person (DSL2)',
  DSL3: 'checked by another organisation (DSL3)',
}
