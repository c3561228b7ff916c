/**
 * A server of one's own on a fresh database, with two firms and people of every role in the first.
 *
 *   const office = await startServer()
 *   const engineer = await office.signIn('engineer')
 *   await engineer.get('/api/in-tray').expect(200)
 *   await office.close()
 */
import { randomUUID } from 'node:crypto'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import request from 'supertest'
import type { FirmRole } from '@shared/review/permissions'
import type { Calculation, NewCalculationInput } from '@shared/api/calculations'
import type { Project } from '@shared/api/projects'
import { createDataSource } from '@server/data-source'
import type { Config } from '@server/config'
import { createLog } from '@server/middleware/logging'
import { insertAccount } from '@server/repositories/accounts'
import { insertFirm } from '@server/repositories/firms'
import { insertMembership } from '@server/repositories/memberships'
import { firmScope, inTransaction } from '@server/repositories/transaction'
import { createTorfolioServer } from '@server/server'
import type { TorfolioServer } from '@server/server'
import { hashPassword } from '@server/services/session/passwords'
import { freshDatabase } from './database'
import type { TestDatabase } from './database'

export const PASSWORD = 'slow river under stone'

/** Who is there: the first firm has everybody, the second an administrator of its own. */
const cast = {
  administrator: { name: 'Agnes Holm', firm: 'first', role: 'administrator' },
  steward: { name: 'Stellan Voss', firm: 'first', role: 'steward' },
  engineer: { name: 'Edda Brandt', firm: 'first', role: 'engineer' },
  colleague: { name: 'Cosmin Albu', firm: 'first', role: 'engineer' },
  checker: { name: 'Chiara Moretti', firm: 'first', role: 'engineer' },
  approver: { name: 'Arvid Nyman', firm: 'first', role: 'engineer' },
  observer: { name: 'Olga Petrenko', firm: 'first', role: 'observer' },
  stranger: { name: 'Stefan Gruber', firm: 'second', role: 'administrator' },
} as const satisfies Record<string, { name: string; firm: 'first' | 'second'; role: FirmRole }>

export type PersonName = keyof typeof cast

export interface TestPerson {
  id: string
  name: string
  email: string
  firmId: string
  role: FirmRole
}

export type Client = ReturnType<typeof request.agent>

/** What people of the cast do by requests. */
export interface Clients {
  url: string
  people: Record<PersonName, TestPerson>
  /** What is sent by a page of this server. */
  anonymous(): Client
  signIn(person: PersonName): Promise<Client>
  /** The session's cookie, for sockets. */
  cookieOf(person: PersonName): Promise<string>
  addProject(client: Client, supervision?: 'DSL1' | 'DSL2' | 'DSL3'): Promise<Project>
  addCalculation(client: Client, wanted?: Partial<NewCalculationInput>): Promise<Calculation>
}

export interface TestServer extends Clients {
  database: TestDatabase
  server: TorfolioServer
  close(): Promise<void>
}

export interface StartOptions {
  config?: Partial<Config>
  /** Without firms and people, as on the first start. */
  empty?: boolean
  /** Receives the lines of the log; otherwise there is none. */
  log?: (line: string) => void
  /** Another server's database, for several processes on one. */
  database?: TestDatabase
}

const configFor = (databaseUrl: string, config: Partial<Config>): Config => ({
  databaseUrl,
  port: 0,
  host: '127.0.0.1',
  dataFolder: join(tmpdir(), 'torfolio-tests'),
  clientFolder: join(process.cwd(), 'dist/client'),
  templatesFolder: join(process.cwd(), 'templates'),
  origins: [],
  proxies: 0,
  sessionSecret: undefined,
  demo: false,
  setupToken: 'the-word-of-this-test-installation',
  logLevel: 'silent',
  version: '0.0.0-test',
  ...config,
})

let passwordHash: Promise<string> | undefined

/** The cast of both firms, written by the application's own repositories. */
export const addCast = async (appUrl: string): Promise<Record<PersonName, TestPerson>> => {
  passwordHash ??= hashPassword(PASSWORD)
  const hash = await passwordHash
  const source = createDataSource(appUrl, { poolSize: 1 })
  await source.initialize()
  const firmIds = { first: randomUUID(), second: randomUUID() }
  const people: Partial<Record<PersonName, TestPerson>> = {}
  try {
    for (const firm of ['first', 'second'] as const) {
      const members = (Object.keys(cast) as PersonName[]).filter((name) => cast[name].firm === firm)
      const scope = firmScope(source, {
        firmId: firmIds[firm],
        accountId: randomUUID(),
        role: 'administrator',
      })
      await inTransaction(scope, async (tx) => {
        await insertFirm(tx, { name: `The ${firm} firm`, timeZone: 'Europe/Stockholm', numberPrefix: 'TF' })
        for (const name of members) {
          const person = {
            id: randomUUID(),
            name: cast[name].name,
            email: `${name}@${firm}.test`,
            firmId: firmIds[firm],
            role: cast[name].role,
          }
          people[name] = person
          await insertAccount(tx, { ...person, passwordHash: hash, isDemo: false })
          await insertMembership(tx, { id: randomUUID(), accountId: person.id, role: person.role })
        }
      })
    }
  } finally {
    await source.destroy()
  }
  return people as Record<PersonName, TestPerson>
}

/** Clients of a server that listens at `url`, in this process or another. */
export const clientsOf = (url: string, people: Record<PersonName, TestPerson>): Clients => {
  const anonymous = (): Client => request.agent(url).set('Origin', url)

  const signIn = async (person: PersonName): Promise<Client> => {
    const client = anonymous()
    await client.post('/api/session').send({ email: people[person].email, password: PASSWORD }).expect(200)
    return client
  }

  const addProject: Clients['addProject'] = async (client, supervision = 'DSL2') => {
    const number = `P-${randomUUID().slice(0, 8)}`
    const answer = await client
      .post('/api/projects')
      .send({ number, name: 'Mill drive', supervision })
      .expect(201)
    return answer.body as Project
  }

  return {
    url,
    people,
    anonymous,
    signIn,
    cookieOf: async (person) => {
      const answer = await anonymous()
        .post('/api/session')
        .send({ email: people[person].email, password: PASSWORD })
        .expect(200)
      return String(answer.get('Set-Cookie')?.[0]).split(';')[0] ?? ''
    },
    addProject,
    addCalculation: async (client, wanted = {}) => {
      const projectId = wanted.projectId ?? (await addProject(client)).id
      const answer = await client
        .post('/api/calculations')
        .send({ title: 'Input shaft', ...wanted, projectId })
        .expect(201)
      return answer.body as Calculation
    },
  }
}

export const startServer = async (options: StartOptions = {}): Promise<TestServer> => {
  const database = options.database ?? (await freshDatabase())
  const people = (options.empty ? {} : await addCast(database.appUrl)) as Record<PersonName, TestPerson>
  const config = configFor(database.appUrl, options.config ?? {})
  const server = await createTorfolioServer({
    config,
    sessionSecret: 'a secret of tests that is long enough to sign with',
    log: createLog(config, options.log && { write: options.log }),
  })
  await new Promise<void>((resolve) => server.http.listen(0, '127.0.0.1', resolve))
  const bound = server.http.address()
  const url = `http://127.0.0.1:${typeof bound === 'object' && bound ? bound.port : 0}`
  return {
    ...clientsOf(url, people),
    database,
    server,
    close: async () => {
      await server.close()
      if (!options.database) await database.drop()
    },
  }
}
