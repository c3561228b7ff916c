/** Brings the tables up to date, as their owner. Run by the start before the server; a second run does nothing. */
import { pathToFileURL } from 'node:url'
import { readOwnerUrl } from '../config'
import { createDataSource } from '../data-source'

const MIGRATION_LOCK = 4_180_001

/** @returns the names of the migrations that were run now */
export const migrate = async (ownerUrl: string): Promise<string[]> => {
  const source = createDataSource(ownerUrl, { poolSize: 2 })
  await source.initialize()
  const runner = source.createQueryRunner()
  try {
    // Two processes that start together: the second waits here, then finds nothing to do.
    await runner.query('SELECT pg_advisory_lock($1)', [MIGRATION_LOCK])
    const done = await source.runMigrations()
    return done.map((migration) => migration.name)
  } finally {
    await runner.query('SELECT pg_advisory_unlock($1)', [MIGRATION_LOCK]).catch(() => undefined)
    await runner.release()
    await source.destroy()
  }
}

if (process.argv[1] !== undefined && import.meta.url === pathToFileURL(process.argv[1]).href) {
  try {
    const done = await migrate(readOwnerUrl())
    console.log(done.length === 0 ? 'The tables are up to date.' : `Migrated: ${done.join(', ')}`)
  } catch (error) {
    console.error(
      `The tables could not be brought up to date. ${error instanceof Error ? error.message : ''}`,
    )
    process.exitCode = 1
  }
}
