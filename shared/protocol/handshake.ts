/**
 * The handshake stands in the address, so that an older program is refused before it has seen any
 * content: `/collaboration/<document>?protocol=1&format=1&client=7`.
 */
import { z } from 'zod'
import { FORMAT_VERSION } from '@shared/sheet/sheet'

/** Raised when frames change so that an older client could not speak with a newer server. */
export const PROTOCOL_VERSION = 1

export const collaborationPath = '/collaboration'

const version = z.coerce.number().int().min(1).max(1_000_000)
export const handshakeSchema = z.object({
  protocol: version,
  format: version,
  /** The Yjs client of the page: pens are held by it. */
  client: z.coerce.number().int().min(0).max(0xffffffff),
})
export type Handshake = z.infer<typeof handshakeSchema>

/** What this program says of itself. */
export const ownHandshake = (clientId: number): Record<string, string> => ({
  client: String(clientId),
  protocol: String(PROTOCOL_VERSION),
  format: String(FORMAT_VERSION),
})

/** Whether a client that says this may read a document of this format. */
export const speaksWith = (handshake: Handshake, documentFormat: number): boolean =>
  handshake.protocol === PROTOCOL_VERSION && handshake.format >= documentFormat

/** The document a socket's path asks for; undefined where the path is no collaboration path. */
export const documentOfPath = (path: string): string | undefined => {
  const found = /^\/collaboration\/([0-9a-f]{8}-[0-9a-f]{4}-[0-9a-f]{4}-[0-9a-f]{4}-[0-9a-f]{12})$/i.exec(
    path,
  )
  return found?.[1]?.toLowerCase()
}
