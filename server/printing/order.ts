/** What goes to the press and what comes back; between two processes of ours. */
import type { PagesRequest } from './compose/composePages'

export interface PressOrder {
  /** Sources of the Typst program, by file name. */
  program: Record<string, string>
  pages: PagesRequest
  /** Seconds since 1970; the only time that enters the file. */
  printedAt: number
}

export type PressAnswer =
  | {
      is: 'pdf'
      pdf: Uint8Array
      /** PDF/A-3b; false where a character is in no font. */
      archival: boolean
      pages: number
      composeMs: number
      setMs: number
    }
  | { is: 'failed'; reason: string }
