/** How often signing in may be tried and what is costly be asked for, counted for all processes together. */
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
    // One that cannot be taken back counts as a failed try, and no more: the answer is out already.
    decrement: (key) => inTransaction(scope, (tx) => uncountHit(tx, named(key))).catch(() => undefined),
    resetKey: (key) => inTransaction(scope, (tx) => forgetHits(tx, named(key))),
  }
}

interface Limit {
  limit: number
  keyGenerator: (request: Request) => string
  /** Only tries that fail count: a firm behind one address may sign in all at once. */
  onlyFailures: boolean
  refusal: string
}

const limitBy = (
  dataSource: Database,
  prefix: string,
  { limit, keyGenerator, onlyFailures, refusal }: Limit,
): RequestHandler =>
  rateLimit({
    windowMs: WINDOW_MS,
    limit,
    keyGenerator,
    store: storeFor(dataSource, prefix),
    skipSuccessfulRequests: onlyFailures,
    standardHeaders: 'draft-8',
    legacyHeaders: false,
    handler: (_request, _response, next) => next(new Refusal('too-many', refusal)),
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
  print: RequestHandler
  beginCalculation: RequestHandler
}

const tries = (limit: number, keyGenerator: Limit['keyGenerator']): Limit => ({
  limit,
  keyGenerator,
  onlyFailures: true,
  refusal: 'Too many tries. Wait a quarter of an hour, then try again.',
})

/** What costs the server much, whether it succeeds or not. */
const costly = (limit: number, what: string): Limit => ({
  limit,
  keyGenerator: bySignedIn,
  onlyFailures: false,
  refusal: `That were more than ${limit} ${what} in a quarter of an hour. Wait a while, then go on.`,
})

export const createRateLimits = (dataSource: Database): RateLimits => ({
  signIn: [
    limitBy(dataSource, 'sign-in:address', tries(50, byAddress)),
    limitBy(dataSource, 'sign-in:account', tries(10, byAccount)),
  ],
  links: limitBy(dataSource, 'links:address', tries(30, byAddress)),
  ownPassword: limitBy(dataSource, 'own-password', tries(10, bySignedIn)),
  setup: limitBy(dataSource, 'setup:address', tries(20, byAddress)),
  print: limitBy(dataSource, 'print', costly(100, 'prints')),
  beginCalculation: limitBy(dataSource, 'begin-calculation', costly(200, 'new calculations')),
})
