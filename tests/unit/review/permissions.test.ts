import { describe, expect, test } from 'vitest'
import {
  actions,
  firmRoles,
  may,
  parts,
  permissionTable,
  supervisionLevels,
} from '@shared/review/permissions'
import type { Action, FirmRole, Part, SupervisionLevel } from '@shared/review/permissions'
import { isInWork, isOpenToEdits, revisionStates, stateWords } from '@shared/review/states'
import type { RevisionState } from '@shared/review/states'

/** Every set of parts that one person can hold on one calculation. */
const partSets: Part[][] = Array.from({ length: 2 ** parts.length }, (_, bits) =>
  parts.filter((_part, index) => bits & (1 << index)),
)

/**
 * The rules of the design, written down a second time and in another form: what each action asks of role,
 * parts and state. A cell of the table that differs from this is a mistake in one of the two.
 */
const staff = (role: FirmRole) => role !== 'observer'
const anyState = () => true
const within =
  (...states: RevisionState[]) =>
  (state: RevisionState) =>
    states.includes(state)
const open = within('preparing', 'returned')
const inWork = within('preparing', 'checking', 'returned', 'checked')

type Entitled = (role: FirmRole, held: readonly Part[], strict: boolean) => boolean
const has = (held: readonly Part[], ...wanted: Part[]) => wanted.some((part) => held.includes(part))
const prepares: Entitled = (role, held) => staff(role) && has(held, 'preparer')
const writes: Entitled = (role, held, strict) =>
  prepares(role, held, strict) && !(strict && has(held, 'checker', 'approver'))
const checks: Entitled = (_role, held) => has(held, 'checker')
const checksIndependently: Entitled = (_role, held, strict) =>
  has(held, 'checker') && !(strict && has(held, 'preparer'))
const approves: Entitled = (_role, held) => has(held, 'approver')
const approvesIndependently: Entitled = (_role, held, strict) =>
  has(held, 'approver') && !(strict && has(held, 'preparer'))
const reviews: Entitled = (_role, held) => has(held, 'checker', 'approver', 'observer')

const inFirm: Partial<Record<Action, (role: FirmRole) => boolean>> = {
  'see-people': staff,
  'manage-people': (role) => role === 'administrator',
  'see-audit': (role) => role === 'administrator',
  'confirm-credential': (role) => role === 'administrator',
  'see-projects': staff,
  'create-project': staff,
  'change-project': (role) => role === 'administrator',
  'create-calculation': staff,
  'see-templates': staff,
  'publish-template': (role) => role === 'steward',
  'manage-materials': (role) => role === 'steward',
}

const onRevision: Partial<Record<Action, [Entitled, (state: RevisionState) => boolean]>> = {
  open: [(role, held) => staff(role) || held.length > 0, anyState],
  print: [(role, held) => staff(role) || held.length > 0, anyState],
  copy: [(role) => staff(role), anyState],
  edit: [writes, open],
  'change-title-block': [writes, open],
  'accept-proposal': [writes, open],
  appoint: [
    (role, held, strict) => role === 'administrator' || prepares(role, held, strict),
    within('preparing', 'checking', 'returned', 'checked', 'issued'),
  ],
  'give-up-part': [
    (_role, held) => held.length > 0,
    within('preparing', 'checking', 'returned', 'checked', 'issued'),
  ],
  remark: [reviews, inWork],
  'answer-remark': [prepares, inWork],
  'close-remark': [reviews, inWork],
  submit: [prepares, open],
  withdraw: [prepares, within('checking', 'checked')],
  tick: [checksIndependently, within('checking')],
  'adopt-tick': [checksIndependently, within('checking')],
  'independent-value': [checksIndependently, within('checking')],
  'return-from-checking': [checks, within('checking')],
  pass: [checksIndependently, within('checking')],
  'accept-unconfirmed': [approvesIndependently, within('checking', 'checked')],
  'return-from-checked': [approves, within('checked')],
  stamp: [approvesIndependently, within('checked')],
  hold: [(role, held) => role === 'steward' || has(held, 'approver'), within('issued')],
  'start-next': [prepares, within('issued', 'void')],
  void: [
    (role, held) => role === 'administrator' || has(held, 'approver'),
    within('preparing', 'checking', 'returned', 'checked', 'issued', 'superseded'),
  ],
}

