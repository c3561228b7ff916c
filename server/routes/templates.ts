import { Router } from 'express'
import type { TemplateList } from '@shared/api/templates'
import { scopeOf } from '@server/middleware/request'
import { presentTemplate, presentTemplateSummary } from '@server/presenters/templates'
import { authoriseInFirm } from '@server/services/authorise'
import { notFound } from '@server/services/refusals'
import type { RouteParts } from './parts'

export const templateRoutes = ({ templates }: RouteParts): Router => {
  const router = Router()

  router.get('/templates', (request, response) => {
    authoriseInFirm(scopeOf(request), 'see-templates')
    const list: TemplateList = { templates: templates.all.map(presentTemplateSummary) }
    response.json(list)
  })

  router.get('/templates/:name', (request, response) => {
    authoriseInFirm(scopeOf(request), 'see-templates')
    const template = templates.find(request.params.name)
    if (template === undefined) throw notFound('template')
    response.json(presentTemplate(template))
  })

  return router
}
