/** What every file of routes is handed; nothing is reached for from the side. */
import type { RequestHandler } from 'express'
import type { DataSource } from 'typeorm'
import type { Config } from '@server/config'
import type { RateLimits } from '@server/middleware/rateLimits'
import type { TemplateLibrary } from '@server/services/templates/library'
import type { Sockets } from '@server/sockets'

export interface RouteParts {
  config: Config
  dataSource: DataSource
  limits: RateLimits
  checkPassword: RequestHandler
  sockets: Sockets
  templates: TemplateLibrary
  /** Lets somebody make the first firm. */
  setupToken: string
}
