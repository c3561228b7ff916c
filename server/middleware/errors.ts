/** Where every error of a route ends: one shape for the client, the whole story for the log, one reference for both. */
import type { ErrorRequestHandler, RequestHandler } from 'express'
import type { ErrorBody } from '@shared/api/problems'
import { Refusal } from '@server/services/refusals'

export const noSuchRoute: RequestHandler = (_request, _response, next) => {
  next(new Refusal('not-found', 'There is nothing at this address.'))
}

const codeOf = (error: object): string => {
  const cause = 'driverError' in error && typeof error.driverError === 'object' ? error.driverError : error
  return cause !== null && 'code' in cause && typeof cause.code === 'string' ? cause.code : ''
}

const connectionLost = /^(ECONN|EPIPE|ETIMEDOUT|ENOTFOUND|08|57P0|53300)/

/** What express and PostgreSQL throw, as refusals where the person can do something about it. */
const understood = (error: unknown): Refusal | undefined => {
  if (error instanceof Refusal) return error
  if (typeof error !== 'object' || error === null) return undefined
  if ('type' in error && error.type === 'entity.too.large')
    return new Refusal('too-large', 'This is more than the server takes at once.')
  if ('type' in error && error.type === 'entity.parse.failed')
    return new Refusal('bad-input', 'The request is not readable JSON.')
  if ('status' in error && error.status === 404)
    return new Refusal('not-found', 'There is nothing at this address.')
  // Other refusals of express itself: an address that cannot be decoded, an unknown encoding.
  if ('status' in error && typeof error.status === 'number' && error.status >= 400 && error.status < 500)
    return new Refusal('bad-input', 'The request cannot be read.')
  if (
    connectionLost.test(codeOf(error)) ||
    (error instanceof Error &&
      /timeout exceeded when trying to connect|Connection terminated/.test(error.message))
  )
    return new Refusal(
      'unavailable',
      'The database does not answer at the moment. Try again in a minute; what was stored is safe.',
    )
  return undefined
}

export const presentError: ErrorRequestHandler = (error: unknown, request, response, next) => {
  if (response.headersSent) return next(error)
  const refusal =
    understood(error) ??
    new Refusal(
      'internal',
      'Something went wrong in the program itself. Nothing was changed; try again, and if it stays, tell us the reference.',
    )
  if (refusal.status >= 500) request.log.error({ err: error }, 'request failed')
  const body: ErrorBody = {
    error: {
      code: refusal.code,
      message: refusal.message,
      reference: String(request.id),
      ...(refusal.fields ? { fields: refusal.fields } : {}),
    },
  }
  response.status(refusal.status).json(body)
}
