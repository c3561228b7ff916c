import { Router } from 'express'
import { pagesQuery } from '@shared/api/pages'
import { idOf, input, scopeOf } from '@server/middleware/request'
import { printPages } from '@server/services/revisions/printPages'
import type { RouteParts } from './parts'

export const pageRoutes = ({ config, limits }: RouteParts): Router => {
  const router = Router()

  router.get('/revisions/:id/pages.pdf', limits.print, async (request, response) => {
    const scope = scopeOf(request)
    const id = idOf(request, 'id', 'revision')
    const wanted = input(pagesQuery, request.query)
    const printed = await printPages(scope, id, { ...wanted, at: new Date(), version: config.version })
    request.log.info(
      {
        pages: printed.pages,
        composeMs: printed.composeMs,
        setMs: printed.setMs,
        archival: printed.archival,
      },
      'printed',
    )
    response
      .type('application/pdf')
      .set('Content-Disposition', `inline; filename="${printed.fileName}"`)
      .send(Buffer.from(printed.pdf))
  })

  return router
}
