/** Puts the application together from its parts. Builds, does not listen: main.ts and the tests do that. */
import express from 'express'
import type { Express, RequestHandler } from 'express'
import type { Logger } from 'pino'
import { noSuchRoute, presentError } from './middleware/errors'
import { logRequests } from './middleware/logging'
import { checkOrigin } from './middleware/origin'
import { makeNonce, secureHeaders } from './middleware/security'
import { calculationRoutes } from './routes/calculations'
import { clientRoutes } from './routes/client'
import { healthRoutes } from './routes/health'
import { inTrayRoutes } from './routes/inTray'
import { pageRoutes } from './routes/pages'
import { participationRoutes } from './routes/participation'
import type { RouteParts } from './routes/parts'
import { peopleRoutes } from './routes/people'
import { projectRoutes } from './routes/projects'
import { revisionRoutes } from './routes/revisions'
import { sessionRoutes } from './routes/session'
import { setupRoutes } from './routes/setup'
import { templateRoutes } from './routes/templates'

export interface AppParts extends RouteParts {
  log: Logger
  /** Session, person, firm. */
  signedIn: RequestHandler[]
}

/** Sheets travel by the socket; what comes by a route is small. */
const BODY_LIMIT = '256kb'

export const createApp = (parts: AppParts): Express => {
  const app = express()
  app.disable('x-powered-by')
  app.set('trust proxy', parts.config.proxies)
  app.set('query parser', 'simple')
  app.use(logRequests(parts.log), makeNonce, secureHeaders(parts.config))
  app.use('/api', apiOf(parts))
  app.use(clientRoutes(parts.config))
  app.use(presentError)
  return app
}

const apiOf = (parts: AppParts) => {
  const api = express.Router()
  api.use((_request, response, next) => {
    response.set('Cache-Control', 'no-store')
    next()
  })
  // Before sessions are looked up, so that a broken session store does not hide why.
  api.use(healthRoutes(parts))
  api.use(checkOrigin(parts.config), express.json({ limit: BODY_LIMIT, strict: true }), ...parts.signedIn)
  api.use(sessionRoutes(parts), setupRoutes(parts))
  api.use(inTrayRoutes(), peopleRoutes(parts), projectRoutes())
  api.use(
    calculationRoutes(parts),
    participationRoutes(parts),
    revisionRoutes(),
    pageRoutes(parts),
    templateRoutes(parts),
  )
  api.use(noSuchRoute)
  return api
}
