/** How often signing in may be tried, from one address and for one account, counted for all processes. */
import { createHash } from 'node:crypto'
import type { Request, RequestHandler } from 'express'
import { ipKeyGenerator, rateLimit } from 'express-rate-limit'
import type { Store } from 'express-rate-limit'
import { countHit, forgetHits, uncountHit } from '@server/repositories/rateWindows'
import { inTransaction, systemScope } from '@server/repositories/transaction'
import type { Database } from '@server/repositories/transaction'
import { Refusal } from '@server/services/refusals'

const WINDOW_MS = 15 * 60_000

const storeFor = (dataSource: Database, prefix: string): Store => {
  const scope = systemScope(dataSource)
  const named = (key: string) => `${prefix}:${key}`
  return {
    localKeys: false,
    prefix,
    increment: async (key) => {
      const { hits, resetsAt } = await inTransaction(scope, (tx) => countHit(tx, named(key), WINDOW_MS))
      return { totalHits: hits, resetTime: resetsAt }
    },
    decrement: (key) => inTransaction(scope, (tx) => uncountHit(tx, named(key))),
    resetKey: (key) => inTransaction(scope, (tx) => forgetHits(tx, named(key))),
  }
}

const limitBy = (
  dataSource: Database,
  prefix: string,
  limit: number,
  keyGenerator: (request: Request) => string,
): RequestHandler =>
  rateLimit({
    windowMs: WINDOW_MS,
    limit,
    keyGenerator,
    store: storeFor(dataSource, prefix),
    // Only tries that fail count: a firm behind one address may sign in all at once.
    skipSuccessfulRequests: true,
    standardHeaders: 'draft-8',
    legacyHeaders: false,
    handler: (_request, _response, next) =>
      next(new Refusal('too-many', 'Too many tries. Wait a quarter of an hour, then try again.')),
  })

const byAddress = (request: Request): string => ipKeyGenerator(request.ip ?? 'unknown')

/** The digest, so that an address typed wrongly stands in no table. */
const byAccount = (request: Request): string => {
  const body: unknown = request.body
  const email = typeof body === 'object' && body !== null && 'email' in body ? String(body.email) : ''
  return createHash('sha256').update(email.trim().toLowerCase()).digest('hex').slice(0, 32)
}

const bySignedIn = (request: Request): string => request.identity?.account.id ?? byAddress(request)

export interface RateLimits {
  signIn: RequestHandler[]
  links: RequestHandler
  ownPassword: RequestHandler
  setup: RequestHandler
}

export const createRateLimits = (dataSource: Database): RateLimits => ({
  signIn: [
    limitBy(dataSource, 'sign-in:address', 50, byAddress),
    limitBy(dataSource, 'sign-in:account', 10, byAccount),
  ],
  links: limitBy(dataSource, 'links:address', 30, byAddress),
  ownPassword: limitBy(dataSource, 'own-password', 10, bySignedIn),
  setup: limitBy(dataSource, 'setup:address', 20, byAddress),
})
