/** Whether a request that changes something, or opens a socket, comes from a page of ours. */
import type { IncomingMessage } from 'node:http'
import type { RequestHandler } from 'express'
import { isLoopbackHost } from '@server/config'
import type { Config } from '@server/config'
import { Refusal } from '@server/services/refusals'

/**
 * With origins set, exactly those. Without, only pages that this machine shows to itself: a loopback name
 * and the very port on which the request came in. What other sites send is refused, and so is what says
 * nothing of where it comes from.
 */
export const isOriginAllowed = (
  config: Pick<Config, 'origins'>,
  origin: string | undefined,
  request: IncomingMessage,
): boolean => {
  if (origin === undefined) return false
  if (config.origins.length > 0) return config.origins.includes(origin)
  if (!URL.canParse(origin)) return false
  const { protocol, hostname, port } = new URL(origin)
  return protocol === 'http:' && isLoopbackHost(hostname) && Number(port || 80) === request.socket.localPort
}

const safeMethods = new Set(['GET', 'HEAD', 'OPTIONS'])

export const checkOrigin =
  (config: Pick<Config, 'origins'>): RequestHandler =>
  (request, _response, next) => {
    if (safeMethods.has(request.method) || isOriginAllowed(config, request.headers.origin, request))
      return next()
    next(
      new Refusal(
        'wrong-origin',
        'This request did not come from a page of this program, and was not carried out.',
      ),
    )
  }
