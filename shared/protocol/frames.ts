/** Frames as bytes: `varUint(message) payload`. Reading throws on rubbish; whoever reads a socket catches. */
import * as decoding from 'lib0/decoding'
import * as encoding from 'lib0/encoding'
import type { z } from 'zod'
import { messages, syncSteps } from './messages'

const frame = (message: number, write: (encoder: encoding.Encoder) => void): Uint8Array => {
  const encoder = encoding.createEncoder()
  encoding.writeVarUint(encoder, message)
  write(encoder)
  return encoding.toUint8Array(encoder)
}

/** A message whose payload is JSON in one string. */
export const jsonFrame = (message: number, payload: unknown): Uint8Array =>
  frame(message, (encoder) => encoding.writeVarString(encoder, JSON.stringify(payload)))

/** @throws when the text is not JSON or not of this shape */
export const readJson = <T>(decoder: decoding.Decoder, schema: z.ZodType<T>): T =>
  schema.parse(JSON.parse(decoding.readVarString(decoder)))

/** An update with the number by which it will be acknowledged. */
export const changeFrame = (number: number, update: Uint8Array): Uint8Array =>
  frame(messages.change, (encoder) => {
    encoding.writeVarUint(encoder, number)
    encoding.writeVarUint8Array(encoder, update)
  })

export interface Change {
  number: number
  update: Uint8Array
}
export const readChange = (decoder: decoding.Decoder): Change => ({
  number: decoding.readVarUint(decoder),
  update: decoding.readVarUint8Array(decoder),
})

export interface Stored {
  number: number
  head: number
  /** Milliseconds since 1970, the server's clock. */
  at: number
}
export const storedFrame = ({ number, head, at }: Stored): Uint8Array =>
  frame(messages.stored, (encoder) => {
    encoding.writeVarUint(encoder, number)
    encoding.writeVarUint(encoder, head)
    encoding.writeVarUint(encoder, at)
  })
export const readStored = (decoder: decoding.Decoder): Stored => ({
  number: decoding.readVarUint(decoder),
  head: decoding.readVarUint(decoder),
  at: decoding.readVarUint(decoder),
})

/** `step` is one of `syncSteps`; the bytes are a state vector or an update. */
export const syncFrame = (step: number, bytes: Uint8Array): Uint8Array =>
  frame(messages.sync, (encoder) => {
    encoding.writeVarUint(encoder, step)
    encoding.writeVarUint8Array(encoder, bytes)
  })
export const updateFrame = (update: Uint8Array): Uint8Array => syncFrame(syncSteps.update, update)

export const awarenessFrame = (update: Uint8Array): Uint8Array =>
  frame(messages.awareness, (encoder) => encoding.writeVarUint8Array(encoder, update))
