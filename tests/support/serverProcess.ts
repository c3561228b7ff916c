/**
 * The built server as a process of its own, which tests kill, behind one small proxy for each person,
 * which tests cut: what a reverse proxy and a network are to a browser.
 */
import { spawn, type ChildProcess } from 'node:child_process'
import { existsSync } from 'node:fs'
import { createServer, type AddressInfo } from 'node:net'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { createDataSource } from '@server/data-source'
import { loadDocument } from '@server/collaboration/storedDocument'
import { firmScope, inTransaction } from '@server/repositories/transaction'
import { openProxy, type Proxy } from '../collab/support/proxy'
import { freshDatabase } from './database'
import { addCast, clientsOf, type Clients, type PersonName } from './server'

const program = join(process.cwd(), 'dist/server/main.js')

const freePort = (): Promise<number> =>
  new Promise((resolve) => {
    const holder = createServer()
    holder.listen(0, '127.0.0.1', () => {
      const { port } = holder.address() as AddressInfo
      holder.close(() => resolve(port))
    })
  })

export interface StoredState {
  head: number
  epoch: number
  /** The page as XML, as the database would give it to anybody who opens the sheet. */
  page: string
}

export interface ServerProcess extends Clients {
  /** Where this person's browser finds the server: an address that can be cut for them alone. */
  addressOf(person: PersonName): string
  /** The network of one person is gone, or there again. */
  cutFor(person: PersonName): void
  /** What this person sends reaches nobody, and they do not know it yet. */
  stallFor(person: PersonName): void
  joinFor(person: PersonName): void
  /** SIGKILL: no flush, no farewell. */
  kill(): Promise<void>
  /** The same server again, on the same port and the same database. */
  start(): Promise<void>
  isRunning(): boolean
  /** What is committed, read past the server. */
  storedOf(documentId: string): Promise<StoredState>
  /** A statement to the database past the server, as another process of the application would make it. */
  query(statement: string, values: unknown[]): Promise<void>
  close(): Promise<void>
}

export const startServerProcess = async (persons: readonly PersonName[]): Promise<ServerProcess> => {
  if (!existsSync(program)) throw new Error('The server is not built: run npm run build first.')
  const database = await freshDatabase()
  const people = await addCast(database.appUrl)
  const dataSource = await createDataSource(database.appUrl, { poolSize: 2 }).initialize()
  const port = await freePort()
  const proxies = new Map<PersonName, Proxy>()
  for (const person of persons) proxies.set(person, await openProxy(port))
  const proxyOf = (person: PersonName): Proxy => {
    const proxy = proxies.get(person)
    if (proxy === undefined) throw new Error(`${person} has no way to the server`)
    return proxy
  }
  const addressOf = (person: PersonName) => proxyOf(person).address.replace('ws:', 'http:')
  const url = `http://127.0.0.1:${port}`
  const scope = firmScope(dataSource, {
    firmId: people.engineer.firmId,
    accountId: people.engineer.id,
    role: 'engineer',
  })
  let child: ChildProcess | undefined

  const start = async (): Promise<void> => {
    child = spawn(process.execPath, [program], {
      stdio: ['ignore', 'inherit', 'inherit'],
      env: {
        ...process.env,
        DATABASE_URL: database.appUrl,
        PORT: String(port),
        HOST: '127.0.0.1',
        TORFOLIO_DATA: join(tmpdir(), 'torfolio-tests'),
        TORFOLIO_ORIGINS: [url, ...persons.map(addressOf)].join(','),
        TORFOLIO_SESSION_SECRET: 'a secret of tests that is long enough to sign with',
        TORFOLIO_LOG: 'error',
      },
    })
    const end = Date.now() + 30_000
    while (
      !(await fetch(url).then(
        ({ ok }) => ok,
        () => false,
      ))
    ) {
      if (child.exitCode !== null || Date.now() > end) throw new Error('The server did not start')
      await new Promise((resolve) => setTimeout(resolve, 100))
    }
  }
  const isRunning = () => child !== undefined && child.exitCode === null && child.signalCode === null
  const kill = (): Promise<void> =>
    new Promise((resolve) => {
      if (!isRunning() || child === undefined) return resolve()
      child.once('exit', () => resolve())
      child.kill('SIGKILL')
    })

  await start()
  return {
    ...clientsOf(url, people),
    addressOf,
    cutFor: (person) => {
      proxyOf(person).lead(undefined)
      proxyOf(person).cut()
    },
    stallFor: (person) => proxyOf(person).stall(),
    joinFor: (person) => proxyOf(person).lead(port),
    kill,
    start,
    isRunning,
    storedOf: (documentId) =>
      inTransaction(scope, async (tx) => {
        const { doc, row } = await loadDocument(tx, documentId)
        const page = doc.getXmlFragment('page').toString()
        doc.destroy()
        return { head: row.head, epoch: row.epoch, page }
      }),
    query: (statement, values) =>
      inTransaction(scope, async ({ manager }) => {
        await manager.query(statement, values)
      }),
    close: async () => {
      await kill()
      for (const proxy of proxies.values()) await proxy.close()
      await dataSource.destroy()
      await database.drop()
    },
  }
}
