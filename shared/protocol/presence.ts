/**
 * Presence: who is here and where. It travels as awareness of the Yjs protocols. A client says where it
 * is; who it is, the server writes over whatever the client said.
 */
import { z } from 'zod'

export const personHereSchema = z.object({
  account: z.string().max(64),
  name: z.string().max(200),
  initials: z.string().max(4),
  /** Index into the pen colours of the palette. */
  pen: z.number().int().min(0).max(31),
})
export type PersonHere = z.infer<typeof personHereSchema>

/** Colours are chosen by the account, so that a person has the same one for everybody, in every sheet. */
export const penColours = 8

/** A caret of the Tiptap binding: relative positions, opaque here. */
const cursorSchema = z.object({ anchor: z.unknown(), head: z.unknown() }).nullable()

/** What a client may say; anything else is left out. */
export const saidPresenceSchema = z.object({
  cursor: cursorSchema.optional(),
  /** Line or front text in which the person stands, and the field. */
  where: z
    .object({ key: z.string().max(80), field: z.string().max(200).optional() })
    .nullable()
    .optional(),
})
export type SaidPresence = z.infer<typeof saidPresenceSchema>

/** What everybody receives. `color` is for the caret's own renderer, which is replaced by ours. */
export const presenceSchema = saidPresenceSchema.extend({ user: personHereSchema })
export type Presence = z.infer<typeof presenceSchema>

/** First letters of first and last name. */
export const initialsOf = (name: string): string => {
  const words = name.trim().split(/\s+/).filter(Boolean)
  const first = words[0]?.[0] ?? '?'
  const last = words.length > 1 ? (words[words.length - 1]?.[0] ?? '') : ''
  return (first + last).toUpperCase()
}

/** A colour index that depends on the account alone. */
export const penColourOf = (account: string): number => {
  let sum = 0
  for (const letter of account) sum = (sum * 31 + (letter.codePointAt(0) ?? 0)) % 9973
  return sum % penColours
}
