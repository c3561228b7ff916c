/** What is done by the clock: rights are asked again, dead sockets are found, lapsed pens are laid down. */
import type { WebSocketServer } from 'ws'
import { closeCodes, jsonFrame, messages } from '@shared/protocol'
import type { Documents } from './documents'
import type { Authorise, IsInForce } from './rights'
import type { SheetSocket } from './sheetSocket'

export interface Watch {
  doorman: WebSocketServer
  sockets: ReadonlySet<SheetSocket>
  documents: Documents
  authorise: Authorise
  isInForce: IsInForce
  showPens: (documentId: string) => Promise<void>
  recheckMs: number
  failed: (error: unknown) => void
}

const PING_MS = 20_000
const PENS_MS = 1_000

export const lookAfter = (
  watch: Watch,
): { stop: () => void; recheckAccount: (accountId: string) => void } => {
  // Pinged and not heard of since.
  const silent = new WeakSet<object>()
  const listening = new WeakSet<object>()
  const ping = setInterval(() => {
    for (const socket of watch.doorman.clients) {
      if (silent.has(socket)) {
        socket.terminate()
        continue
      }
      if (!listening.has(socket)) socket.on('pong', () => silent.delete(socket))
      listening.add(socket)
      silent.add(socket)
      socket.ping()
    }
  }, PING_MS)
  const pens = setInterval(() => {
    const now = Date.now()
    for (const document of watch.documents.live)
      if (document.pens.hasLapsed(now)) void watch.showPens(document.id)
  }, PENS_MS)
  const rights = setInterval(() => void recheck(watch), watch.recheckMs)
  for (const timer of [ping, pens, rights]) timer.unref()
  return {
    recheckAccount: (accountId) => void recheck(watch, accountId),
    stop: () => {
      for (const timer of [ping, pens, rights]) clearInterval(timer)
    },
  }
}

const recheck = async (
  { sockets, authorise, isInForce, failed }: Watch,
  accountId?: string,
): Promise<void> => {
  for (const socket of [...sockets]) {
    const { documentId, sessionId } = socket
    if (documentId === undefined || (accountId !== undefined && socket.accountId !== accountId)) continue
    try {
      const rights = await authorise(socket.accountId, documentId)
      if (rights === undefined) socket.close(closeCodes.notAllowed)
      else if (sessionId !== undefined && !(await isInForce({ accountId: socket.accountId, sessionId })))
        socket.close(closeCodes.notSignedIn)
      else if (rights.mayWrite !== socket.mayWrite) {
        socket.mayWrite = rights.mayWrite
        socket.send(jsonFrame(messages.rights, { mayWrite: rights.mayWrite }))
      }
    } catch (error) {
      failed(error)
    }
  }
}
