import { Router } from 'express'
import type { Request } from 'express'
import {
  changePassword as changePasswordSchema,
  chooseFirm,
  demoSignIn,
  linkLookUp,
  setPassword,
  signIn,
} from '@shared/api/session'
import type { Link, Me, SessionStatus } from '@shared/api/session'
import { isLoopbackHost } from '@server/config'
import { SESSION_COOKIE, beginSession, endSession } from '@server/middleware/session'
import { identityOf, input } from '@server/middleware/request'
import { presentDemoPeople, presentMe } from '@server/presenters/session'
import { changePassword } from '@server/services/session/changePassword'
import { isDemoAccount, listDemoPeople } from '@server/services/session/demoPeople'
import { currentScope, readIdentity } from '@server/services/session/identity'
import type { Identity } from '@server/services/session/identity'
import { lookUpLink, setPasswordByLink } from '@server/services/session/links'
import { readOwnParts } from '@server/services/session/readOwnParts'
import { notAllowed, notFound } from '@server/services/refusals'
import { needsSetup } from '@server/services/setUpFirstFirm'
import type { RouteParts } from './parts'

/** Who the person is, and in which firm. */
export const meOf = async (
  { dataSource }: Pick<RouteParts, 'dataSource'>,
  identity: Identity,
  chosenFirmId: string | undefined,
): Promise<Me> => {
  const scope = currentScope(dataSource, identity, chosenFirmId)
  return presentMe(identity, scope?.firmId ?? null, scope ? await readOwnParts(scope) : [])
}

export const sessionRoutes = (parts: RouteParts): Router => {
  const { config, dataSource, limits, checkPassword, sockets } = parts
  const router = Router()
  const demoFor = (request: Request): boolean =>
    config.demo && isLoopbackHost(config.host) && isOwnMachine(request)

  router.get('/session', async (request, response) => {
    const { identity: user } = request
    const status: SessionStatus = {
      me: user ? await meOf(parts, user, request.session.firmId) : null,
      demo: demoFor(request),
      needsSetup: user ? false : await needsSetup(dataSource),
    }
    response.json(status)
  })

  router.post(
    '/session',
    (request, _response, next) => {
      request.body = input(signIn, request.body)
      next()
    },
    ...limits.signIn,
    checkPassword,
    async (request, response) => {
      const user = identityOf(request)
      await beginSession(request, user)
      response.json(await meOf(parts, user, undefined))
    },
  )

  router.delete('/session', async (request, response) => {
    const { identity: user } = request
    await endSession(request)
    if (user) sockets.rightsChanged(user.account.id)
    response.clearCookie(SESSION_COOKIE).status(204).end()
  })

  router.put('/session/firm', async (request, response) => {
    const user = identityOf(request)
    const { firmId } = input(chooseFirm, request.body)
    if (!user.memberships.some(({ firm }) => firm.id === firmId)) throw notFound('firm')
    request.session.firmId = firmId
    response.json(await meOf(parts, user, firmId))
  })

  router.put('/session/password', limits.ownPassword, async (request, response) => {
    const user = identityOf(request)
    const passwords = input(changePasswordSchema, request.body)
    await changePassword(dataSource, user.account.id, passwords, request.sessionID)
    sockets.rightsChanged(user.account.id)
    response.status(204).end()
  })

  router.get('/demo/people', async (request, response) => {
    if (!demoFor(request)) throw notFound('page')
    response.json(presentDemoPeople(await listDemoPeople(dataSource)))
  })

  router.post('/demo/session', async (request, response) => {
    if (!demoFor(request)) throw notFound('page')
    const { accountId } = input(demoSignIn, request.body)
    if (!(await isDemoAccount(dataSource, accountId)))
      throw notAllowed('Only the people of the demo can be taken up.')
    const identity = await readIdentity(dataSource, accountId)
    if (identity === null) throw notFound('person')
    await beginSession(request, identity)
    response.json(await meOf(parts, identity, undefined))
  })

  router.post('/links/look-up', limits.links, async (request, response) => {
    const { token } = input(linkLookUp, request.body)
    const { expiresAt, ...found } = await lookUpLink(dataSource, token)
    const link: Link = { ...found, expiresAt: expiresAt.toISOString() }
    response.json(link)
  })

  router.post('/links/password', limits.links, async (request, response) => {
    const { token, password } = input(setPassword, request.body)
    await setPasswordByLink(dataSource, token, password)
    response.status(204).end()
  })

  return router
}

const isOwnMachine = (request: Request): boolean =>
  /^(::ffff:)?127\.|^::1$/.test(request.socket.remoteAddress ?? '') &&
  request.headers['x-forwarded-for'] === undefined
