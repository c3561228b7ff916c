/** What our middleware puts on a request, and how a route takes it. */
import type { Request } from 'express'
import type { z } from 'zod'
import type { FirmScope } from '@server/repositories/transaction'
import { Refusal, notFound } from '@server/services/refusals'
import type { Identity } from '@server/services/session/identity'

declare module 'express-session' {
  interface SessionData {
    /** The firm chosen, where the person has several. */
    firmId?: string
    /** When the person signed in, ms: a session ends a week later however much it is used. */
    startedAt?: number
    passport?: { user?: string }
  }
}

declare module 'express-serve-static-core' {
  interface Request {
    /** Who is signed in, as read for this request. */
    identity?: Identity
    /** The firm in which the request works. */
    scope?: FirmScope
  }
}

/** @throws {Refusal} when nobody is signed in */
export const identityOf = (request: Request): Identity => {
  if (request.identity === undefined)
    throw new Refusal('not-signed-in', 'You are not signed in, or no longer. Sign in.')
  return request.identity
}

/** @throws {Refusal} when nobody is signed in, or of several firms none is chosen */
export const scopeOf = (request: Request): FirmScope => {
  identityOf(request)
  if (request.scope === undefined) throw new Refusal('no-firm', 'Choose the firm that you want to work in.')
  return request.scope
}

/** @throws {Refusal} bad-input, saying which fields are wrong */
export const input = <T extends z.ZodType>(schema: T, value: unknown): z.output<T> => {
  const result = schema.safeParse(value ?? {})
  if (result.success) return result.data
  const fields = result.error.issues.slice(0, 20).map((issue) => ({
    path: issue.path.join('.'),
    message: issue.message,
  }))
  throw new Refusal('bad-input', fields[0]?.message ?? 'The request cannot be read.', fields)
}

const uuid = /^[0-9a-f]{8}-[0-9a-f]{4}-[0-9a-f]{4}-[0-9a-f]{4}-[0-9a-f]{12}$/i

/** An identifier in the address. @throws {Refusal} not-found for what cannot be one */
export const idOf = (request: Request, name: string, what: string): string => {
  const value = request.params[name]
  if (typeof value !== 'string' || !uuid.test(value)) throw notFound(what)
  return value.toLowerCase()
}
