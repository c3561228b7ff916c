/** Sessions in PostgreSQL, signing in by e-mail and password, and the firm that a request works in. */
import connectPgSimple from 'connect-pg-simple'
import type { Request, RequestHandler } from 'express'
import session from 'express-session'
import { Passport } from 'passport'
import { Strategy } from 'passport-local'
import type { Pool } from 'pg'
import { Refusal } from '@server/services/refusals'
import { checkCredentials } from '@server/services/session/signIn'
import { currentScope, readIdentity } from '@server/services/session/identity'
import type { Identity } from '@server/services/session/identity'
import { LONGEST_SESSION_MS } from '@server/services/session/sessionInForce'
import './request'
import type { Database } from '@server/repositories/transaction'

export const SESSION_COOKIE = 'torfolio.session'
const IDLE_MS = 12 * 3_600_000

export interface SessionOptions {
  dataSource: Database
  pool: Pool
  secret: string
  failed: (error: unknown) => void
}

export interface SignedInChain {
  /** Session, person, firm: in this order on every request, and on the upgrade of a socket. */
  handlers: RequestHandler[]
  /** Compares address and password of a request's body. */
  checkPassword: RequestHandler
  close(): void
}

export const createSessions = ({ dataSource, pool, secret, failed }: SessionOptions): SignedInChain => {
  const Store = connectPgSimple(session)
  const store = new Store({ pool, tableName: 'session', pruneSessionInterval: 900, errorLog: failed })
  const passport = new Passport()
  passport.serializeUser<string>((user, done) => done(null, (user as Identity).account.id))
  passport.deserializeUser<string>((id, done) => {
    readIdentity(dataSource, id).then(
      (identity) => done(null, identity ?? false),
      (error: unknown) => done(error),
    )
  })
  passport.use(
    new Strategy({ usernameField: 'email' }, (email, password, done) => {
      checkCredentials(dataSource, email, password)
        .then((id) => (id === null ? null : readIdentity(dataSource, id)))
        .then(
          (identity) => done(null, identity ?? false),
          (error: unknown) => done(error),
        )
    }),
  )
  return {
    handlers: [
      session({
        store,
        secret,
        name: SESSION_COOKIE,
        resave: false,
        saveUninitialized: false,
        rolling: true,
        cookie: { httpOnly: true, sameSite: 'lax', secure: 'auto', maxAge: IDLE_MS },
      }),
      endOldSessions,
      passport.initialize(),
      passport.session(),
      (request, _response, next) => {
        if (request.user) work(request, dataSource, request.user as Identity)
        next()
      },
    ],
    checkPassword: (request, response, next) => {
      const decided = (error: unknown, user: Express.User | false | null | undefined) => {
        if (error) return next(error)
        if (!user)
          return next(new Refusal('sign-in-refused', 'E-mail address and password do not belong together.'))
        work(request, dataSource, user as Identity)
        next()
      }
      const authenticate = passport.authenticate('local', { session: false }, decided) as RequestHandler
      void authenticate(request, response, next)
    },
    close: () => store.close(),
  }
}

/** Notes on the request who works, and in which firm. */
const work = (request: Request, dataSource: Database, identity: Identity): void => {
  request.identity = identity
  const scope = currentScope(dataSource, identity, request.session.firmId)
  if (scope) request.scope = scope
}

const endOldSessions: RequestHandler = (request, _response, next) => {
  const { startedAt } = request.session
  if (startedAt === undefined || Date.now() - startedAt < LONGEST_SESSION_MS) return next()
  request.session.regenerate((error: unknown) => next(error))
}

/**
 * Signs a person in: a session of a new name, so that one planted before signing in is worth nothing.
 * @param user as just read
 */
export const beginSession = async (request: Request, user: Identity): Promise<void> => {
  await new Promise<void>((resolve, reject) => {
    request.logIn(user, (error: unknown) => (error ? reject(error as Error) : resolve()))
  })
  request.session.startedAt = Date.now()
}

/** Signs out: the session is gone from the database, not only from the browser. */
export const endSession = (request: Request): Promise<void> =>
  new Promise((resolve, reject) => {
    request.session.destroy((error: unknown) => (error ? reject(error as Error) : resolve()))
  })
