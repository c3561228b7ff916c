/** What routes may ask of the live sockets, without knowing how they are made. */
export interface Sockets {
  /** Closes the sockets of an account: signed out, or access ended. */
  closeAccount(accountId: string, reason: string): void
  /** Has the rights of an account's sockets asked again at once. */
  rightsChanged(accountId: string): void
}

/** Until the live side is attached, and where there is none. */
export const noSockets: Sockets = { closeAccount: () => undefined, rightsChanged: () => undefined }
