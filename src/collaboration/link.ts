/**
 * One connection of one Y.Doc: y-websocket's provider with our messages. Reconnection and awareness are
 * its work; sending updates is ours, as they are numbered and acknowledged.
 */
import type * as decoding from 'lib0/decoding'
import { readVarUint, readVarUint8Array } from 'lib0/decoding'
import { ObservableV2 } from 'lib0/observable'
import { Awareness } from 'y-protocols/awareness'
import { WebsocketProvider } from 'y-websocket'
import * as Y from 'yjs'
import {
  answerPensSchema,
  changeFrame,
  collaborationPath,
  isDecision,
  jsonFrame,
  messages,
  ownHandshake,
  pensSchema,
  readJson,
  readStored,
  rightsSchema,
  syncFrame,
  syncSteps,
  welcomeSchema,
  type AnswerPens,
  type AskPens,
  type HeldPen,
  type Stored,
  type Welcome,
} from '@shared/protocol'

export interface LinkEvents {
  /** First word of the server on this connection. */
  welcome: (welcome: Welcome) => void
  /** The stored state has been applied. */
  synced: () => void
  /** An update of a colleague, or the stored state. */
  received: (update: Uint8Array) => void
  /** The server lacks something before what was sent: send everything from this state. */
  asked: (stateVector: Uint8Array) => void
  stored: (stored: Stored) => void
  pens: (pens: HeldPen[]) => void
  rights: (mayWrite: boolean) => void
  /** The connection is gone and will be tried again by itself. */
  lost: () => void
  /** The server has decided; this link is finished. */
  refused: (code: number, reason: string) => void
}

export interface LinkOptions {
  /** `wss://host`, without a path. */
  address: string
  documentId: string
  WebSocket?: typeof WebSocket | undefined
  /** Longest pause between two tries. */
  maxBackoffMs?: number | undefined
}

type Events = { [Name in keyof LinkEvents]: LinkEvents[Name] }

export class Link extends ObservableV2<Events> {
  readonly doc = new Y.Doc()
  readonly awareness = new Awareness(this.doc)
  readonly #provider: WebsocketProvider
  readonly #answers = new Map<number, (answer: AnswerPens | undefined) => void>()
  #request = 0
  #askedAgainAt = 0
  #isEnded = false

  constructor({ address, documentId, WebSocket: Socket, maxBackoffMs }: LinkOptions) {
    super()
    this.#provider = new WebsocketProvider(address + collaborationPath, documentId, this.doc, {
      awareness: this.awareness,
      params: ownHandshake(this.doc.clientID),
      disableBc: true,
      connect: false,
      ...(Socket === undefined ? {} : { WebSocketPolyfill: Socket }),
      ...(maxBackoffMs === undefined ? {} : { maxBackoffTime: maxBackoffMs }),
    })
    // Its own sending is not numbered: who would know what is stored?
    this.doc.off('update', this.#provider._updateHandler)
    this.#hear()
    this.#provider.on('status', ({ status }) => {
      if (status === 'connected') this.#sayAgain()
      if (status === 'disconnected') this.#lose()
    })
    this.#provider.on('connection-close', (event) => {
      if (event !== null && isDecision(event.code)) {
        this.#isEnded = true
        const { code, reason } = event
        queueMicrotask(() => this.emit('refused', [code, reason]))
      }
    })
  }

  /** To be called once the listeners are there. */
  connect(): void {
    this.#provider.connect()
  }

  get isSynced(): boolean {
    return this.#provider.synced
  }

  get isEnded(): boolean {
    return this.#isEnded
  }

  sendChange(number: number, update: Uint8Array): void {
    this.#send(changeFrame(number, update))
  }

  /** Undefined where the connection went before the answer came. */
  askPens(act: AskPens['act'], keys: string[]): Promise<AnswerPens | undefined> {
    const request = this.#request++
    if (!this.isSynced) return Promise.resolve(undefined)
    return new Promise((resolve) => {
      this.#answers.set(request, resolve)
      this.#send(jsonFrame(messages.askPens, { request, act, keys }))
    })
  }

  /** Ends connection, document and awareness; nothing is emitted afterwards. */
  end(): void {
    this.leave()
    this.doc.destroy()
  }

  /** Ends the connection and leaves the document as it is, to be read and written on. */
  leave(): void {
    this.#isEnded = true
    super.destroy()
    this.#answerNobody()
    this.#provider.destroy()
  }

  #send(frame: Uint8Array): void {
    const { ws } = this.#provider
    if (ws !== null && ws.readyState === ws.OPEN) ws.send(new Uint8Array(frame))
  }

  /** The same clock again would be taken for old by who remembers this client. */
  #sayAgain(): void {
    const state = this.awareness.getLocalState()
    if (state !== null) this.awareness.setLocalState({ ...state })
  }

  #lose(): void {
    this.#answerNobody()
    if (!this.#isEnded) this.emit('lost', [])
  }

  #answerNobody(): void {
    for (const answer of this.#answers.values()) answer(undefined)
    this.#answers.clear()
  }

  #hear(): void {
    const on = (message: number, read: (decoder: decoding.Decoder) => void) => {
      this.#provider.messageHandlers[message] = (_encoder, decoder) => read(decoder)
    }
    on(messages.sync, (decoder) => this.#hearSync(decoder))
    on(messages.welcome, (decoder) => this.emit('welcome', [readJson(decoder, welcomeSchema)]))
    on(messages.stored, (decoder) => this.emit('stored', [readStored(decoder)]))
    on(messages.pens, (decoder) => this.emit('pens', [readJson(decoder, pensSchema).pens]))
    on(messages.rights, (decoder) => this.emit('rights', [readJson(decoder, rightsSchema).mayWrite]))
    on(messages.answerPens, (decoder) => {
      const answer = readJson(decoder, answerPensSchema)
      this.#answers.get(answer.request)?.(answer)
      this.#answers.delete(answer.request)
    })
  }

  #hearSync(decoder: decoding.Decoder): void {
    const step = readVarUint(decoder)
    const bytes = readVarUint8Array(decoder)
    if (step === syncSteps.stateVector) return this.emit('asked', [bytes])
    Y.applyUpdate(this.doc, bytes, this)
    this.emit('received', [bytes])
    this.#askForWhatIsMissing()
    if (step === syncSteps.state && !this.#provider.synced) {
      this.#provider.synced = true
      this.emit('synced', [])
    }
  }

  /** An update that came before the one it builds on would stay pending, silently. */
  #askForWhatIsMissing(): void {
    const { pendingStructs, pendingDs } = this.doc.store
    const now = Date.now()
    if ((pendingStructs === null && pendingDs === null) || now - this.#askedAgainAt < 1000) return
    this.#askedAgainAt = now
    this.#send(syncFrame(syncSteps.stateVector, Y.encodeStateVector(this.doc)))
  }
}
