/** Run by the start where DATABASE_URL is given; see prepareDatabase. */
import { ConfigError, readConfig } from '../config'
import { prepareDatabase } from './prepareDatabase'

try {
  const { databaseUrl, dataFolder } = readConfig()
  console.log(JSON.stringify(await prepareDatabase(databaseUrl, dataFolder)))
} catch (error) {
  if (!(error instanceof ConfigError)) throw error
  console.log(error.message)
  process.exitCode = 1
}
