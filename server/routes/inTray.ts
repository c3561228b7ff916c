import { Router } from 'express'
import { scopeOf } from '@server/middleware/request'
import { presentInTray } from '@server/presenters/inTray'
import { readInTray } from '@server/services/readInTray'

export const inTrayRoutes = (): Router => {
  const router = Router()
  router.get('/in-tray', async (request, response) => {
    response.json(presentInTray(await readInTray(scopeOf(request))))
  })
  return router
}
