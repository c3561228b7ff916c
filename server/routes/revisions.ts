import { Router } from 'express'
import { historyQuery } from '@shared/api/revisions'
import { idOf, input, scopeOf } from '@server/middleware/request'
import { presentHistory, presentRevision } from '@server/presenters/revisions'
import { readHistory } from '@server/services/revisions/readHistory'
import { readRevision } from '@server/services/revisions/readRevision'

export const revisionRoutes = (): Router => {
  const router = Router()

  router.get('/revisions/:id', async (request, response) => {
    const scope = scopeOf(request)
    response.json(presentRevision(await readRevision(scope, idOf(request, 'id', 'revision'))))
  })

  router.get('/revisions/:id/history', async (request, response) => {
    const scope = scopeOf(request)
    const id = idOf(request, 'id', 'revision')
    const { subject } = input(historyQuery, request.query)
    response.json(presentHistory(await readHistory(scope, id, subject)))
  })

  return router
}
