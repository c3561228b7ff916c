import { Router } from 'express'
import {
  calculationFilter,
  changeTitleBlock as titleBlockSchema,
  newCalculation,
} from '@shared/api/calculations'
import type { CalculationList } from '@shared/api/calculations'
import { idOf, input, scopeOf } from '@server/middleware/request'
import { presentCalculation, presentSummary } from '@server/presenters/calculations'
import { changeTitleBlock } from '@server/services/calculations/changeTitleBlock'
import { createCalculation } from '@server/services/calculations/createCalculation'
import { listCalculations } from '@server/services/calculations/listCalculations'
import { readCalculation } from '@server/services/calculations/readCalculation'
import type { RouteParts } from './parts'

export const calculationRoutes = ({ templates, limits }: RouteParts): Router => {
  const router = Router()

  router.get('/calculations', async (request, response) => {
    const scope = scopeOf(request)
    const listed = await listCalculations(scope, input(calculationFilter, request.query))
    const list: CalculationList = { calculations: listed.map((one) => presentSummary(one, scope.accountId)) }
    response.json(list)
  })

  router.post('/calculations', limits.beginCalculation, async (request, response) => {
    const scope = scopeOf(request)
    const created = await createCalculation(scope, templates, input(newCalculation, request.body))
    response.status(201).json(presentCalculation(created, scope.accountId))
  })

  router.get('/calculations/:id', async (request, response) => {
    const scope = scopeOf(request)
    const whole = await readCalculation(scope, idOf(request, 'id', 'calculation'))
    response.json(presentCalculation(whole, scope.accountId))
  })

  router.patch('/calculations/:id', async (request, response) => {
    const scope = scopeOf(request)
    const id = idOf(request, 'id', 'calculation')
    const whole = await changeTitleBlock(scope, id, input(titleBlockSchema, request.body))
    response.json(presentCalculation(whole, scope.accountId))
  })

  return router
}
