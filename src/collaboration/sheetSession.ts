/**
 * A sheet that is open in one page, from loading through loss and return to the end. Free of Vue and of
 * the browser. The rule that shapes it: while something is unsent, a Y.Doc does not outlive its
 * connection. The old document stays on the screen until a fresh one has loaded the stored state and
 * taken mine in; then it is replaced.
 */
import { ObservableV2 } from 'lib0/observable'
import type { Awareness } from 'y-protocols/awareness'
import * as Y from 'yjs'
import { closeCodes, closeReasons, type HeldPen, type PersonHere } from '@shared/protocol'
import { endVersions, mergeMine, pensToTake, versionsOf } from './comingBack'
import type { ConnectionStatus, OpenField } from './contracts'
import { Copy } from './copy'
import type { DeviceStore, KeptDraft, SheetKey } from './deviceStore'
import { differingFields, differingKeys, differingProse } from './differences'
import { Drafts } from './drafts'
import { KeptChanges } from './keptChanges'
import { Link, type LinkOptions } from './link'
import { forgetOrphan, readOrphans, type KeptVersion } from './orphans'

export interface SessionOptions extends LinkOptions {
  person: string
  store: DeviceStore
  failed?: ((error: unknown) => void) | undefined
}

interface SessionEvents {
  /** Another document is the sheet from now on; the former one is ended after this. */
  replaced: (doc: Y.Doc, awareness: Awareness) => void
  status: (status: ConnectionStatus) => void
  rights: (mayWrite: boolean) => void
  pens: (pens: readonly HeldPen[]) => void
  drafts: (drafts: readonly KeptDraft[]) => void
}

/** Pause before a page that was refused, or lost what it was loading, tries again. */
const AGAIN_MS = 400
/** How often pens are asked for on coming back, while colleagues go on writing. */
const MOST_ROUNDS = 5

const OFFLINE_FIELD = 'The connection was lost while this field was open.'
const CONTESTED = 'A colleague changed the same line while you were away. Theirs stands in the sheet.'

export class SheetSession extends ObservableV2<SessionEvents> {
  mayWrite = false
  status: ConnectionStatus = { state: 'loading' }
  pens: readonly HeldPen[] = []
  me: PersonHere | undefined
  readonly drafts: Drafts
  /** What is shown and edited. */
  #shown: Copy
  /** What is connected, or tries to be: the shown copy, or a fresh one that is to replace it. */
  #coming: Copy
  #storedAt: Date | undefined
  #openField: OpenField | null = null
  #again: ReturnType<typeof setTimeout> | undefined
  #isClosed = false
  readonly #page = crypto.randomUUID()
  readonly #sheet: SheetKey
  readonly #options: SessionOptions
  readonly #release: () => void
  readonly #failed: (error: unknown) => void

