/**
 * Why the server closes a socket. 4400–4499 are decisions: trying again by itself would not help, and
 * the connection stops. Everything else is passing, and the connection tries again.
 */
export const closeCodes = {
  unreadable: 4400,
  notSignedIn: 4401,
  notAllowed: 4403,
  notFound: 4404,
  penOfAnother: 4409,
  /** The document was closed to edits, or opened again, since this client loaded it. */
  olderEpoch: 4410,
  /** New writing under a client id that is somebody else's. */
  foreignClient: 4412,
  tooLarge: 4413,
  /** The program in the browser is older than the document. */
  reload: 4426,
  tooMany: 4429,
  /** Passing: the server stops, restarts, or could not store. */
  restarting: 1012,
  tryAgain: 1013,
} as const

export type CloseCode = (typeof closeCodes)[keyof typeof closeCodes]

/** True where the server has decided and the same connection must not be tried again by itself. */
export const isDecision = (code: number): boolean => code >= 4400 && code < 4500

/** What a person reads when a socket was closed with this code. */
export const closeReasons: Record<number, string> = {
  [closeCodes.unreadable]: 'The server could not read what this page sent.',
  [closeCodes.notSignedIn]: 'You are signed out. Sign in again to go on.',
  [closeCodes.notAllowed]: 'You may not open this sheet, or no longer.',
  [closeCodes.notFound]: 'This sheet does not exist.',
  [closeCodes.penOfAnother]: 'A colleague holds the pen of a line that you changed.',
  [closeCodes.olderEpoch]: 'The sheet was closed to edits, or opened again, since you loaded it.',
  [closeCodes.foreignClient]: 'This page wrote under the name of another connection.',
  [closeCodes.tooLarge]: 'This change is too large to be stored.',
  [closeCodes.reload]: 'A newer version of the program is in use. Reload the page.',
  [closeCodes.tooMany]: 'This page sent too much at once.',
}
