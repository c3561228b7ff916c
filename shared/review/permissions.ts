/**
 * Who may do what: the one table. The server decides by it, the client shows by it, and a unit test
 * tries every cell. Roles belong to a person in a firm, parts to a person on one calculation, states
 * to a revision. Conditions on content (every line ticked, no open remark …) are not here: they are
 * the rule of the action itself.
 */
import { revisionStates } from './states'
import type { RevisionState } from './states'

export const firmRoles = ['administrator', 'steward', 'engineer', 'observer'] as const
export type FirmRole = (typeof firmRoles)[number]

export const parts = ['preparer', 'checker', 'approver', 'observer'] as const
export type Part = (typeof parts)[number]

export const supervisionLevels = ['DSL1', 'DSL2', 'DSL3'] as const
export type SupervisionLevel = (typeof supervisionLevels)[number]

/** Everybody of the firm but observers, who see only what they are invited to. */
const staff: readonly FirmRole[] = ['administrator', 'steward', 'engineer']
const everybody: readonly FirmRole[] = firmRoles

const everyState = revisionStates
const open: readonly RevisionState[] = ['preparing', 'returned']
const inWork: readonly RevisionState[] = ['preparing', 'checking', 'returned', 'checked']
const living: readonly RevisionState[] = [...inWork, 'issued']

/** One way of being entitled: one of the roles and, where parts are named, one of the parts. */
interface Entitlement {
  roles: readonly FirmRole[]
  parts?: readonly Part[]
}

interface Rule {
  /** Any one of these is enough. */
  who: readonly Entitlement[]
  /** For actions on a revision: the states in which it may be done. */
  states?: readonly RevisionState[]
  /** At DSL2 and DSL3 refused to a preparer. */
  independent?: true
  /** At DSL2 and DSL3 refused to a checker or approver, who must first give up that part. */
  notReviewing?: true
  /** Said to somebody who is not entitled. */
  refusal: string
}

const by = (...named: Part[]): Entitlement[] => [{ roles: everybody, parts: named }]
const preparing: Entitlement[] = [{ roles: staff, parts: ['preparer'] }]
const role = (...named: FirmRole[]): Entitlement[] => [{ roles: named }]

export const permissionTable = {
  // In the firm
  'see-people': { who: role(...staff), refusal: 'Observers do not see the list of people.' },
  'manage-people': { who: role('administrator'), refusal: 'Only an administrator adds and changes people.' },
  'see-audit': { who: role('administrator'), refusal: 'Only an administrator reads the audit trail.' },
  'confirm-credential': {
    who: role('administrator'),
    refusal: 'Only an administrator confirms credentials and keys.',
  },
  'see-projects': {
    who: role(...staff),
    refusal: 'Observers see only the calculations they are invited to.',
  },
  'create-project': { who: role(...staff), refusal: 'An observer cannot begin a project.' },
  'change-project': {
    who: role('administrator'),
    refusal: 'Only an administrator changes a project: its supervision level binds everybody.',
  },
  'create-calculation': { who: role(...staff), refusal: 'An observer cannot begin a calculation.' },
  'see-templates': { who: role(...staff), refusal: 'Observers do not see the templates.' },
  'publish-template': {
    who: role('steward'),
    refusal: 'Only a template steward publishes and recalls templates.',
  },
  'manage-materials': {
    who: role('steward'),
    refusal: 'Only a template steward changes the material register.',
  },

  // On a revision
  open: {
    who: [{ roles: staff }, ...by(...parts)],
    states: everyState,
    refusal: 'An observer opens only the calculations to which they are invited.',
  },
  print: {
    who: [{ roles: staff }, ...by(...parts)],
    states: everyState,
    refusal: 'An observer prints only the calculations to which they are invited.',
  },
  copy: {
    who: [{ roles: staff }],
    states: everyState,
    refusal: 'An observer cannot copy a calculation.',
  },
  edit: {
    who: preparing,
    states: open,
    notReviewing: true,
    refusal: 'Only a preparer writes in this sheet. A preparer or an administrator can appoint you.',
  },
  'change-title-block': {
    who: preparing,
    states: open,
    notReviewing: true,
    refusal: 'Only a preparer changes the title block.',
  },
  appoint: {
    who: [...preparing, ...role('administrator')],
    states: living,
    refusal: 'Only a preparer or an administrator appoints people and hands parts over.',
  },
  'give-up-part': {
    who: by(...parts),
    states: living,
    refusal: 'You have no part on this calculation that you could give up.',
  },
  remark: {
    who: by('checker', 'approver', 'observer'),
    states: inWork,
    refusal: 'Only a checker, an approver or an invited observer raises remarks.',
  },
  'answer-remark': { who: preparing, states: inWork, refusal: 'Only a preparer answers remarks.' },
  'close-remark': {
    who: by('checker', 'approver', 'observer'),
    states: inWork,
    refusal: 'A remark is closed by who raised it.',
  },
  'accept-proposal': {
    who: preparing,
    states: open,
    notReviewing: true,
    refusal: 'Only a preparer accepts a proposed change.',
  },
  submit: { who: preparing, states: open, refusal: 'Only a preparer submits for checking.' },
  withdraw: { who: preparing, states: ['checking', 'checked'], refusal: 'Only a preparer withdraws.' },
  tick: {
    who: by('checker'),
    states: ['checking'],
    independent: true,
    refusal: 'Only a checker ticks lines.',
  },
  'adopt-tick': {
    who: by('checker'),
    states: ['checking'],
    independent: true,
    refusal: 'Only a checker adopts the ticks of a former one.',
  },
  'independent-value': {
    who: by('checker'),
    states: ['checking'],
    independent: true,
    refusal: 'Only a checker enters independent values.',
  },
  'return-from-checking': {
    who: by('checker'),
    states: ['checking'],
    refusal: 'Only a checker returns this.',
  },
  pass: {
    who: by('checker'),
    states: ['checking'],
    independent: true,
    refusal: 'Only a checker passes this as checked.',
  },
  'accept-unconfirmed': {
    who: by('approver'),
    states: ['checking', 'checked'],
    independent: true,
    refusal: 'Only an approver accepts values that are not confirmed.',
  },
  'return-from-checked': {
    who: by('approver'),
    states: ['checked'],
    refusal: 'Only an approver returns what has been checked.',
  },
  stamp: { who: by('approver'), states: ['checked'], independent: true, refusal: 'Only an approver stamps.' },
  hold: {
    who: [...by('approver'), ...role('steward')],
    states: ['issued'],
    refusal: 'Only an approver or a template steward puts an issued revision on hold or releases it.',
  },
  'start-next': {
    who: preparing,
    states: ['issued', 'void'],
    refusal: 'Only a preparer starts the next revision.',
  },
  void: {
    who: [...by('approver'), ...role('administrator')],
    states: ['preparing', 'checking', 'returned', 'checked', 'issued', 'superseded'],
    refusal: 'Only an approver or an administrator makes a revision void.',
  },
} as const satisfies Record<string, Rule>

