/**
 * Fresh databases for tests: the migrations run once into a template, named after their content; each
 * database is a copy of it, which takes a fraction of a second.
 */
import { createHash, randomBytes } from 'node:crypto'
import { readFileSync, readdirSync } from 'node:fs'
import { join } from 'node:path'
import { Client } from 'pg'
import { z } from 'zod'
import { migrate } from '@server/cli/migrate'

const addresses = z.object({ super: z.string(), owner: z.string(), app: z.string() })

const clusterAddresses = () => {
  const given = process.env['TORFOLIO_TEST_CLUSTER']
  if (!given)
    throw new Error('The test cluster is not running: tests run by vitest, whose global set-up starts it.')
  return addresses.parse(JSON.parse(given))
}

const address = (role: 'super' | 'owner' | 'app', database: string) =>
  clusterAddresses()[role].replace('{database}', database)

const asSuper = async <Result>(work: (client: Client) => Promise<Result>): Promise<Result> => {
  const client = new Client({ connectionString: address('super', 'postgres') })
  await client.connect()
  try {
    return await work(client)
  } finally {
    await client.end()
  }
}

const migrationsDigest = (): string => {
  const folder = join(process.cwd(), 'server/migrations')
  const digest = createHash('sha256')
  for (const file of readdirSync(folder).sort()) digest.update(readFileSync(join(folder, file)))
  return digest.digest('hex').slice(0, 16)
}

const TEMPLATE_LOCK = 7_114_001

/** The migrated template; made once, whoever of the parallel workers comes first. */
const ensureTemplate = (client: Client): Promise<string> => {
  const template = `template_${migrationsDigest()}`
  const exists = async () =>
    (await client.query('SELECT 1 FROM pg_database WHERE datname = $1', [template])).rowCount === 1
  return (async () => {
    if (await exists()) return template
    await client.query('SELECT pg_advisory_lock($1)', [TEMPLATE_LOCK])
    try {
      if (await exists()) return template
      const building = `${template}_building`
      await client.query(`DROP DATABASE IF EXISTS ${building} WITH (FORCE)`)
      await client.query(`CREATE DATABASE ${building} OWNER torfolio_owner`)
      await migrate(address('owner', building))
      await client.query(`ALTER DATABASE ${building} RENAME TO ${template}`)
      return template
    } finally {
      await client.query('SELECT pg_advisory_unlock($1)', [TEMPLATE_LOCK])
    }
  })()
}

export interface TestDatabase {
  /** For the application's role, which migrations leave with few rights. */
  appUrl: string
  /** For the role that owns the tables. */
  ownerUrl: string
  drop(): Promise<void>
}

/** A migrated database of its own; `drop()` ends every connection to it. */
export const freshDatabase = async (): Promise<TestDatabase> => {
  const name = `test_${process.pid}_${randomBytes(6).toString('hex')}`
  await asSuper(async (client) => {
    const template = await ensureTemplate(client)
    // Copying a template fails while somebody else copies it at the same moment: take turns.
    await client.query('SELECT pg_advisory_lock($1)', [TEMPLATE_LOCK])
    try {
      await client.query(`CREATE DATABASE ${name} TEMPLATE ${template} OWNER torfolio_owner`)
    } finally {
      await client.query('SELECT pg_advisory_unlock($1)', [TEMPLATE_LOCK])
    }
  })
  return {
    appUrl: address('app', name),
    ownerUrl: address('owner', name),
    drop: () =>
      asSuper(async (client) => void (await client.query(`DROP DATABASE IF EXISTS ${name} WITH (FORCE)`))),
  }
}
