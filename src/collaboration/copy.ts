/** One Y.Doc with its connection and with what is kept of it: what is written is numbered, kept and sent. */
import * as Y from 'yjs'
import { limits, type Welcome } from '@shared/protocol'
import type { KeptChanges } from './keptChanges'
import type { Link } from './link'

/** Changes made within this time are sent as one. */
const TOGETHER_MS = 8
/** Room for the frame's own bytes. */
const MOST_BYTES = limits.frameBytes - 64

export interface CopyEvents {
  /** Something was written here. */
  written: () => void
  /** What was written at once is too large to be sent. */
  tooLarge: () => void
}

export class Copy {
  readonly link: Link
  welcome: Welcome | undefined
  kept: KeptChanges | undefined
  /** Set when the server refused what was written here: it becomes a draft and is not sent again. */
  refusedBecause: string | undefined
  #pending: Uint8Array[] = []
  #timer: ReturnType<typeof setTimeout> | undefined
  readonly #events: CopyEvents

  constructor(link: Link, events: CopyEvents) {
    this.link = link
    this.#events = events
    link.on('received', (update) => this.kept?.received(update))
    link.on('stored', ({ number }) => this.kept?.stored(number))
    link.on('asked', (stateVector) => this.#sendWhole(stateVector))
    link.doc.on('update', (update: Uint8Array, origin: unknown) => {
      if (origin !== link) this.#write(update)
    })
  }

  get hasUnsent(): boolean {
    return this.#pending.length > 0 || this.kept?.hasUnsent === true
  }

  #write(update: Uint8Array): void {
    this.#pending.push(update)
    this.#timer ??= setTimeout(() => this.flush(), TOGETHER_MS)
    this.#events.written()
  }

  /** Numbers, keeps and sends what was written until now. */
  flush(): void {
    clearTimeout(this.#timer)
    this.#timer = undefined
    const { kept } = this
    if (this.#pending.length === 0 || kept === undefined) return
    const update = Y.mergeUpdates(this.#pending.splice(0))
    const number = kept.add(update)
    if (update.length > MOST_BYTES) return this.#events.tooLarge()
    if (this.link.isSynced && !this.link.isEnded) this.link.sendChange(number, update)
  }

  #sendWhole(stateVector: Uint8Array): void {
    if (this.kept === undefined) return
    this.flush()
    const update = Y.encodeStateAsUpdate(this.link.doc, stateVector)
    this.link.sendChange(this.kept.add(update, true), update)
  }

  end(): void {
    clearTimeout(this.#timer)
    this.link.end()
  }
}
