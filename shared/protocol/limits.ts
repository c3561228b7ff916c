/** What one socket may send and one document may hold. Both sides read these, so that a client refuses before it sends. */
export const limits = {
  /** Bytes of one frame; a larger one closes the socket. A pasted novel fits. */
  frameBytes: 4 * 1024 * 1024,
  /** Bytes of a document's stored updates taken together. */
  documentBytes: 48 * 1024 * 1024,
  /** Bytes of one person's presence, as JSON. */
  presenceBytes: 4 * 1024,
  /** Presences that one socket may announce at a time. */
  presencesPerSocket: 2,
  /** Frames that one socket may send at once, and how many more every second. */
  framesAtOnce: 600,
  framesPerSecond: 120,
  /** Bytes that one socket may send at once, and how many more every second: four of the largest frames. */
  bytesAtOnce: 16 * 1024 * 1024,
  bytesPerSecond: 1024 * 1024,
  /** How often one socket may ask for the whole state: each answer may be the whole document. */
  statesAtOnce: 20,
  statesPerSecond: 1,
  /** Lines one act may take the pens of. */
  pensAtOnce: 2000,
  /** A pen lapses so long after the last key, in milliseconds. */
  penLapseMs: 60_000,
  /** How often a pen in use is kept, in milliseconds. */
  penKeepMs: 15_000,
  /** Open sockets of one account on one document. */
  socketsPerAccount: 20,
} as const
