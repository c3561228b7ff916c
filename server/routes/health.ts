import { Router } from 'express'
import type { Health } from '@shared/api/health'
import { checkHealth } from '@server/services/checkHealth'
import type { RouteParts } from './parts'

export const healthRoutes = ({ config, dataSource }: RouteParts): Router => {
  const router = Router()
  router.get('/health', async (_request, response) => {
    const health: Health = { status: 'ok', version: config.version, schema: await checkHealth(dataSource) }
    response.json(health)
  })
  return router
}
