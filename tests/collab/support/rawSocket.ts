/** A socket without a client behind it: sends what no page of ours would send. */
import * as decoding from 'lib0/decoding'
import { WebSocket as NodeSocket } from 'ws'
import * as Y from 'yjs'
import { changeFrame, messages, readStored, syncFrame, syncSteps, PROTOCOL_VERSION } from '@shared/protocol'
import { FORMAT_VERSION } from '@shared/sheet/sheet'
import type { Worker } from './firm'
import { origin, until, type Process } from './office'

export interface RawSocket {
  doc: Y.Doc
  closed: { code: number; reason: string } | undefined
  stored: number[]
  /** Frames by message number. */
  frames: Uint8Array[]
  send(frame: Uint8Array | string): void
  /** Sends what `change` does to the document under this number. */
  change(number: number, change: (doc: Y.Doc) => void): void
  close(): void
}

export const rawSocket = async (
  process: Process,
  documentId: string,
  worker: Worker | undefined,
  options: { parameters?: string; origin?: string } = {},
): Promise<RawSocket> => {
  const doc = new Y.Doc()
  const parameters =
    options.parameters ?? `protocol=${PROTOCOL_VERSION}&format=${FORMAT_VERSION}&client=${doc.clientID}`
  const socket = new NodeSocket(`${process.address}/collaboration/${documentId}?${parameters}`, {
    headers: {
      ...(worker === undefined ? {} : { 'x-account': worker.id }),
      origin: options.origin ?? origin,
    },
  })
  const raw: RawSocket = {
    doc,
    closed: undefined,
    stored: [],
    frames: [],
    send: (frame) => socket.send(frame),
    change: (number, change) => {
      const before = Y.encodeStateVector(doc)
      const sent: Uint8Array[] = []
      const collect = (update: Uint8Array) => sent.push(update)
      doc.on('update', collect)
      doc.transact(() => change(doc))
      doc.off('update', collect)
      socket.send(changeFrame(number, sent[0] ?? Y.encodeStateAsUpdate(doc, before)))
    },
    close: () => {
      socket.close()
      doc.destroy()
    },
  }
  let isSynced = false
  socket.on('error', () => undefined)
  socket.on('close', (code, reason) => (raw.closed = { code, reason: reason.toString() }))
  socket.on('message', (message: Buffer) => {
    const frame = new Uint8Array(message)
    raw.frames.push(frame)
    const decoder = decoding.createDecoder(frame)
    const number = decoding.readVarUint(decoder)
    if (number === messages.stored) raw.stored.push(readStored(decoder).number)
    if (number !== messages.sync) return
    const step = decoding.readVarUint(decoder)
    const bytes = decoding.readVarUint8Array(decoder)
    if (step === syncSteps.stateVector) return
    Y.applyUpdate(doc, bytes, 'server')
    isSynced = true
  })
  socket.on('open', () => socket.send(syncFrame(syncSteps.stateVector, Y.encodeStateVector(doc))))
  await until(() => isSynced || raw.closed !== undefined, 'synced or closed')
  return raw
}
