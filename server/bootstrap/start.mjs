/**
 * `npm start`: from a bare clone to a running Torfolio. Sets up whatever is missing, starts database and
 * server, prints where to go, and stops both on Ctrl-C.
 *
 *   npm start                 with demo data on the first start
 *   npm start -- --empty      without; offers to make the first firm and administrator
 *   npm run dev               the same with the client served and rebuilt by Vite
 *
 * Settings: DATABASE_URL (then no cluster of its own), PORT (4180), HOST (127.0.0.1), TORFOLIO_DATA (.data).
 */
import { spawn, spawnSync } from 'node:child_process'
import { createServer } from 'node:net'
import { resolve } from 'node:path'
import { buildWhenStale } from './build.mjs'
import { SetupError, checkNode, installPackages, root, say, withMessages } from './machine.mjs'
import { clusterHome, startCluster } from './postgres.mjs'

const flags = new Set(process.argv.slice(2))
const port = Number(process.env.PORT ?? 4180)
const host = process.env.HOST ?? '127.0.0.1'
const dataFolder = resolve(root, process.env.TORFOLIO_DATA ?? '.data')
const isLoopback = ['127.0.0.1', 'localhost', '::1'].includes(host)

/** Told before anything is started, as it is the commonest reason why a start fails. */
const portIsFree = () =>
  new Promise((resolveFree, reject) => {
    const probe = createServer()
    probe.once('error', (error) => {
      if (error.code === 'EADDRINUSE') {
        reject(
          new SetupError(
            `Port ${port} on ${host} is taken by another program (perhaps a Torfolio that is running already).\n` +
              `End that program, or choose another port:\n\n  PORT=${port + 1} npm start\n`,
          ),
        )
      } else if (error.code === 'EADDRNOTAVAIL' || error.code === 'ENOTFOUND') {
        reject(new SetupError(`HOST=${host} is not an address of this machine.`))
      } else if (error.code === 'EACCES') {
        reject(
          new SetupError(
            `This user may not listen on port ${port}. Choose one above 1023: PORT=4180 npm start`,
          ),
        )
      } else reject(error)
    })
    probe.listen(port, host, () => probe.close(() => resolveFree()))
  })

/** Browsers refuse some ports (those of the Fetch Standard), and so does our own look at the server's health. */
async function refuseBlockedPort() {
  const isBlocked = await fetch(addressOf()).then(
    () => false,
    (error) => error.cause?.message === 'bad port',
  )
  if (isBlocked) {
    throw new SetupError(`Browsers refuse to open port ${port}. Choose another: PORT=4180 npm start`)
  }
}

const addressOf = () => `http://${host.includes(':') ? `[${host}]` : host}:${port}`

/** Runs one of the built server's programs to its end and answers what it printed. */
const program = (name, env, args = []) => {
  const outcome = spawnSync(process.execPath, ['--enable-source-maps', `dist/server/${name}.js`, ...args], {
    cwd: root,
    env: { ...process.env, ...env },
    encoding: 'utf8',
    stdio: ['ignore', 'pipe', 'inherit'],
  })
  if (outcome.status !== 0)
    throw new SetupError(outcome.stdout || `${name} ended with code ${outcome.status}.`)
  return outcome.stdout
}

/** Database addresses for owner and application, from a cluster of our own or from DATABASE_URL. */
async function openDatabase() {
  if (process.env.DATABASE_URL) {
    const prepared = JSON.parse(program('prepare', { TORFOLIO_DATA: dataFolder }))
    for (const warning of prepared.warnings) say(`Note: ${warning}`)
    return { ...prepared, stop() {} }
  }
  const cluster = await startCluster({ home: clusterHome('database', dataFolder), durable: true })
  cluster.ensureDatabase('torfolio')
  return {
    ownerUrl: cluster.ownerUrl('torfolio'),
    appUrl: cluster.appUrl('torfolio'),
    sessionSecret: cluster.sessionSecret,
    stop: () => cluster.stop(),
  }
}

async function untilHealthy(child) {
  const address = addressOf()
  for (;;) {
    if (child.exitCode !== null)
      throw new SetupError('The server ended before it answered; its message stands above.')
    const answer = await fetch(`${address}/api/health`).catch(() => undefined)
    if (answer?.ok) return address
    await new Promise((wake) => setTimeout(wake, 100))
  }
}

async function main() {
  checkNode()
  if (!Number.isInteger(port) || port < 1 || port > 65535) {
    throw new SetupError(`PORT=${process.env.PORT} is no port: give a whole number from 1 to 65535.`)
  }
  await portIsFree()
  await refuseBlockedPort()
  installPackages()
  buildWhenStale()
  const database = await openDatabase()
  let server
  let stopping = false
  const stop = async () => {
    if (stopping) return
    stopping = true
    if (server && server.exitCode === null) {
      const ended = new Promise((resolveEnded) => server.once('exit', resolveEnded))
      server.kill('SIGTERM')
      await ended
    }
    database.stop()
    say('Stopped.')
  }
  for (const signal of ['SIGINT', 'SIGTERM', 'SIGHUP'])
    process.on(signal, () => void stop().then(() => process.exit(0)))

  try {
    const withDemo = !flags.has('--empty') && isLoopback && !process.env.DATABASE_URL
    const env = {
      TORFOLIO_OWNER_URL: database.ownerUrl,
      DATABASE_URL: database.appUrl,
      TORFOLIO_SESSION_SECRET: database.sessionSecret,
      TORFOLIO_DATA: dataFolder,
      TORFOLIO_DEMO: withDemo ? 'on' : 'off',
      PORT: String(port),
      HOST: host,
      NODE_ENV: 'production',
      // What matters is said below in words; the log of requests is for whoever asks for it.
      TORFOLIO_LOG: process.env.TORFOLIO_LOG ?? 'warn',
    }
    program('migrate', env)
    const accounts = withDemo ? program('demo', env) : ''
    // A session of its own, so that Ctrl-C reaches it by us and only once the browser's last words are stored.
    server = spawn(process.execPath, ['--enable-source-maps', 'dist/server/main.js'], {
      cwd: root,
      env: { ...process.env, ...env },
      stdio: ['ignore', 'inherit', 'inherit', 'ipc'],
      detached: true,
    })
    server.once('exit', (code) => {
      if (!stopping) {
        console.error(`The server ended by itself (code ${code}).`)
        void stop().then(() => process.exit(1))
      }
    })
    const address = await untilHealthy(server)
    say(`\nTorfolio is ready at ${address}\n`)
    if (accounts) say(accounts)
    say('Ctrl-C stops it; what is stored stays.')
    if (flags.has('--dev')) startVite(address)
  } catch (error) {
    await stop()
    throw error
  }
}

/** The client from its sources, reloaded on change; the API and the sockets stay with the server above. */
function startVite(address) {
  const vite = spawn(process.execPath, ['node_modules/vite/bin/vite.js'], {
    cwd: root,
    env: { ...process.env, TORFOLIO_API: address },
    stdio: 'inherit',
  })
  process.on('exit', () => vite.kill())
}

await withMessages(main)
