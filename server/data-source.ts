/** The connection to PostgreSQL: which entities and migrations there are, and how the pool behaves. */
import 'reflect-metadata'
import { DataSource } from 'typeorm'
import { entities } from './entities'
import { migrations } from './migrations'

export interface DataSourceOptions {
  /** Hears of errors of idle connections; without a listener the process would die of a database restart. */
  onPoolError?: (error: Error) => void
  /** Most connections of this process. */
  poolSize?: number
}

/** Builds, does not connect: call `initialize()`, and `destroy()` at the end. */
export const createDataSource = (url: string, options: DataSourceOptions = {}): DataSource =>
  new DataSource({
    type: 'postgres',
    url,
    entities,
    migrations,
    migrationsTableName: 'schema_migration',
    synchronize: false,
    migrationsTransactionMode: 'each',
    poolSize: options.poolSize ?? 10,
    applicationName: 'torfolio',
    poolErrorHandler: (error: Error) => options.onPoolError?.(error),
    extra: {
      connectionTimeoutMillis: 10_000,
      // A statement that hangs must not keep a connection for ever.
      statement_timeout: 30_000,
      idle_in_transaction_session_timeout: 60_000,
    },
  })
