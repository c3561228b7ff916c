/** What a browser may load and do on our pages. Nothing comes from another place. */
import { randomBytes } from 'node:crypto'
import type { RequestHandler } from 'express'
import helmet from 'helmet'
import type { Config } from '@server/config'

/** A nonce for the style elements of this one answer, in `response.locals`. */
export const makeNonce: RequestHandler = (_request, response, next) => {
  response.locals['nonce'] = randomBytes(18).toString('base64')
  next()
}

export const secureHeaders = (config: Pick<Config, 'origins'>): RequestHandler => {
  const hasTls = config.origins.length > 0 && config.origins.every((origin) => origin.startsWith('https://'))
  return helmet({
    contentSecurityPolicy: {
      useDefaults: false,
      directives: {
        defaultSrc: ["'self'"],
        scriptSrc: ["'self'"],
        scriptSrcAttr: ["'none'"],
        workerSrc: ["'self'"],
        styleSrc: ["'self'", (_request, response) => `'nonce-${nonceOf(response)}'`],
        // The mathematics on the page is set with style attributes.
        styleSrcAttr: ["'unsafe-inline'"],
        imgSrc: ["'self'", 'data:', 'blob:'],
        fontSrc: ["'self'", 'data:'],
        connectSrc: ["'self'"],
        objectSrc: ["'none'"],
        baseUri: ["'none'"],
        formAction: ["'self'"],
        frameAncestors: ["'none'"],
        // Without TLS a browser that upgrades requests would find nothing.
        ...(hasTls ? { upgradeInsecureRequests: [] } : {}),
      },
    },
    strictTransportSecurity: hasTls ? { maxAge: 31_536_000, includeSubDomains: false } : false,
    crossOriginEmbedderPolicy: false,
    referrerPolicy: { policy: 'no-referrer' },
  })
}

const nonceOf = (response: object): string => {
  const locals = 'locals' in response ? response.locals : undefined
  return typeof locals === 'object' && locals !== null && 'nonce' in locals ? String(locals.nonce) : ''
}
