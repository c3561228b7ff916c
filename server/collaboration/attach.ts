/**
 * The door of live collaboration: takes the HTTP server's upgrades on /collaboration/<document>, finds
 * out who asks and what they may do before anything is read, and keeps watch afterwards.
 */
import type { IncomingMessage, Server } from 'node:http'
import type { Duplex } from 'node:stream'
import { WebSocketServer, type WebSocket } from 'ws'
import {
  closeCodes,
  closeReasons,
  documentOfPath,
  handshakeSchema,
  initialsOf,
  limits,
  penColourOf,
  speaksWith,
} from '@shared/protocol'
import { inTransaction, systemScope, type SystemScope } from '@server/repositories/transaction'
import { Documents } from './documents'
import { FanOut } from './fanOut'
import { lookAfter } from './lookAfter'
import type { Authorise, IsInForce, Visitor } from './rights'
import { SheetSocket } from './sheetSocket'
import { DocumentGone } from './storedDocument'

export interface CollaborationOptions {
  dataSource: SystemScope['dataSource']
  /** Who asks, by the session of the request; undefined where nobody is signed in. */
  authenticate: (request: IncomingMessage) => Promise<Visitor | undefined>
  authorise: Authorise
  /** Asked again with the rights, so that a socket does not outlive its session. */
  isInForce?: IsInForce
  /** Whether a page of this origin may open a socket; an absent Origin is no browser. */
  isOriginAllowed: (origin: string | undefined, request: IncomingMessage) => boolean
  failed?: (error: unknown) => void
  /** How long a document stays in memory after the last one has left. */
  lingerMs?: number
  /** How often rights are asked again. */
  recheckMs?: number
  /** How often the listening connection is tried and heads are read again. */
  heartbeatMs?: number
}

export interface Collaboration {
  /** Flushes, acknowledges, then closes everything; upgrades are refused from the call on. */
  close(): Promise<void>
  /** Closes the sockets of a document, here and (by its row) in other processes. */
  closeDocument(documentId: string, code: number, reason?: string): void
  /** Asks session and rights of an account's sockets again at once: signed out, a part given or taken, a role changed. */
  rightsChanged(accountId: string): void
}