export type Action = keyof typeof permissionTable
export const actions = Object.keys(permissionTable) as Action[]

/** What a person is to the thing acted on. Without a revision, `parts` is empty and `state` absent. */
export interface Standing {
  role: FirmRole
  parts: readonly Part[]
  state?: RevisionState
  /** The project's; DSL2 where absent, so that nothing is allowed by forgetting it. */
  supervision?: SupervisionLevel
}

/** `reason` is a sentence for the person, empty where it is allowed. */
export interface Permission {
  allowed: boolean
  reason: string
}

const allowed: Permission = { allowed: true, reason: '' }
const refused = (reason: string): Permission => ({ allowed: false, reason })

const sentenceList = (words: readonly string[]): string =>
  words.length < 2 ? words.join('') : `${words.slice(0, -1).join(', ')} or ${words[words.length - 1] ?? ''}`

const closedBecause = (state: RevisionState, states: readonly RevisionState[]): string =>
  states === open
    ? `This revision is ${state}: its sheet is closed to changes.`
    : `This revision is ${state}; this can be done only while one is ${sentenceList(states)}.`

/** Decides by the table alone. An action on a revision is refused without a state. */
export const may = (action: Action, standing: Standing): Permission => {
  const rule: Rule = permissionTable[action]
  const entitled = rule.who.some(
    ({ roles, parts: wanted }) =>
      roles.includes(standing.role) &&
      (wanted === undefined || wanted.some((part) => standing.parts.includes(part))),
  )
  const strict = standing.supervision !== 'DSL1'
  const reviewing = standing.parts.find((part) => part === 'checker' || part === 'approver')
  if (strict && rule.notReviewing && reviewing !== undefined)
    return refused(
      `You are ${reviewing === 'checker' ? 'a checker' : 'an approver'} of this calculation and open it for reading. To write in it, first give up that part.`,
    )
  if (!entitled) return refused(rule.refusal)
  if (strict && rule.independent && standing.parts.includes('preparer'))
    return refused('You are a preparer of this calculation: another person must check and approve it.')
  if (rule.states === undefined) return allowed
  if (standing.state === undefined) return refused('No revision was named.')
  if (!rule.states.includes(standing.state))
    return refused(closedBecause(standing.state, rule.states))
  return allowed
}
