import type { z } from 'zod'

/** What a schema finds wrong, by path of the field (`person.email`); the first message of each. */
export const fieldMessages = (judged: z.ZodSafeParseResult<unknown>): Record<string, string> => {
  const messages: Record<string, string> = {}
  for (const issue of judged.error?.issues ?? []) messages[issue.path.join('.')] ??= issue.message
  return messages
}
