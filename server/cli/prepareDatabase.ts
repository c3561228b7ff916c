/**
 * For a database that is not ours (DATABASE_URL): gives it the two roles that the product wants, one that
 * owns the tables and one that the application uses. Prints their addresses as JSON for the start; where this
 * user may not make roles, the one role does both, and a warning says what that gives up.
 */
import { randomBytes } from 'node:crypto'
import { mkdir, readFile, writeFile } from 'node:fs/promises'
import { join } from 'node:path'
import { Client } from 'pg'
import { z } from 'zod'
import { ConfigError } from '../config'

const OLDEST = 150_000

const secretsSchema = z.object({ owner: z.string(), app: z.string() })
type Secrets = z.infer<typeof secretsSchema>

interface Prepared {
  ownerUrl: string
  appUrl: string
  warnings: string[]
}

const readSecrets = async (folder: string): Promise<Secrets> => {
  const path = join(folder, 'database-roles.json')
  try {
    return secretsSchema.parse(JSON.parse(await readFile(path, 'utf8')))
  } catch {
    const secrets = { owner: randomBytes(24).toString('hex'), app: randomBytes(24).toString('hex') }
    await mkdir(folder, { recursive: true })
    await writeFile(path, JSON.stringify(secrets), { mode: 0o600 })
    return secrets
  }
}

const withRole = (address: string, role: string, password: string): string => {
  const url = new URL(address)
  url.username = role
  url.password = password
  return url.href
}

/** Roles with passwords that we know; hexadecimal, so that they need no quoting. */
const giveRoles = async (client: Client, secrets: Secrets): Promise<void> => {
  const [{ database } = { database: '' }] = (
    await client.query<{ database: string }>('SELECT quote_ident(current_database()) AS database')
  ).rows
  await client.query('BEGIN')
  for (const [role, password] of [
    ['torfolio_owner', secrets.owner],
    ['torfolio_app', secrets.app],
  ] as const) {
    const known = await client.query('SELECT 1 FROM pg_roles WHERE rolname = $1', [role])
    await client.query(
      `${known.rowCount === 0 ? 'CREATE' : 'ALTER'} ROLE ${role} LOGIN PASSWORD '${password}'`,
    )
  }
  await client.query(`GRANT CONNECT, CREATE ON DATABASE ${database} TO torfolio_owner`)
  await client.query(`GRANT CONNECT ON DATABASE ${database} TO torfolio_app`)
  await client.query('GRANT USAGE, CREATE ON SCHEMA public TO torfolio_owner')
  await client.query('COMMIT')
}

/** @throws {ConfigError} where the database does not answer or is too old */
export const prepareDatabase = async (address: string, dataFolder: string): Promise<Prepared> => {
  const client = new Client({ connectionString: address, connectionTimeoutMillis: 10_000 })
  client.on('error', () => undefined)
  try {
    await client.connect()
  } catch (error) {
    const { host } = new URL(address)
    const reason = error instanceof Error && error.message !== '' ? error.message : 'no answer'
    throw new ConfigError(`The database of DATABASE_URL at ${host} cannot be used: ${reason}`)
  }
  try {
    const [server] = (await client.query<{ server_version_num: string }>('SHOW server_version_num')).rows
    if (Number(server?.server_version_num) < OLDEST) {
      throw new ConfigError('The database of DATABASE_URL is older than PostgreSQL 15, which Torfolio needs.')
    }
    const secrets = await readSecrets(dataFolder)
    try {
      await giveRoles(client, secrets)
    } catch {
      await client.query('ROLLBACK')
      return {
        ownerUrl: address,
        appUrl: address,
        warnings: [
          'The user of DATABASE_URL may not make roles, so that one role owns the tables and uses them. ' +
            'Records that nobody may change are then guarded by triggers alone. ' +
            'Give the user CREATEROLE and the ownership of the database, and start again, to have both roles.',
        ],
      }
    }
    return {
      ownerUrl: withRole(address, 'torfolio_owner', secrets.owner),
      appUrl: withRole(address, 'torfolio_app', secrets.app),
      warnings: [],
    }
  } finally {
    await client.end()
  }
}
