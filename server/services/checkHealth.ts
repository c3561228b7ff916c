import { latestMigration } from '@server/repositories/schema'
import { inTransaction, systemScope } from '@server/repositories/transaction'
import type { Database } from '@server/repositories/transaction'
import { Refusal } from './refusals'

/** The name of the latest migration. @throws {Refusal} while the database is not as this program needs it */
export const checkHealth = async (dataSource: Database): Promise<string> => {
  const schema = await inTransaction(systemScope(dataSource), latestMigration)
  const wanted = dataSource.migrations[dataSource.migrations.length - 1]?.name
  if (schema === undefined || schema !== wanted)
    throw new Refusal(
      'unavailable',
      `The tables are at ${schema ?? 'nothing'}, this program needs ${wanted ?? 'nothing'}: migrate.`,
    )
  return schema
}