export const attachCollaboration = async (
  server: Server,
  options: CollaborationOptions,
): Promise<Collaboration> => {
  const failed = options.failed ?? (() => undefined)
  const sockets = new Set<SheetSocket>()
  let isClosed = false
  const fanOut = new FanOut({
    url: databaseUrl(options.dataSource),
    notify: (channel, payload) =>
      inTransaction(systemScope(options.dataSource), async ({ manager }) => {
        await manager.query('SELECT pg_notify($1, $2)', [channel, payload])
      }),
    headRaised: (id, head) => {
      const document = documents.find(id)
      if (document !== undefined && (head === 0 || head > document.head)) document.lookAgain()
    },
    pensChanged: (id) => void showPensOf(id),
    somethingMissed: () => {
      for (const document of documents.live) document.lookAgain()
    },
    failed,
    ...(options.heartbeatMs === undefined ? {} : { heartbeatMs: options.heartbeatMs }),
  })
  const documents = new Documents(
    {
      headRaised: (id, head) => fanOut.headRaised(id, head),
      pensChanged: (id) => fanOut.pensChanged(id),
      failed,
    },
    options.lingerMs ?? 30_000,
  )

  const showPensOf = async (id: string): Promise<void> => {
    const document = documents.find(id)
    try {
      if (document !== undefined && (await document.pens.refresh()) && !document.isEnded) document.showPens()
    } catch (error) {
      failed(error)
    }
  }

  const doorman = new WebSocketServer({ noServer: true, maxPayload: limits.frameBytes, clientTracking: true })

  const upgrade = (request: IncomingMessage, stream: Duplex, head: Buffer): void => {
    stream.on('error', failed)
    const address = addressOf(request)
    const id = address && documentOfPath(address.pathname)
    // Nobody else answers upgrades: one that is left without an answer would stay open for ever.
    if (address === undefined || id === undefined)
      return void stream.end('HTTP/1.1 404 Not Found\r\nConnection: close\r\n\r\n')
    if (isClosed) return void stream.end('HTTP/1.1 503 Service Unavailable\r\nConnection: close\r\n\r\n')
    if (!options.isOriginAllowed(request.headers.origin, request))
      return void stream.end('HTTP/1.1 403 Forbidden\r\nConnection: close\r\n\r\n')
    // A browser cannot see a 401: the socket is accepted, then closed with a reason.
    doorman.handleUpgrade(request, stream, head, (socket) => {
      stream.off('error', failed)
      socket.on('error', () => socket.terminate())
      receive(socket, request, id, address.searchParams).catch((error: unknown) => {
        failed(error)
        socket.close(closeCodes.tryAgain, 'The sheet could not be loaded.')
      })
    })
  }

  const receive = async (
    socket: WebSocket,
    request: IncomingMessage,
    id: string,
    parameters: URLSearchParams,
  ): Promise<void> => {
    const refuse = (code: number) => socket.close(code, closeReasons[code])
    const early = holdFrames(socket)
    const handshake = handshakeSchema.safeParse(Object.fromEntries(parameters))
    if (!handshake.success) return refuse(closeCodes.unreadable)
    const visitor = await options.authenticate(request)
    if (visitor === undefined) return refuse(closeCodes.notSignedIn)
    const rights = await options.authorise(visitor.accountId, id)
    if (rights === undefined) return refuse(closeCodes.notAllowed)
    let document
    try {
      document = await documents.open(rights.scope, id)
    } catch (error) {
      if (error instanceof DocumentGone) return refuse(closeCodes.notFound)
      throw error
    }
    if (!speaksWith(handshake.data, document.format)) return refuse(closeCodes.reload)
    if (document.isEnded || isClosed) return refuse(closeCodes.tryAgain)
    if (socket.readyState !== socket.OPEN) return documents.left(document)
    // Counted last, with nothing awaited before it is in: many that come at once are counted, too.
    const own = [...sockets].filter((one) => one.accountId === visitor.accountId && one.documentId === id)
    if (own.length >= limits.socketsPerAccount) return refuse(closeCodes.tooMany)
    const entered = document
    const member = new SheetSocket({
      socket,
      accountId: visitor.accountId,
      sessionId: visitor.sessionId,
      clientId: handshake.data.client,
      person: {
        account: visitor.accountId,
        name: visitor.name,
        initials: initialsOf(visitor.name),
        pen: penColourOf(visitor.accountId),
      },
      mayWrite: rights.mayWrite,
      pensChanged: (changed) => fanOut.pensChanged(changed),
      failed,
    })
    sockets.add(member)
    socket.on('close', () => {
      sockets.delete(member)
      member.leave()
      documents.left(entered)
    })
    member.enter(entered, early())
  }

  server.on('upgrade', upgrade)
  const watch = lookAfter({
    doorman,
    sockets,
    documents,
    authorise: options.authorise,
    isInForce: options.isInForce ?? (() => Promise.resolve(true)),
    showPens: showPensOf,
    recheckMs: options.recheckMs ?? 30_000,
    failed,
  })
  await fanOut.start()

  return {
    close: async () => {
      isClosed = true
      server.off('upgrade', upgrade)
      watch.stop()
      await documents.close()
      await fanOut.close()
      for (const socket of doorman.clients) socket.close(closeCodes.restarting)
      await new Promise((resolve) => setTimeout(resolve, doorman.clients.size > 0 ? 50 : 0))
      for (const socket of doorman.clients) socket.terminate()
      doorman.close()
    },
    closeDocument: (id, code, reason) => {
      documents.find(id)?.end(code, reason)
      // Head 0 stands for: look at the row, whatever its head.
      fanOut.headRaised(id, 0)
    },
    rightsChanged: (accountId) => watch.recheckAccount(accountId),
  }
}

/** Undefined where what was asked for is no address, as `//`: whoever knocks may send anything. */
const addressOf = ({ url = '/' }: IncomingMessage): URL | undefined =>
  URL.canParse(url, 'http://localhost') ? new URL(url, 'http://localhost') : undefined

/** Keeps what comes in before the document is there; the return value hands it over and stops keeping. */
const holdFrames = (socket: WebSocket): (() => [message: WebSocket.RawData, isBinary: boolean][]) => {
  const held: [WebSocket.RawData, boolean][] = []
  let bytes = 0
  const hold = (message: WebSocket.RawData, isBinary: boolean) => {
    bytes += message instanceof Buffer ? message.length : limits.frameBytes
    if (bytes > limits.frameBytes || held.length > limits.framesAtOnce) socket.close(closeCodes.tooMany)
    else held.push([message, isBinary])
  }
  socket.on('message', hold)
  return () => {
    socket.off('message', hold)
    return held
  }
}

const databaseUrl = (dataSource: SystemScope['dataSource']): string => {
  const { options } = dataSource
  if (options.type !== 'postgres' || options.url === undefined)
    throw new Error('Collaboration needs a data source with the address of a PostgreSQL database.')
  return options.url
}