  constructor(options: SessionOptions) {
    super()
    this.#options = options
    this.#sheet = { person: options.person, document: options.documentId }
    this.#failed = options.failed ?? (() => undefined)
    this.#release = options.store.claim(this.#page)
    this.drafts = new Drafts(options.store, this.#sheet, (all) => this.emit('drafts', [all]), this.#failed)
    void this.drafts.load().catch(this.#failed)
    this.#coming = this.#shown = this.#newCopy()
    this.#shown.link.connect()
  }

  get doc(): Y.Doc {
    return this.#shown.link.doc
  }
  get awareness(): Awareness {
    return this.#shown.link.awareness
  }
  /** Whether what is shown is connected and has the stored state. */
  get isConnected(): boolean {
    return this.#coming === this.#shown && this.#shown.kept !== undefined && this.#shown.link.isSynced
  }
  get hasUnsent(): boolean {
    return this.#shown.hasUnsent
  }

  /** The field in hand; null once it was written or left. */
  holdField(field: OpenField | null): void {
    this.#openField = field
  }

  async takePens(keys: string[]): Promise<boolean> {
    if (!this.isConnected || !this.mayWrite) return false
    return keys.length === 0 || (await this.#shown.link.askPens('take', keys))?.granted === true
  }

  /** False where one has lapsed or gone. */
  async keepPens(keys: string[]): Promise<boolean> {
    return this.isConnected && (await this.#shown.link.askPens('keep', keys))?.granted === true
  }

  releasePens(keys: string[]): void {
    if (!this.isConnected || keys.length === 0) return
    // What was written with the pens goes first.
    this.#shown.flush()
    void this.#shown.link.askPens('release', keys)
  }

  async keepAsDraft(reason: string, fields: readonly OpenField[]): Promise<void> {
    const changed = fields.filter(({ before, value }) => value !== before)
    await this.drafts.add(
      reason,
      changed.map(({ key, field, before, value }) => ({ key, field, before, mine: value })),
    )
  }

  /** Stops; what is unsent stays on the device for the next time. */
  async close(): Promise<void> {
    if (this.#isClosed) return
    this.#shown.flush()
    this.#isClosed = true
    clearTimeout(this.#again)
    await this.#rescueOpenField('The sheet was closed while this field was open.')
    const { kept } = this.#shown
    if (kept !== undefined) await (kept.hasUnsent ? kept.onDevice() : kept.forget()).catch(this.#failed)
    if (this.#coming !== this.#shown) this.#coming.end()
    this.#shown.end()
    this.#release()
    super.destroy()
  }

  #newCopy(): Copy {
    const link = new Link(this.#options)
    const copy = new Copy(link, {
      written: () => this.#written(copy),
      tooLarge: () => void this.#refuse(copy, closeCodes.tooLarge, '').catch(this.#failed),
    })
    link.on('welcome', (welcome) => {
      copy.welcome = welcome
      this.me = welcome.person
      this.#showPens(welcome.pens)
    })
    link.on('synced', () => void this.#arrive(copy).catch(this.#failed))
    link.on('stored', ({ at }) => {
      this.#storedAt = new Date(at)
      this.#showProgress()
    })
    link.on('pens', (pens) => this.#showPens(pens))
    link.on('rights', (mayWrite) => this.#showRights(mayWrite))
    link.on('lost', () => this.#lose(copy))
    link.on('refused', (code, reason) => void this.#refuse(copy, code, reason).catch(this.#failed))
    return copy
  }

  /** A fresh copy loads the stored state; what is shown stays on the screen until it is there. */
  #loadFresh(afterMs: number): void {
    if (this.#isClosed) return
    const former = this.#coming
    if (former === this.#shown) former.link.leave()
    else former.end()
    const fresh = this.#newCopy()
    this.#coming = fresh
    clearTimeout(this.#again)
    this.#again = setTimeout(() => fresh.link.connect(), afterMs)
  }

  #written(copy: Copy): void {
    if (copy !== this.#shown) return
    // Typed while the connection is gone: from here on this document must not connect again.
    if (this.#coming === copy && copy.kept !== undefined && !copy.link.isSynced) this.#loadFresh(0)
    this.#showProgress()
  }

  /** The stored state is there: for the first time, again, or beside what is shown. */
  async #arrive(copy: Copy): Promise<void> {
    const { welcome } = copy
    if (this.#isClosed || copy !== this.#coming || welcome === undefined) return
    if (copy === this.#shown && copy.kept !== undefined) {
      // The same document goes on where nothing is unsent and the sheet was not closed and opened again.
      if (copy.hasUnsent || copy.kept.epoch !== welcome.epoch) return this.#loadFresh(0)
      return this.#settle(copy, welcome.mayWrite)
    }
    copy.kept = new KeptChanges({
      store: this.#options.store,
      sheet: this.#sheet,
      page: this.#page,
      epoch: welcome.epoch,
      base: Y.encodeStateAsUpdate(copy.link.doc),
      failed: this.#failed,
    })
    const former = this.#shown
    const keeping: Promise<void>[] = []
    if (former !== copy && former.kept !== undefined) {
      const { kept } = former
      const isTaken = await this.#takeIn(
        copy,
        {
          epoch: kept.epoch,
          acknowledged: kept.acknowledged,
          refusedBecause: former.refusedBecause,
          unsent: () => {
            former.flush()
            return kept.unsent
          },
        },
        keeping,
      )
      if (!isTaken || this.#isClosed || copy !== this.#coming) return
    }
    this.#shown = copy
    if (former !== copy) {
      this.emit('replaced', [copy.link.doc, copy.link.awareness])
      copy.flush()
      await Promise.all([copy.kept.onDevice(), ...keeping])
      await former.kept?.forget()
      former.end()
    }
    this.#settle(copy, welcome.mayWrite)
    await this.#adoptOrphans(copy)
  }

  #settle(copy: Copy, mayWrite: boolean): void {
    if (copy !== this.#shown || !copy.link.isSynced) return
    this.#storedAt ??= new Date()
    this.#showRights(mayWrite)
    this.#showProgress()
  }

  /** What pages left behind that are gone: closed, crashed, reloaded. */
  async #adoptOrphans(copy: Copy): Promise<void> {
    for (const orphan of await readOrphans(this.#options.store, this.#sheet)) {
      if (this.#isClosed || copy !== this.#shown) return
      const keeping: Promise<void>[] = []
      const isTaken = await this.#takeIn(copy, { ...orphan, unsent: () => orphan.unsent }, keeping)
      if (!isTaken) return
      copy.flush()
      await Promise.all([copy.kept?.onDevice(), ...keeping])
      await forgetOrphan(this.#options.store, this.#sheet, orphan)
    }
  }

  /**
   * Takes unsent changes into a copy that has the stored state; what cannot be merged becomes a draft.
   * False where the connection went meanwhile: nothing was taken then.
   * @param keeping receives what must be on the device before what it was made of is forgotten there.
   * It is not waited for here: whoever types goes on typing, and between taking in and showing nothing
   * may be typed into the former copy.
   */
  async #takeIn(
    copy: Copy,
    version: KeptVersion & { unsent: () => readonly Uint8Array[] },
    keeping: Promise<void>[],
  ): Promise<boolean> {
    const withheld = new Set<string>()
    const held = new Set<string>()
    for (let round = 0; ; round++) {
      const versions = versionsOf(version.acknowledged, version.unsent(), copy.link.doc)
      try {
        if (versions.unsent.length === 0) return true
        const reason = this.#reasonAgainst(copy, version)
        if (reason !== undefined) {
          keeping.push(this.#draftOf(versions, reason))
          return true
        }
        const wanted = pensToTake(versions).filter((key) => !held.has(key) && !withheld.has(key))
        if (wanted.length === 0 || round >= MOST_ROUNDS) {
          const merged = mergeMine(versions, [...withheld, ...wanted])
          if (merged === undefined) {
            keeping.push(this.#draftOf(versions, 'The stored sheet lacks what this was written upon.'))
            return true
          }
          if (merged.update !== undefined) Y.applyUpdate(copy.link.doc, merged.update, this)
          copy.flush()
          if (held.size > 0) void copy.link.askPens('release', [...held])
          if (merged.left.length > 0) keeping.push(this.drafts.add(CONTESTED, merged.left))
          return true
        }
        const answer = await copy.link.askPens('take', wanted)
        if (answer === undefined) return false
        if (answer.granted) for (const key of wanted) held.add(key)
        else
          for (const key of answer.taken.length > 0 ? answer.taken.map((pen) => pen.key) : wanted)
            withheld.add(key)
      } finally {
        endVersions(versions)
      }
    }
  }

  #reasonAgainst(copy: Copy, version: KeptVersion): string | undefined {
    if (version.refusedBecause !== undefined) return version.refusedBecause
    if (copy.welcome?.epoch !== version.epoch) return closeReasons[closeCodes.olderEpoch]
    return copy.welcome.mayWrite ? undefined : 'You may no longer write in this sheet.'
  }

  async #draftOf({ base, mine }: { base: Y.Doc; mine: Y.Doc }, reason: string): Promise<void> {
    const fields = [...differingFields(base, mine, differingKeys(base, mine)), ...differingProse(base, mine)]
    await this.drafts.add(reason, fields)
  }

  async #rescueOpenField(reason: string): Promise<void> {
    const field = this.#openField
    this.#openField = null
    if (field !== null) await this.keepAsDraft(reason, [field])
  }

  #lose(copy: Copy): void {
    if (this.#isClosed || copy !== this.#coming) return
    if (copy !== this.#shown) return copy.kept === undefined ? undefined : this.#loadFresh(AGAIN_MS)
    void this.#rescueOpenField(OFFLINE_FIELD)
    copy.flush()
    if (copy.hasUnsent) this.#loadFresh(0)
    this.#showProgress()
  }

  async #refuse(copy: Copy, code: number, said: string): Promise<void> {
    if (this.#isClosed || copy !== this.#coming) return
    const reason = said === '' ? (closeReasons[code] ?? 'The server refused this.') : said
    copy.flush()
    const wasShown = copy === this.#shown && copy.kept !== undefined
    if (code === closeCodes.reload) return this.#show({ state: 'reload', reason })
    if (wasShown) {
      await this.#rescueOpenField(reason)
      // Too much at once, or signed out: no fault of what was written, which is merged on return.
      const isFaultless = code === closeCodes.tooMany || code === closeCodes.notSignedIn
      if (!isFaultless) copy.refusedBecause = reason
      this.#show({ state: 'refused', reason })
      return this.#loadFresh(code === closeCodes.tooMany ? 10 * AGAIN_MS : AGAIN_MS)
    }
    // Refused at the door: nothing will be loaded. What is unsent stays here, on the screen and the device.
    this.#showRights(false)
    this.#show({ state: 'refused', reason })
    const { kept } = this.#shown
    if (kept === undefined || !kept.hasUnsent || code === closeCodes.notSignedIn) return
    const versions = versionsOf(kept.acknowledged, kept.unsent, this.#shown.link.doc)
    await this.#draftOf({ base: versions.base, mine: this.doc }, reason)
    endVersions(versions)
    await kept.forget()
  }

  #showPens(pens: readonly HeldPen[]): void {
    this.pens = pens
    this.emit('pens', [pens])
  }

  #showRights(mayWrite: boolean): void {
    this.mayWrite = mayWrite
    this.emit('rights', [mayWrite])
  }

  #showProgress(): void {
    if (this.#shown.kept === undefined && this.status.state === 'loading') return
    if (!this.isConnected) {
      if (this.status.state !== 'refused' && this.status.state !== 'reload') this.#show({ state: 'offline' })
      return
    }
    this.#show({ state: this.hasUnsent ? 'sending' : 'stored' })
  }

  #show(status: ConnectionStatus): void {
    this.status = this.#storedAt === undefined ? status : { at: this.#storedAt, ...status }
    this.emit('status', [this.status])
  }
}
