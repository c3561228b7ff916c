/** What a person may do with a document, asked at the door and again while the socket lives. */
import type { FirmScope } from '@server/repositories/transaction'

export interface Rights {
  scope: FirmScope
  /** Whether the person may change the sheet, by role, part and state. */
  mayWrite: boolean
}

/** Undefined where the person may not even read it, or it does not exist. */
export type Authorise = (accountId: string, documentId: string) => Promise<Rights | undefined>

export interface Visitor {
  accountId: string
  name: string
  /** The session that opened the socket; absent where there are none, and then none is asked after. */
  sessionId?: string
}

/** Whether the session that a socket was opened with still stands. */
export type IsInForce = (session: { accountId: string; sessionId: string }) => Promise<boolean>
