/** The log: what was asked and how it ended, one line of JSON each; no body, no header, no query, no secret. */
import { randomBytes } from 'node:crypto'
import type { RequestHandler } from 'express'
import { pino } from 'pino'
import type { DestinationStream, Logger } from 'pino'
import { pinoHttp } from 'pino-http'
import type { Config } from '@server/config'

interface LoggedError {
  type: string
  message: string
  code?: string
  stack?: string
  cause?: LoggedError
}

/** Only these of an error: that of a query carries its parameters, and among them may be anything. */
const plainError = (error: unknown): LoggedError => {
  if (!(error instanceof Error)) return { type: typeof error, message: 'not an error' }
  const code = 'code' in error && typeof error.code === 'string' ? { code: error.code } : {}
  return {
    type: error.name,
    message: error.message,
    ...code,
    ...(error.stack ? { stack: error.stack } : {}),
    ...(error.cause instanceof Error ? { cause: plainError(error.cause) } : {}),
  }
}

export const createLog = (config: Pick<Config, 'logLevel'>, destination?: DestinationStream): Logger => {
  const options = {
    level: config.logLevel,
    base: null,
    timestamp: pino.stdTimeFunctions.isoTime,
    serializers: { err: plainError },
    redact: {
      paths: [
        'password',
        '*.password',
        'token',
        '*.token',
        'cookie',
        '*.cookie',
        '*.headers',
        'passwordHash',
      ],
      remove: true,
    },
  }
  return destination ? pino(options, destination) : pino(options)
}

/** The address without its query. One-time links have their secret after `#`, which never gets here. */
const pathOf = (url: string | undefined): string => (url ?? '').split('?')[0] ?? ''

export const logRequests = (log: Logger): RequestHandler =>
  pinoHttp({
    logger: log,
    genReqId: () => randomBytes(5).toString('hex'),
    customLogLevel: (_request, response) => (response.statusCode >= 500 ? 'error' : 'debug'),
    // Raw requests and errors come to our serializers: what the library would add first may hold secrets.
    wrapSerializers: false,
    serializers: {
      req: (request: { id: unknown; method: string; originalUrl?: string; url?: string }) => ({
        id: request.id,
        method: request.method,
        path: pathOf(request.originalUrl ?? request.url),
      }),
      res: (response: { statusCode: number }) => ({ status: response.statusCode }),
      err: plainError,
    },
  })
