/** The server's process: reads the settings, listens, and stops in good order. */
import { ConfigError, readConfig } from './config'
import { createLog } from './middleware/logging'
import { sessionSecretOf } from './middleware/sessionSecret'
import { createTorfolioServer } from './server'
import { needsSetup } from './services/setUpFirstFirm'

/** Exit codes, by sysexits: how a supervisor tells a wrong setting from a taken port. */
const exitCodes = { configuration: 78, unavailable: 69, addressInUse: 75 } as const

const say = (text: string) => process.stderr.write(`${text}\n`)

const main = async (): Promise<void> => {
  const config = readConfig()
  const log = createLog(config)
  const server = await createTorfolioServer({
    config,
    sessionSecret: await sessionSecretOf(config.sessionSecret, config.dataFolder),
    log,
  })
  const address = `http://${config.host.includes(':') ? `[${config.host}]` : config.host}`

  let isStopping = false
  const stop = async (why: string): Promise<void> => {
    if (isStopping) return
    isStopping = true
    log.info({ why }, 'stopping')
    await server.close().catch((error: unknown) => log.error({ err: error }, 'stopping'))
    process.exit()
  }
  for (const signal of ['SIGTERM', 'SIGINT', 'SIGHUP'] as const) process.on(signal, () => void stop(signal))
  // The start that made this process is gone: nobody would stop us any more.
  process.on('disconnect', () => void stop('disconnect'))
  process.on('unhandledRejection', (error) => log.error({ err: error }, 'not handled'))
  process.on('uncaughtException', (error) => {
    log.fatal({ err: error }, 'not caught')
    process.exitCode = 1
    void stop('uncaught error')
  })

  server.http.once('error', (error: NodeJS.ErrnoException) => {
    say(cannotListen(error, config.host, config.port))
    process.exitCode = error.code === 'EADDRINUSE' ? exitCodes.addressInUse : exitCodes.configuration
    void stop('cannot listen')
  })
  server.http.listen(config.port, config.host, () => {
    const bound = server.http.address()
    const port = typeof bound === 'object' && bound ? bound.port : config.port
    log.info({ address: `${address}:${port}`, version: config.version }, 'listening')
    if (process.getuid?.() === 0)
      say('Running as root works, but a service user of its own is safer: see README, In production.')
    needsSetup(server.dataSource).then(
      (needed) => {
        if (needed)
          say(
            `No firm yet. Make the first one at ${address}:${port}/welcome with this word: ${server.setupToken}`,
          )
      },
      (error: unknown) => log.error({ err: error }, 'looking for a firm'),
    )
  })
}

const cannotListen = (error: NodeJS.ErrnoException, host: string, port: number): string => {
  if (error.code === 'EADDRINUSE')
    return `Port ${port} on ${host} is taken by another program. End it, or choose another: PORT=${port + 1}`
  if (error.code === 'EACCES') return `This user may not listen on port ${port}. Choose one above 1023.`
  if (error.code === 'EADDRNOTAVAIL' || error.code === 'ENOTFOUND')
    return `HOST=${host} is not an address of this machine.`
  return `Listening on ${host}:${port} failed: ${error.message}`
}

main().catch((error: unknown) => {
  const isSetting = error instanceof ConfigError
  say(
    isSetting ? error.message : `The server could not start. ${error instanceof Error ? error.message : ''}`,
  )
  process.exit(isSetting ? exitCodes.configuration : exitCodes.unavailable)
})
