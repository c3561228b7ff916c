/**
 * The first firm and its administrator, on an installation that has none.
 *
 * - `POST /api/setup` `firstFirm` → 201 `me` (signed in); 403 for a wrong word, 409 once there is a firm
 */
import { z } from 'zod'
import { email, line, newPassword } from './fields'

export const timeZone = line(1, 60).refine(
  (name) => {
    try {
      new Intl.DateTimeFormat('en', { timeZone: name })
      return true
    } catch {
      return false
    }
  },
  { error: 'This is not a time zone, as Europe/Berlin.' },
)

export const numberPrefix = z
  .string()
  .trim()
  .regex(/^[A-Z][A-Z0-9]{0,7}$/, 'Up to eight capital letters and digits, beginning with a letter.')

export const firstFirm = z.object({
  /** The one-time word that the start of the server prints. */
  token: line(1, 200),
  firm: z.object({
    name: line(1, 200),
    timeZone: timeZone.default('UTC'),
    numberPrefix: numberPrefix.default('TF'),
  }),
  person: z.object({ name: line(1, 120), email, password: newPassword }),
})
export type FirstFirm = z.infer<typeof firstFirm>
export type FirstFirmInput = z.input<typeof firstFirm>
