import { timingSafeEqual } from 'node:crypto'
import { Router } from 'express'
import { firstFirm } from '@shared/api/setup'
import { beginSession } from '@server/middleware/session'
import { input } from '@server/middleware/request'
import { notAllowed } from '@server/services/refusals'
import { readIdentity } from '@server/services/session/identity'
import { setUpFirstFirm } from '@server/services/setUpFirstFirm'
import type { RouteParts } from './parts'
import { meOf } from './session'

export const setupRoutes = (parts: RouteParts): Router => {
  const { dataSource, limits, setupToken } = parts
  const router = Router()
  router.post('/setup', limits.setup, async (request, response) => {
    const { token, firm, person } = input(firstFirm, request.body)
    if (!isSame(token, setupToken))
      throw notAllowed(
        'This is not the word that the server printed when it started. Look there and try again.',
      )
    const accountId = await setUpFirstFirm(dataSource, { firm, person })
    const identity = await readIdentity(dataSource, accountId)
    if (identity === null) throw new Error('The first administrator could not be read back.')
    await beginSession(request, identity)
    response.status(201).json(await meOf(parts, identity, undefined))
  })
  return router
}

/** Takes as long wherever the two differ. */
const isSame = (given: string, wanted: string): boolean => {
  const [one, other] = [Buffer.from(given), Buffer.from(wanted)]
  return one.length === other.length && timingSafeEqual(one, other)
}