describe('the table of permissions', () => {
  test('has no action that this test does not know', () => {
    expect([...Object.keys(inFirm), ...Object.keys(onRevision)].sort()).toEqual([...actions].sort())
  })

  test.each(Object.entries(inFirm))('in the firm, every role: %s', (action, isEntitled) => {
    for (const role of firmRoles) {
      const { allowed, reason } = may(action as Action, { role, parts: [] })
      expect([role, allowed]).toEqual([role, isEntitled(role)])
      expect(reason === '').toBe(allowed)
    }
  })

  test.each(Object.entries(onRevision))(
    'on a revision, every role, parts, state and level: %s',
    (action, [isEntitled, isTime]) => {
      let cells = 0
      for (const role of firmRoles)
        for (const held of partSets)
          for (const state of revisionStates)
            for (const supervision of supervisionLevels) {
              const { allowed, reason } = may(action as Action, { role, parts: held, state, supervision })
              const wanted = isEntitled(role, held, supervision !== 'DSL1') && isTime(state)
              expect([role, held, state, supervision, allowed]).toEqual([
                role,
                held,
                state,
                supervision,
                wanted,
              ])
              expect(reason === '').toBe(allowed)
              cells++
            }
      expect(cells).toBe(4 * 16 * 7 * 3)
    },
  )

  test('refuses an action on a revision where none is named, and is strict where no level is', () => {
    expect(may('edit', { role: 'engineer', parts: ['preparer'] }).allowed).toBe(false)
    expect(
      may('edit', { role: 'engineer', parts: ['preparer', 'checker'], state: 'preparing' }).allowed,
    ).toBe(false)
  })

  test('every refusal is a sentence', () => {
    for (const action of actions) expect(permissionTable[action].refusal).toMatch(/^[A-Z].+\.$/)
  })

  test.each<[Action, FirmRole, Part[], RevisionState, SupervisionLevel, string]>([
    [
      'edit',
      'engineer',
      ['checker'],
      'preparing',
      'DSL2',
      'You are a checker of this calculation and open it for reading. To write in it, first give up that part.',
    ],
    [
      'edit',
      'engineer',
      ['preparer', 'approver'],
      'preparing',
      'DSL3',
      'You are an approver of this calculation and open it for reading. To write in it, first give up that part.',
    ],
    [
      'edit',
      'engineer',
      ['preparer'],
      'issued',
      'DSL2',
      'This revision is issued: its sheet is closed to changes.',
    ],
    [
      'tick',
      'engineer',
      ['checker', 'preparer'],
      'checking',
      'DSL2',
      'You are a preparer of this calculation: another person must check and approve it.',
    ],
    [
      'withdraw',
      'engineer',
      ['preparer'],
      'preparing',
      'DSL2',
      'This revision is preparing; this can be done only while one is checking or checked.',
    ],
  ])('%s by %s with %j while %s says why not', (action, role, held, state, supervision, reason) => {
    expect(may(action, { role, parts: held, state, supervision })).toEqual({ allowed: false, reason })
  })
})

describe('the states of a revision', () => {
  test('each has its word and one sentence', () => {
    for (const state of revisionStates) {
      expect(stateWords[state].word).toBe(state)
      expect(stateWords[state].explanation.match(/[.!?]/g)).toHaveLength(1)
    }
  })

  test('which are open to edits, and which keep another revision from being begun', () => {
    expect(revisionStates.filter(isOpenToEdits)).toEqual(['preparing', 'returned'])
    expect(revisionStates.filter(isInWork)).toEqual(['preparing', 'checking', 'returned', 'checked'])
  })
})
