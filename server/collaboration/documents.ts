/** The sheets that are open in this process: each loaded once, let go when nobody is left. */
import { closeCodes } from '@shared/protocol'
import { inTransaction, type FirmScope } from '@server/repositories/transaction'
import { LiveDocument, type Surroundings } from './liveDocument'
import { loadDocument } from './storedDocument'

export type DocumentSurroundings = Omit<Surroundings, 'ended'>

export class Documents {
  readonly #open = new Map<string, Promise<LiveDocument>>()
  readonly #live = new Set<LiveDocument>()
  readonly #lingering = new Map<LiveDocument, NodeJS.Timeout>()
  readonly #surroundings: DocumentSurroundings
  readonly #lingerMs: number

  /** @param lingerMs how long a document stays in memory when the last one has left */
  constructor(surroundings: DocumentSurroundings, lingerMs: number) {
    this.#surroundings = surroundings
    this.#lingerMs = lingerMs
  }

  /** @throws whatever loading throws; the document is not kept then, and the next one tries anew */
  async open(scope: FirmScope, id: string): Promise<LiveDocument> {
    const known = this.#open.get(id)
    if (known !== undefined) return known
    const opening = this.#load(scope, id)
    this.#open.set(id, opening)
    try {
      return await opening
    } catch (error) {
      if (this.#open.get(id) === opening) this.#open.delete(id)
      throw error
    }
  }

  async #load(scope: FirmScope, id: string): Promise<LiveDocument> {
    const loaded = await inTransaction(scope, (tx) => loadDocument(tx, id))
    const document = new LiveDocument(scope, loaded, {
      ...this.#surroundings,
      ended: (ended) => this.#forget(ended),
    })
    try {
      await document.pens.refresh()
    } catch (error) {
      document.end(closeCodes.tryAgain)
      throw error
    }
    this.#live.add(document)
    this.#linger(document)
    return document
  }

  #forget(document: LiveDocument): void {
    this.#open.delete(document.id)
    this.#live.delete(document)
    clearTimeout(this.#lingering.get(document))
    this.#lingering.delete(document)
  }

  /** To be called when somebody has left, and when somebody who asked for it never came in. */
  #linger(document: LiveDocument): void {
    clearTimeout(this.#lingering.get(document))
    const timer = setTimeout(() => void this.#letGo(document), this.#lingerMs)
    timer.unref()
    this.#lingering.set(document, timer)
  }

  left(document: LiveDocument): void {
    if (document.members.size === 0 && !document.isEnded) this.#linger(document)
  }

  async #letGo(document: LiveDocument): Promise<void> {
    await document.idle()
    if (document.members.size > 0 || document.isEnded) return
    document.end(closeCodes.tryAgain)
  }

  /** Those that are loaded now. */
  get live(): ReadonlySet<LiveDocument> {
    return this.#live
  }

  find(id: string): LiveDocument | undefined {
    for (const document of this.#live) if (document.id === id) return document
    return undefined
  }

  /** Everything that waits is stored and acknowledged, then every socket is closed. */
  async close(): Promise<void> {
    await Promise.allSettled(this.#open.values())
    const documents = [...this.#live]
    await Promise.all(documents.map((document) => document.idle()))
    for (const document of documents) document.end(closeCodes.restarting, 'The server restarts.')
    await Promise.all(documents.map((document) => document.finished()))
  }
}
