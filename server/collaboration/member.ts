/** Somebody at a document by one socket, as the document sees it. */
import type { PersonHere } from '@shared/protocol'

export interface Member {
  readonly accountId: string
  /** The Yjs client of the page; pens belong to it. */
  readonly clientId: number
  readonly person: PersonHere
  /** Changes with rights and with the state of the revision. */
  mayWrite: boolean
  /** Set when the socket was closed for what it sent: nothing more of it is taken. */
  isRefused: boolean
  send(frame: Uint8Array): void
  close(code: number, reason?: string): void
}
