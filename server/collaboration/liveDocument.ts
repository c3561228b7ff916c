/**
 * A sheet that people have open, in this process. Everything that reads or changes the server's copy
 * goes through one queue: catching up with other processes, answering who comes in, appending. So nobody
 * is ever shown what is not committed, and what could not be stored leaves no trace.
 */
import * as Y from 'yjs'
import {
  closeCodes,
  jsonFrame,
  limits,
  messages,
  storedFrame,
  syncFrame,
  syncSteps,
  updateFrame,
} from '@shared/protocol'
import { readDocument, type DocumentRow } from '@server/repositories/documentUpdates'
import { inTransaction, type FirmScope } from '@server/repositories/transaction'
import { appendGroup, MovedOn, StepsRefused, type Appended, type Step } from './appendGroup'
import { Compaction } from './compaction'
import { EditRecord } from './editRecord'
import { missesSomething, newWriters, wouldChange, type DecodedUpdate } from './incoming'
import type { Member } from './member'
import { isStorable } from './recordEntry'
import { PenDesk } from './penDesk'
import { Presences } from './presences'
import { loadDocument, updatesBetween, type LoadedDocument } from './storedDocument'

/** Updates that are appended in one transaction at most. */
const MOST_TOGETHER = 200

export interface Incoming {
  from: Member
  /** Zero where the sender expects no acknowledgement. */
  number: number
  update: Uint8Array
  decoded: DecodedUpdate
}

/** Stands in the queue after everything that was offered before it. */
interface Mark {
  reached: () => void
}
const isMark = (one: Incoming | Mark): one is Mark => 'reached' in one

export interface Surroundings {
  /** Told after a commit, for other processes. */
  headRaised: (documentId: string, head: number) => void
  pensChanged: (documentId: string) => void
  /** Told once, when the document must not be used any more. */
  ended: (document: LiveDocument) => void
  failed: (error: unknown) => void
}

export class LiveDocument {
  readonly id: string
  readonly scope: FirmScope
  readonly members = new Set<Member>()
  readonly pens: PenDesk
  readonly presences: Presences
  #doc: Y.Doc
  #record: EditRecord
  #row: DocumentRow
  #bytes: number
  readonly #owners = new Map<number, string>()
  readonly #compaction: Compaction
  readonly #surroundings: Surroundings
  #waiting: (Incoming | Mark)[] = []
  #errands: (() => void)[] = []
  #isBehind = false
  #isWorking = false
  #isEnded = false
  #idle: (() => void)[] = []

  constructor(scope: FirmScope, loaded: LoadedDocument, surroundings: Surroundings) {
    this.id = loaded.row.id
    this.scope = scope
    this.#row = loaded.row
    this.#doc = loaded.doc
    this.#bytes = loaded.bytes
    this.#record = new EditRecord(loaded.doc)
    this.#surroundings = surroundings
    this.#compaction = new Compaction(scope, this.id, loaded.stateHead, surroundings.failed)
    this.pens = new PenDesk(scope, this.id)
    this.presences = new Presences()
  }

  get head(): number {
    return this.#row.head
  }
  get epoch(): number {
    return this.#row.epoch
  }
  get format(): number {
    return this.#row.format
  }
  get isWritable(): boolean {
    return this.#row.writable
  }
  get isEnded(): boolean {
    return this.#isEnded
  }

  /** Takes an update into the queue. */
  offer(incoming: Incoming): void {
    this.#waiting.push(incoming)
    this.#run()
  }

