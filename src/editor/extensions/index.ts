import { Node, type Extensions } from '@tiptap/core'
import { Collaboration } from '@tiptap/extension-collaboration'
import { Dropcursor, Gapcursor } from '@tiptap/extensions'
import type { Awareness } from 'y-protocols/awareness'
import type * as Y from 'yjs'
import { documentParts } from '@shared/sheet/document'
import { pageExtensions } from '@shared/sheet/page'
import type { Acts } from '../acts'
import type { Desk } from '../desk'
import { carets } from './carets'
import { EmptyPage } from './emptyPage'
import { HeadingIdentity } from './headingIdentity'
import { quoteExtension, referenceExtension } from './inline'
import { lineExtension } from './line'
import { lineClipboard } from './lineClipboard'
import { LineRange } from './lineRange'
import { withQuietShortcuts } from './quietShortcuts'
import { sheetKeys } from './sheetKeys'
import { typedLine, type Typing } from './typedLine'

export interface SheetEditorParts {
  doc: Y.Doc
  undoManager: Y.UndoManager
  awareness: Awareness
  me: { name: string }
  desk: Desk
  acts: Acts
  typing: Typing
}

/** No caret between two cells or two rows: what is typed there would become a cell of its own. */
const withoutGaps = (extensions: Extensions): Extensions =>
  extensions.map((extension) =>
    extension instanceof Node && ['table', 'tableRow'].includes(extension.name)
      ? extension.extend({ allowGapCursor: false })
      : extension,
  )

/** The schema's own nodes with their views in place of the plain ones. */
const page = (desk: Desk): Extensions => {
  const seen = [lineExtension(desk), quoteExtension(desk), referenceExtension(desk)]
  const plain = pageExtensions.filter(({ name }) => !seen.some((extension) => extension.name === name))
  return [...withoutGaps(withQuietShortcuts(plain)), ...seen]
}

export const sheetExtensions = ({
  doc,
  undoManager,
  awareness,
  me,
  desk,
  acts,
  typing,
}: SheetEditorParts): Extensions => [
  ...page(desk),
  Gapcursor,
  Dropcursor.configure({ color: 'var(--blue)', width: 2 }),
  Collaboration.configure({ fragment: documentParts(doc).page, yUndoOptions: { undoManager } as never }),
  carets(awareness, me),
  HeadingIdentity,
  EmptyPage,
  LineRange,
  sheetKeys(acts),
  typedLine(acts, typing),
  lineClipboard(acts),
]
