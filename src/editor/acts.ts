/** What a person can do with the sheet from the keyboard or a menu; the view carries it out, with pens. */
import type { CompactFields } from '@shared/engine/parse/shorthand'
import type { LineId } from '@shared/errors/problem'
import type { LineKind } from '@shared/sheet/kinds'

export interface Acts {
  edit: (id: LineId) => void
  close: () => void
  /** Inserts an empty line of a kind at the selection and opens it. */
  insert: (kind: LineKind) => void
  insertHeading: () => void
  move: (ids: LineId[], by: 1 | -1) => void
  remove: (ids: LineId[]) => void
  duplicate: (id: LineId) => void
  copy: (ids: LineId[], clipboard: DataTransfer) => void
  /** Puts lines of a clipboard at a block's index; false where it holds none. */
  paste: (clipboard: DataTransfer, index: number) => boolean
  /** The paragraph at this index was read as a line. */
  makeLine: (index: number, compact: CompactFields, text: string) => void
  /** `b = 10 m` beside a symbol `m`: the author is asked. */
  askKind: (index: number, given: CompactFields, formula: CompactFields, text: string) => void
  undo: () => void
  redo: () => void
  openCommands: () => void
  /** Asks for the address of a link on the words at the caret. */
  openLink: () => void
  mayEdit: () => boolean
}
