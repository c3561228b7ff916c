/** The states of a revision, and the one sentence that explains each where it is shown. */
export const revisionStates = [
  'preparing',
  'checking',
  'returned',
  'checked',
  'issued',
  'superseded',
  'void',
] as const
export type RevisionState = (typeof revisionStates)[number]

export interface StateWords {
  /** The word itself, as it stands in a title block. */
  word: string
  explanation: string
}

export const stateWords: Record<RevisionState, StateWords> = {
  preparing: {
    word: 'preparing',
    explanation: 'Being written: its preparers may change it, and nothing in it has been checked.',
  },
  checking: {
    word: 'checking',
    explanation: 'Submitted: closed to changes while another person goes through it line by line.',
  },
  returned: {
    word: 'returned',
    explanation: 'Sent back with remarks: its preparers may change it again, then submit it once more.',
  },
  checked: {
    word: 'checked',
    explanation: 'Every line has been ticked; it waits for the approver to read its pages and stamp it.',
  },
  issued: {
    word: 'issued',
    explanation: 'Stamped and in force: it cannot be changed any more, only followed by a new revision.',
  },
  superseded: {
    word: 'superseded',
    explanation: 'A later revision has been issued: kept for the record, not to be worked from.',
  },
  void: {
    word: 'void',
    explanation: 'Withdrawn for good: kept for the record, never to be used.',
  },
}

export const holdExplanation = 'Issued, but on hold: not to be worked from until it is released.'

/** Where the sheet of a revision can be written in. */
export const isOpenToEdits = (state: RevisionState): boolean => state === 'preparing' || state === 'returned'

/** Whether a revision is in work, so that no other one of its calculation may be begun. */
export const isInWork = (state: RevisionState): boolean =>
  state === 'preparing' || state === 'checking' || state === 'returned' || state === 'checked'
