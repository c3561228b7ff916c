/**
 * - `GET /api/health` → 200 `health` once everything answers; 503 until then
 */
import { z } from 'zod'

export const health = z.object({
  status: z.literal('ok'),
  version: z.string(),
  /** Name of the latest migration. */
  schema: z.string(),
})
export type Health = z.infer<typeof health>
