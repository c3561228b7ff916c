/** Who opens a socket: the same session and the same person as on a page, found before anything is read. */
import { ServerResponse } from 'node:http'
import type { IncomingMessage } from 'node:http'
import type { Request, RequestHandler, Response } from 'express'

export interface Visitor {
  accountId: string
  name: string
  /** The socket lives no longer than this session. */
  sessionId: string
}

/**
 * Runs the session's handlers on an HTTP upgrade, with a response that goes nowhere.
 * @returns a function that gives undefined where nobody is signed in
 * @throws what a handler throws, as when the database does not answer
 */
export const authenticateUpgrade =
  (handlers: readonly RequestHandler[]) =>
  async (request: IncomingMessage): Promise<Visitor | undefined> => {
    const response = new ServerResponse(request)
    const asked = request as Request
    // The session looks at the whole address, which Express would have noted.
    asked.originalUrl = request.url ?? '/'
    for (const handler of handlers)
      await new Promise<void>((resolve, reject) => {
        const done = (error?: unknown) => (error ? reject(error as Error) : resolve())
        Promise.resolve(handler(asked, response as Response, done)).catch(reject)
      })
    const user = asked.identity
    return user && { accountId: user.account.id, name: user.account.name, sessionId: asked.sessionID }
  }
