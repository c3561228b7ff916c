/** What routes may ask of the live sockets, without knowing how they are made. */
export interface Sockets {
  /**
   * Has sessions and rights of an account's sockets asked again at once. Those whose session has ended are
   * closed: the sheets that the person has open elsewhere, by another session, stay open.
   */
  rightsChanged(accountId: string): void
}

/** Until the live side is attached, and where there is none. */
export const noSockets: Sockets = { rightsChanged: () => undefined }
