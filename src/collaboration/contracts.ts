/**
 * What the editor codes against. `openSheetConnection` (sheetConnection.ts) gives one of these; tests
 * of the editor may give another.
 */
import type { Ref, ShallowRef } from 'vue'
import type { Awareness } from 'y-protocols/awareness'
import type * as Y from 'yjs'
import type { PersonHere, SaidPresence } from '@shared/protocol'

export type ConnectionState = 'loading' | 'stored' | 'sending' | 'offline' | 'refused' | 'reload'

export interface ConnectionStatus {
  state: ConnectionState
  /** When everything was last known to be stored: *stored 14:02*. */
  at?: Date
  /** A sentence for the person: why refused, what to do. */
  reason?: string
}

/** A field as it stood in somebody's hands when it could not be stored. */
export interface DraftField {
  /** A line's id, or `front:purpose`. */
  key: string
  /** Flat key of the field, `expression`, `inputs.outer`; `text` for prose. */
  field: string
  before: unknown
  mine: unknown
}

/** What was typed and could not be stored as it was: shown to its author, who copies, sends or drops it. */
export interface DraftOfMine {
  id: string
  at: Date
  /** Why it is a draft, as a sentence. */
  reason: string
  fields: DraftField[]
  /** The draft as text, for copying. */
  text: string
  copy: () => string
  /**
   * Writes the draft's line fields into the sheet as it is now, by taking the pens of its lines. True
   * when it was done; the draft goes then. False leaves the draft as it is.
   */
  send: () => Promise<boolean>
  /** The author's word that it may go. */
  drop: () => Promise<void>
}

export interface Pens {
  /** Who holds the pen of a line or front text; reactive. Undefined: nobody. */
  holderOf: (key: string) => PersonHere | undefined
  /** True when this very connection holds it. */
  isMine: (key: string) => boolean
  /** All or none; false when one is a colleague's or the connection is lost. Fields are written only after true. */
  take: (keys: string[]) => Promise<boolean>
  /** Says that a key was pressed: the pen is kept for another minute. */
  touch: (keys: string[]) => void
  release: (keys: string[]) => void
}

export interface PersonInSheet extends PersonHere {
  clientId: number
  isMe: boolean
  where?: SaidPresence['where']
}

/** A step that was not undone says why: `skipped` where a colleague changed its line since. */
export type UndoOutcome = 'done' | 'nothing' | 'skipped' | 'pen-of-another'

/** What stands in a field that is open: becomes a draft of mine if the connection is lost. */
export interface OpenField {
  key: string
  field: string
  before: unknown
  value: unknown
}

export interface SheetConnection {
  /** Replaced when the connection comes back with something unsent, and after a refusal: watch it. */
  doc: ShallowRef<Y.Doc>
  awareness: ShallowRef<Awareness>
  /** For Collaboration's `yUndoOptions`; replaced together with `doc`. */
  undoManager: ShallowRef<Y.UndoManager>
  status: Readonly<Ref<ConnectionStatus>>
  /** Whether this person may change the sheet at all. */
  mayWrite: Readonly<Ref<boolean>>
  /** Whether fields of lines are open: they close while the connection is lost; prose stays open. */
  linesOpen: Readonly<Ref<boolean>>
  pens: Pens
  people: Readonly<Ref<readonly PersonInSheet[]>>
  drafts: Readonly<Ref<readonly DraftOfMine[]>>
  /** Origin for transactions that write lines or front: `doc.transact(fn, connection.origin)`. */
  origin: symbol
  undo: () => Promise<UndoOutcome>
  redo: () => Promise<UndoOutcome>
  /** Says where I am, for colleagues. */
  standAt: (where: { key: string; field?: string } | null) => void
  /** The field in my hands right now; null once it was written or left. */
  holdField: (field: OpenField | null) => void
  /** What was typed and cannot be written is kept and shown to its author; what equals the sheet is not. */
  keepAsDraft: (reason: string, fields: readonly OpenField[]) => Promise<void>
  close: () => Promise<void>
}

export interface OpenSheetOptions {
  documentId: string
  person: { id: string; name: string }
}
