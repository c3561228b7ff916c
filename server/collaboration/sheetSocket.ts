/** One socket: reads frames, keeps to the limits, hands over to the document. Rubbish ends here. */
import * as decoding from 'lib0/decoding'
import type { RawData, WebSocket } from 'ws'
import * as Y from 'yjs'
import {
  askPensSchema,
  closeCodes,
  closeReasons,
  isDecision,
  jsonFrame,
  limits,
  messages,
  readChange,
  readJson,
  syncSteps,
  type AskPens,
  type PersonHere,
} from '@shared/protocol'
import { allowance } from './allowance'
import { decodeIncoming } from './incoming'
import type { LiveDocument } from './liveDocument'
import type { Member } from './member'

/** What may wait to be sent to a page that does not read. */
const MOST_BUFFERED = 64 * 1024 * 1024

export interface SheetSocketOptions {
  socket: WebSocket
  accountId: string
  sessionId: string | undefined
  clientId: number
  person: PersonHere
  mayWrite: boolean
  pensChanged: (documentId: string) => void
  failed: (error: unknown) => void
}

export class SheetSocket implements Member {
  readonly accountId: string
  readonly clientId: number
  readonly person: PersonHere
  mayWrite: boolean
  isRefused = false
  readonly #options: SheetSocketOptions
  readonly #socket: WebSocket
  #document: LiveDocument | undefined
  readonly #frames = allowance(limits.framesAtOnce, limits.framesPerSecond)
  readonly #bytes = allowance(limits.bytesAtOnce, limits.bytesPerSecond)
  readonly #states = allowance(limits.statesAtOnce, limits.statesPerSecond)
  #hasPens = false
  #asking: Promise<void> = Promise.resolve()

  constructor(options: SheetSocketOptions) {
    this.#options = options
    this.#socket = options.socket
    this.accountId = options.accountId
    this.clientId = options.clientId
    this.person = options.person
    this.mayWrite = options.mayWrite
  }

  get sessionId(): string | undefined {
    return this.#options.sessionId
  }

  get isOpen(): boolean {
    return this.#socket.readyState === this.#socket.OPEN
  }

  get documentId(): string | undefined {
    return this.#document?.id
  }

  /** Comes in: from now on frames are read, those that came during loading first. */
  enter(document: LiveDocument, early: [message: RawData, isBinary: boolean][]): void {
    this.#document = document
    document.members.add(this)
    this.send(
      jsonFrame(messages.welcome, {
        document: document.id,
        format: document.format,
        epoch: document.epoch,
        head: document.head,
        mayWrite: this.mayWrite && document.isWritable,
        person: this.person,
        pens: document.pens.held,
      }),
    )
    const everybody = document.presences.everybody()
    if (everybody !== undefined) this.send(everybody)
    for (const [message, isBinary] of early) this.#receive(message, isBinary)
    this.#socket.on('message', (message, isBinary) => this.#receive(message, isBinary))
  }

  leave(): void {
    const document = this.#document
    if (document === undefined || document.isEnded) return
    document.members.delete(this)
    const gone = document.presences.leave(this)
    if (gone !== undefined) document.broadcast(gone)
    if (this.#hasPens) this.#asking = this.#asking.then(() => this.#layDownPens(document))
  }

  async #layDownPens(document: LiveDocument): Promise<void> {
    try {
      // What this page sent last is stored first: it needs the pens.
      await document.afterOffered()
      await document.pens.layDown(this)
      await this.#showPens(document)
    } catch (error) {
      this.#options.failed(error)
    }
  }

  send(frame: Uint8Array): void {
    if (!this.isOpen) return
    if (this.#socket.bufferedAmount > MOST_BUFFERED)
      return this.close(closeCodes.tryAgain, 'This page does not keep up.')
    this.#socket.send(frame)
  }

  close(code: number, reason: string = closeReasons[code] ?? ''): void {
    if (isDecision(code)) this.isRefused = true
    this.#socket.close(code, Buffer.from(reason).subarray(0, 120).toString())
  }

  #receive(message: RawData, isBinary: boolean): void {
    if (this.isRefused || !this.isOpen) return
    if (!isBinary || !(message instanceof Buffer)) return this.close(closeCodes.unreadable)
    if (!this.#frames.take(1) || !this.#bytes.take(message.length)) return this.close(closeCodes.tooMany)
    // A view on ws's own memory would change under what Yjs keeps of it.
    this.#read(new Uint8Array(message))
  }

  #read(frame: Uint8Array): void {
    const document = this.#document
    if (document === undefined || document.isEnded || this.isRefused) return
    try {
      this.#dispatch(document, decoding.createDecoder(frame))
    } catch {
      this.close(closeCodes.unreadable)
    }
  }

  #dispatch(document: LiveDocument, decoder: decoding.Decoder): void {
    const message = decoding.readVarUint(decoder)
    switch (message) {
      case messages.sync: {
        const step = decoding.readVarUint(decoder)
        const bytes = decoding.readVarUint8Array(decoder)
        if (step === syncSteps.stateVector) {
          Y.decodeStateVector(bytes)
          if (!this.#states.take(1)) return this.close(closeCodes.tooMany)
          document.answerState(this, bytes)
        } else if (step === syncSteps.state || step === syncSteps.update) this.#offer(document, 0, bytes)
        else throw new Error('unknown step')
        return
      }
      case messages.change: {
        const { number, update } = readChange(decoder)
        if (number < 1) throw new Error('changes are numbered from 1')
        return this.#offer(document, number, update)
      }
      case messages.awareness:
        return document.broadcast(document.presences.hear(this, decoding.readVarUint8Array(decoder)))
      case messages.queryAwareness: {
        const everybody = document.presences.everybody()
        if (everybody !== undefined) this.send(everybody)
        return
      }
      case messages.askPens:
        return this.#queuePens(document, readJson(decoder, askPensSchema))
      default:
        throw new Error('unknown message')
    }
  }

  #offer(document: LiveDocument, number: number, update: Uint8Array): void {
    document.offer({ from: this, number, update, decoded: decodeIncoming(update) })
  }

  /** One after the other, as they were asked: a pen laid down and taken again must end up taken. */
  #queuePens(document: LiveDocument, ask: AskPens): void {
    this.#asking = this.#asking.then(() => this.#askPens(document, ask))
  }

  async #askPens(document: LiveDocument, ask: AskPens): Promise<void> {
    const answer = (granted: boolean, head: number, taken: unknown[]) =>
      this.send(jsonFrame(messages.answerPens, { request: ask.request, granted, head, taken }))
    try {
      if (ask.act === 'take' && !this.mayWrite) return answer(false, document.head, [])
      this.#hasPens = true
      // A pen is laid down after what was written with it is stored.
      if (ask.act === 'release') await document.afterOffered()
      const isHere = (clientId: number) =>
        [...document.members].some((one) => one.accountId === this.accountId && one.clientId === clientId)
      const { granted, head, taken } = await document.pens.ask(this, ask, document.epoch, isHere)
      if (!this.isOpen) return await this.#layDownPens(document)
      if (document.isEnded) return
      // The answer goes out when everything below the head of the grant has been sent before it.
      if (head > document.head) document.lookAgain()
      document.whenSettled(() => answer(granted, document.head, taken))
      if (ask.act !== 'keep' && granted) await this.#showPens(document)
    } catch (error) {
      this.#options.failed(error)
      answer(false, document.head, [])
    }
  }

  async #showPens(document: LiveDocument): Promise<void> {
    if (await document.pens.refresh()) document.showPens()
    this.#options.pensChanged(document.id)
  }
}
