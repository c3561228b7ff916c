/** What a service will not do, in the words that reach the person. Anything else that is thrown is our fault. */
import type { ErrorCode } from '@shared/api/problems'

export interface FieldMessage {
  path: string
  message: string
}

const statusOf: Record<ErrorCode, number> = {
  'bad-input': 400,
  'not-signed-in': 401,
  'sign-in-refused': 401,
  'not-allowed': 403,
  'no-firm': 403,
  'wrong-origin': 403,
  'not-found': 404,
  conflict: 409,
  'link-expired': 410,
  'too-large': 413,
  unusable: 422,
  'too-many': 429,
  internal: 500,
  unavailable: 503,
}

export class Refusal extends Error {
  readonly status: number
  constructor(
    readonly code: ErrorCode,
    message: string,
    readonly fields?: FieldMessage[],
  ) {
    super(message)
    this.status = statusOf[code]
  }
}

/** The same answer whether it never was or is another firm's. */
export const notFound = (what: string): Refusal =>
  new Refusal(
    'not-found',
    `There is no such ${what}. It may have been in another firm, or its address is wrong.`,
  )

export const notAllowed = (reason: string): Refusal => new Refusal('not-allowed', reason)
export const conflict = (reason: string): Refusal => new Refusal('conflict', reason)
export const unusable = (reason: string, fields?: FieldMessage[]): Refusal =>
  new Refusal('unusable', reason, fields)

/** True for PostgreSQL's *unique violation*, of the named constraint where one is named. */
export const isTaken = (error: unknown, constraint?: string): boolean => {
  if (typeof error !== 'object' || error === null) return false
  const cause = 'driverError' in error ? error.driverError : error
  if (typeof cause !== 'object' || cause === null || !('code' in cause) || cause.code !== '23505')
    return false
  return constraint === undefined || ('constraint' in cause && cause.constraint === constraint)
}
