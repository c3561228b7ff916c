import type { RevisionState } from '@shared/review/states'

/** Each state word and the sentence that it opens. */
export const stateWords: Record<RevisionState, { word: string; sentence: string }> = {
  preparing: {
    word: 'preparing',
    sentence: 'Its preparers write it. Values are live; nothing in it has been checked yet.',
  },
  checking: {
    word: 'checking',
    sentence: 'The sheet is closed to edits while its checker ticks it line by line.',
  },
  returned: {
    word: 'returned',
    sentence: 'The checker gave it back with remarks. Its preparers edit it again.',
  },
  checked: {
    word: 'checked',
    sentence: 'Every line is ticked and the pages are set. It waits for the approver’s stamp.',
  },
  issued: {
    word: 'issued',
    sentence: 'Stamped and frozen. A change makes a new revision.',
  },
  superseded: {
    word: 'superseded',
    sentence: 'A later revision has been issued. Do not build from this one.',
  },
  void: {
    word: 'void',
    sentence: 'Withdrawn for good. Do not build from it.',
  },
}