  /** Resolves when everything that was offered so far is stored, or refused. */
  afterOffered(): Promise<void> {
    if (this.#isEnded) return Promise.resolve()
    return new Promise((reached) => {
      this.#waiting.push({ reached })
      this.#run()
    })
  }

  /** Runs when nothing uncommitted is in the copy and the copy has caught up. */
  whenSettled(errand: () => void): void {
    this.#errands.push(errand)
    this.#run()
  }

  /** Sends what the member's state vector lacks. */
  answerState(member: Member, stateVector: Uint8Array): void {
    this.whenSettled(() =>
      member.send(syncFrame(syncSteps.state, Y.encodeStateAsUpdate(this.#doc, stateVector))),
    )
  }

  /** To be called when another process may have appended, or changed the document's row. */
  lookAgain(): void {
    this.#isBehind = true
    this.#run()
  }

  broadcast(frame: Uint8Array, except?: Member): void {
    for (const member of this.members) if (member !== except) member.send(frame)
  }

  showPens(): void {
    this.broadcast(jsonFrame(messages.pens, { pens: this.pens.held }))
  }

  /** Resolves when nothing waits any more. */
  idle(): Promise<void> {
    return this.#isWorking ? new Promise((resolve) => this.#idle.push(resolve)) : Promise.resolve()
  }

  /** Closes every socket and forgets the copy; what is stored is untouched. */
  end(code: number, reason?: string): void {
    if (this.#isEnded) return
    this.#isEnded = true
    for (const member of [...this.members]) member.close(code, reason)
    this.members.clear()
    for (const mark of this.#waiting.splice(0)) if (isMark(mark)) mark.reached()
    this.#errands = []
    this.presences.end()
    this.#doc.destroy()
    this.#settleIdle()
    this.#surroundings.ended(this)
  }

  /** Resolves when the background work has ended. */
  async finished(): Promise<void> {
    await this.#compaction.finished()
  }

  #settleIdle(): void {
    for (const resolve of this.#idle.splice(0)) resolve()
  }

  #run(): void {
    if (this.#isWorking || this.#isEnded) return
    this.#isWorking = true
    void this.#work()
  }

  async #work(): Promise<void> {
    try {
      while (!this.#isEnded) {
        if (this.#isBehind) {
          this.#isBehind = false
          await this.#catchUp()
          continue
        }
        for (const errand of this.#errands.splice(0)) errand()
        const together = this.#waiting.splice(0, MOST_TOGETHER)
        if (together.length > 0) await this.#append(together)
        else if (this.#errands.length === 0) break
      }
      this.#isWorking = false
      this.#settleIdle()
    } catch (error) {
      this.#isWorking = false
      if (error instanceof MovedOn) return this.end(closeCodes.olderEpoch)
      this.#surroundings.failed(error)
      this.end(closeCodes.tryAgain, 'The change could not be stored just now.')
    }
  }

  async #append(together: (Incoming | Mark)[]): Promise<void> {
    const steps: Step[] = []
    const unchanged: Incoming[] = []
    let refused: Map<Step, number> | undefined
    for (const incoming of together) {
      if (isMark(incoming) || incoming.from.isRefused) continue
      try {
        const step = this.#examine(incoming)
        if (step === 'unchanged') unchanged.push(incoming)
        else if (step !== undefined) steps.push(step)
      } catch {
        // Decodable, and yet Yjs could not apply it: the copy can no longer be trusted.
        incoming.from.isRefused = true
        incoming.from.close(closeCodes.unreadable)
        refused = new Map()
        break
      }
    }
    if (refused === undefined && steps.length > 0) refused = await this.#store(steps)
    if (refused !== undefined) {
      await this.#withdraw(refused)
      this.#waiting.unshift(...together)
      return
    }
    const at = Date.now()
    for (const { from, number } of [...steps, ...unchanged])
      if (number > 0) from.send(storedFrame({ number, head: this.head, at }))
    for (const mark of together) if (isMark(mark)) mark.reached()
    this.#compaction.consider(this.#doc, this.head, (bytes) => (this.#bytes = bytes))
  }

  /** Applies what may be applied. Undefined: nothing is to be done with it any more. */
  #examine({ from, number, update, decoded }: Incoming): Step | 'unchanged' | undefined {
    if (!wouldChange(this.#doc, decoded)) return 'unchanged'
    const refuse = (code: number): undefined => {
      from.isRefused = true
      from.close(code)
    }
    if (!this.#row.writable) return refuse(closeCodes.olderEpoch)
    if (!from.mayWrite) return refuse(closeCodes.notAllowed)
    const writers = [...newWriters(this.#doc, decoded)]
    if (writers.some((client) => (this.#owners.get(client) ?? from.accountId) !== from.accountId))
      return refuse(closeCodes.foreignClient)
    if (this.#bytes + update.length > limits.documentBytes) return refuse(closeCodes.tooLarge)
    if (missesSomething(this.#doc, decoded)) {
      // Asking for everything from the state this copy has: the answer contains what is missing.
      from.send(syncFrame(syncSteps.stateVector, Y.encodeStateVector(this.#doc)))
      return undefined
    }
    const unboundWriters = writers
      .filter((clientId) => !this.#owners.has(clientId))
      .map((clientId) => ({ clientId, isFresh: Y.getState(this.#doc.store, clientId) === 0 }))
    const recorded = this.#record.record(() => Y.applyUpdate(this.#doc, update, from))
    if (!recorded.entries.every(isStorable)) throw new Error('names that no sheet has')
    return { from, number, update, recorded, unboundWriters }
  }

  /** Commits, then relays. What comes back is what may not be stored; then nothing was. */
  async #store(steps: Step[]): Promise<Map<Step, number> | undefined> {
    const appended = await this.#appendOrRefuse(steps)
    if (appended instanceof StepsRefused) return appended.codes
    const { head, owners } = appended
    for (const [client, account] of owners) this.#owners.set(client, account)
    this.#bytes += steps.reduce((sum, step) => sum + step.update.length, 0)
    // Another process may have appended in between: its updates have the numbers just below ours.
    const before = head - steps.length
    if (before > this.head) await this.#fetch(this.head, before)
    this.#row = { ...this.#row, head }
    for (const step of steps) this.broadcast(updateFrame(step.update), step.from)
    this.#surroundings.headRaised(this.id, head)
    return undefined
  }

  async #appendOrRefuse(steps: Step[]): Promise<Appended | StepsRefused> {
    try {
      return await appendGroup(this.scope, this.id, this.epoch, steps)
    } catch (error) {
      if (error instanceof StepsRefused) return error
      throw error
    }
  }

  /** Nothing of the group was stored: the copy goes back to what is, and whoever may not write is told. */
  async #withdraw(codes: Map<Step, number>): Promise<void> {
    for (const [step, code] of codes) {
      step.from.isRefused = true
      step.from.close(code)
    }
    const loaded = await inTransaction(this.scope, (tx) => loadDocument(tx, this.id))
    const old = this.#doc
    const missed = Y.encodeStateAsUpdate(loaded.doc, Y.encodeStateVector(old))
    const isAhead = loaded.row.head > this.head
    this.#doc = loaded.doc
    this.#record = new EditRecord(loaded.doc)
    this.#bytes = loaded.bytes
    this.#follow(loaded.row)
    old.destroy()
    if (isAhead) this.broadcast(updateFrame(missed))
  }

  async #catchUp(): Promise<void> {
    const row = await inTransaction(this.scope, (tx) => readDocument(tx, this.id))
    if (row === undefined) throw new MovedOn()
    if (row.head > this.head) await this.#fetch(this.head, row.head)
    this.#follow(row)
  }

  #follow(row: DocumentRow): void {
    if (row.epoch !== this.epoch || row.writable !== this.#row.writable) throw new MovedOn()
    this.#row = { ...row, head: Math.max(row.head, this.head) }
  }

  /** Applies and relays what another process has stored under the numbers in (after, upTo]. */
  async #fetch(after: number, upTo: number): Promise<void> {
    const updates = await inTransaction(this.scope, (tx) => updatesBetween(tx, this.id, after, upTo))
    for (const { bytes } of updates) {
      const update = new Uint8Array(bytes)
      this.#record.record(() => Y.applyUpdate(this.#doc, update))
      this.#bytes += update.length
      this.broadcast(updateFrame(update))
    }
    this.#row = { ...this.#row, head: upTo }
  }
}
