import { CollaborationCaret } from '@tiptap/extension-collaboration-caret'
import type { Awareness } from 'y-protocols/awareness'
import { element } from '../element'
import { penColour } from '../penColour'

/** A colleague's caret in running text: a stroke in the colour of their pen, with initials. */
export const carets = (awareness: Awareness, me: { name: string }) =>
  CollaborationCaret.configure({
    provider: { awareness },
    user: me,
    render: ({ pen, initials, name }) =>
      element(
        'span',
        { class: 'caret', style: `--caret: ${penColour(Number(pen) || 0)}` },
        element('span', { class: 'caret__initials' }, String(initials ?? name ?? '')),
      ),
    selectionRender: () => ({ class: 'caret-selection' }),
  })
