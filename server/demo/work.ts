/** The demo firm's projects and calculations: who prepares, who is to check, and what to try first. */
import type { NewProjectInput } from '@shared/api/projects'
import type { Part } from '@shared/review/permissions'
import type { PersonKey } from './people'
import brakeShaft from './calculations/brake-shaft-held-at-both-ends.md?raw'
import elevatorShaft from './calculations/elevator-head-shaft.md?raw'
import edgeBeam from './calculations/footbridge-edge-beam.md?raw'
import crossShaft from './calculations/gate-hoist-cross-shaft.md?raw'
import torsionBar from './calculations/torsion-bar-draft.md?raw'

export const projects = {
  lock: {
    number: 'P-101',
    name: 'Merrow lock, sluice gate hoists',
    client: 'Merrow Canal Trust',
    jurisdiction: 'United Kingdom',
    disciplines: ['mechanical'],
    supervision: 'DSL2',
  },
  elevator: {
    number: 'P-112',
    name: 'Pellmoor granary, bucket elevator',
    client: 'Pellmoor Grain',
    jurisdiction: 'United Kingdom',
    disciplines: ['mechanical'],
    supervision: 'DSL1',
  },
  footbridge: {
    number: 'P-117',
    name: 'Cradle Hill footbridge',
    client: 'Merrow Canal Trust',
    jurisdiction: 'United Kingdom',
    disciplines: ['structural'],
    supervision: 'DSL2',
  },
} as const satisfies Record<string, NewProjectInput>

interface Appointment {
  person: PersonKey
  part: Part
  note?: string
}

export interface DemoCalculation {
  project: keyof typeof projects
  by: PersonKey
  /** Text form of its sheet. */
  text: string
  /** Days from the day of seeding. */
  dueInDays: number
  appointments: readonly Appointment[]
}

export const calculations: readonly DemoCalculation[] = [
  {
    project: 'lock',
    by: 'lena',
    text: crossShaft,
    dueInDays: 3,
    appointments: [
      {
        person: 'tomas',
        part: 'preparer',
        note: 'Open it in two browsers, as Lena and as Tomas, and write together.',
      },
      { person: 'noor', part: 'checker' },
      { person: 'viktor', part: 'approver' },
      { person: 'ada', part: 'observer', note: 'For the trust: the hoist as it is being verified.' },
    ],
  },
  {
    project: 'lock',
    by: 'tomas',
    text: brakeShaft,
    dueInDays: 8,
    appointments: [
      {
        person: 'lena',
        part: 'preparer',
        note: 'Two ways to the same reactions: by formula and by analysis.',
      },
      { person: 'noor', part: 'checker' },
    ],
  },
  {
    project: 'elevator',
    by: 'tomas',
    text: elevatorShaft,
    dueInDays: 5,
    appointments: [
      {
        person: 'lena',
        part: 'preparer',
        note: 'Not satisfied yet: give the shaft its needed diameter and see both criteria change.',
      },
    ],
  },
  {
    project: 'footbridge',
    by: 'lena',
    text: edgeBeam,
    dueInDays: 12,
    appointments: [
      { person: 'noor', part: 'checker' },
      { person: 'viktor', part: 'approver' },
    ],
  },
  {
    project: 'lock',
    by: 'lena',
    text: torsionBar,
    dueInDays: 20,
    appointments: [
      {
        person: 'tomas',
        part: 'preparer',
        note: 'Two lines have problems; the sheet says how to mend them.',
      },
    ],
  },
]
