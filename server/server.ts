/**
 * A whole server: data source, sessions, routes and live collaboration, ready to listen. One process may
 * hold several, as tests do.
 */
import { randomBytes } from 'node:crypto'
import { createServer } from 'node:http'
import type { Server } from 'node:http'
import { Pool } from 'pg'
import type { Logger } from 'pino'
import { createApp } from './app'
import { attachCollaboration } from './collaboration/attach'
import type { Config } from './config'
import { createDataSource } from './data-source'
import { isOriginAllowed } from './middleware/origin'
import { createRateLimits } from './middleware/rateLimits'
import { createSessions } from './middleware/session'
import { authenticateUpgrade } from './middleware/upgradeSession'
import { authoriseDocument } from './services/revisions/authoriseDocument'
import { isSessionInForce } from './services/session/sessionInForce'
import { loadTemplates } from './services/templates/library'
import { readTemplate } from './services/templates/readTemplate'
import { noSockets } from './sockets'
import type { Sockets } from './sockets'
import type { Database } from './repositories/transaction'

export interface ServerOptions {
  config: Config
  sessionSecret: string
  log: Logger
}

export interface TorfolioServer {
  http: Server
  dataSource: Database
  setupToken: string
  /** Refuses what is new, lets what runs come to its end, stores what is on its way, then lets go of everything. */
  close(): Promise<void>
}

/** @throws whatever the database says when it cannot be reached */
export const createTorfolioServer = async ({
  config,
  sessionSecret,
  log,
}: ServerOptions): Promise<TorfolioServer> => {
  const failed = (error: unknown) => log.error({ err: error }, 'in the background')
  const dataSource = createDataSource(config.databaseUrl, { onPoolError: failed })
  await dataSource.initialize()
  const pool = new Pool({
    connectionString: config.databaseUrl,
    max: 4,
    application_name: 'torfolio sessions',
  })
  pool.on('error', failed)
  const sessions = createSessions({ dataSource, pool, secret: sessionSecret, failed })
  const setupToken = config.setupToken ?? randomBytes(12).toString('base64url')
  const late: { sockets: Sockets } = { sockets: noSockets }
  const app = createApp({
    config,
    dataSource,
    log,
    limits: createRateLimits(dataSource),
    checkPassword: sessions.checkPassword,
    signedIn: sessions.handlers,
    // The live side needs the HTTP server, which needs the routes, which speak to the live side.
    sockets: { rightsChanged: (accountId) => late.sockets.rightsChanged(accountId) },
    templates: await loadTemplates(config.templatesFolder, readTemplate, failed),
    setupToken,
  })
  const http = createServer(app)
  const collaboration = await attachCollaboration(http, {
    dataSource,
    authenticate: authenticateUpgrade(sessions.handlers),
    authorise: (accountId, documentId) => authoriseDocument(dataSource, accountId, documentId),
    isInForce: (session) => isSessionInForce(dataSource, session),
    isOriginAllowed: (origin, request) => isOriginAllowed(config, origin, request),
    failed,
  })
  late.sockets = collaboration
  return {
    http,
    dataSource,
    setupToken,
    close: async () => {
      const stopped = new Promise<void>((resolve) => http.close(() => resolve()))
      await collaboration.close()
      http.closeIdleConnections()
      const patience = setTimeout(() => http.closeAllConnections(), 5_000)
      await stopped
      clearTimeout(patience)
      sessions.close()
      await pool.end()
      await dataSource.destroy()
    },
  }
}
