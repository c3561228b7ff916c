import type { z } from 'zod'

/** A refusal or failure, with words that can be shown as they are. */
export class ApiError extends Error {
  constructor(
    message: string,
    /** HTTP status; 0 where no answer came. */
    readonly status: number,
    readonly code: string,
    /** What the server's log calls this failure. */
    readonly reference?: string,
    /** Messages by field, where a form was refused. */
    readonly fields: Record<string, string> = {},
  ) {
    super(message)
    this.name = 'ApiError'
  }

  /** True where the same request may succeed a little later. */
  get mayPass(): boolean {
    return this.status === 0 || this.status === 429 || this.status >= 500
  }
}
