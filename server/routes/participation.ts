import { Router } from 'express'
import { appoint as appointSchema, handOver as handOverSchema } from '@shared/api/participation'
import type { ParticipationList } from '@shared/api/participation'
import { idOf, input, scopeOf } from '@server/middleware/request'
import { presentParticipations } from '@server/presenters/calculations'
import { appoint } from '@server/services/participation/appoint'
import type { CurrentParticipations } from '@server/services/calculations/readCalculation'
import { endParticipation } from '@server/services/participation/endParticipation'
import { handOver } from '@server/services/participation/handOver'
import type { RouteParts } from './parts'

const present = ({ participations, accounts }: CurrentParticipations): ParticipationList => ({
  participations: presentParticipations(participations, accounts),
})

/** A part that is given or taken has its effect on open sheets at once. */
export const participationRoutes = ({ sockets }: RouteParts): Router => {
  const router = Router()

  router.post('/calculations/:id/participations', async (request, response) => {
    const scope = scopeOf(request)
    const wanted = input(appointSchema, request.body)
    const current = await appoint(scope, idOf(request, 'id', 'calculation'), wanted)
    sockets.rightsChanged(wanted.accountId)
    response.status(201).json(present(current))
  })

  router.post('/calculations/:id/participations/:participation/hand-over', async (request, response) => {
    const scope = scopeOf(request)
    const id = idOf(request, 'id', 'calculation')
    const wanted = input(handOverSchema, request.body)
    const current = await handOver(scope, id, idOf(request, 'participation', 'part'), wanted)
    sockets.rightsChanged(current.from)
    sockets.rightsChanged(wanted.accountId)
    response.json(present(current))
  })

  router.delete('/calculations/:id/participations/:participation', async (request, response) => {
    const scope = scopeOf(request)
    const id = idOf(request, 'id', 'calculation')
    const current = await endParticipation(scope, id, idOf(request, 'participation', 'part'))
    sockets.rightsChanged(current.from)
    response.json(present(current))
  })

  return router
}
