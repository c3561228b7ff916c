/** What every file of routes is handed; nothing is reached for from the side. */
import type { RequestHandler } from 'express'
import type { Config } from '@server/config'
import type { RateLimits } from '@server/middleware/rateLimits'
import type { TemplateLibrary } from '@server/services/templates/library'
import type { Sockets } from '@server/sockets'
import type { Database } from '@server/repositories/transaction'

export interface RouteParts {
  config: Config
  dataSource: Database
  limits: RateLimits
  checkPassword: RequestHandler
  sockets: Sockets
  templates: TemplateLibrary
  /** Lets somebody make the first firm. */
  setupToken: string
}
