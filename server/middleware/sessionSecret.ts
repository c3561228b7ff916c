import { randomBytes } from 'node:crypto'
import { mkdir, readFile, writeFile } from 'node:fs/promises'
import { join } from 'node:path'

/**
 * The key that signs session cookies: the one that was set, else one made on the first start and kept in
 * the data folder, so that a restart signs nobody out. Several processes need one that is set.
 */
export const sessionSecretOf = async (given: string | undefined, dataFolder: string): Promise<string> => {
  if (given !== undefined) return given
  const file = join(dataFolder, 'session-secret')
  const kept = await readFile(file, 'utf8').catch(() => '')
  if (kept.trim().length >= 32) return kept.trim()
  const made = randomBytes(32).toString('base64url')
  await mkdir(dataFolder, { recursive: true, mode: 0o700 })
  await writeFile(file, `${made}\n`, { mode: 0o600 })
  return made
}
