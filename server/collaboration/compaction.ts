/**
 * Merges a document's updates into one state, in the background: the bytes are taken between two
 * appends, written later, and never lock the row that appends need. The edit record stays as it is.
 */
import * as Y from 'yjs'
import { forgetUpdates, saveState } from '@server/repositories/documentUpdates'
import { inTransaction, type FirmScope } from '@server/repositories/transaction'

/** Updates since the last merged state that make another one worth its while. */
const UPDATES_BETWEEN = 300
/** Updates that stay behind the merged state, for other processes that fetch by number. */
const UPDATES_KEPT = 600

export class Compaction {
  #running: Promise<void> | undefined
  #lastHead: number
  readonly #scope: FirmScope
  readonly #documentId: string
  readonly #failed: (error: unknown) => void

  constructor(scope: FirmScope, documentId: string, lastHead: number, failed: (error: unknown) => void) {
    this.#scope = scope
    this.#documentId = documentId
    this.#lastHead = lastHead
    this.#failed = failed
  }

  /** @param doc everything up to `head`, and nothing that is not committed */
  consider(doc: Y.Doc, head: number, measured: (bytes: number) => void): void {
    if (this.#running !== undefined || head - this.#lastHead < UPDATES_BETWEEN) return
    const bytes = Y.encodeStateAsUpdate(doc)
    this.#lastHead = head
    measured(bytes.length)
    this.#running = this.#write(head, bytes).finally(() => (this.#running = undefined))
  }

  async #write(head: number, bytes: Uint8Array): Promise<void> {
    try {
      await inTransaction(this.#scope, (tx) =>
        saveState(tx, this.#documentId, { head, bytes: Buffer.from(bytes) }),
      )
      await inTransaction(this.#scope, (tx) => forgetUpdates(tx, this.#documentId, head - UPDATES_KEPT))
    } catch (error) {
      // Nothing is lost: the updates are still there, and the next turn tries again.
      this.#failed(error)
    }
  }

  async finished(): Promise<void> {
    await this.#running
  }
}
