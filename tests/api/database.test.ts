import { randomUUID } from 'node:crypto'
import { Client } from 'pg'
import { afterAll, beforeAll, describe, expect, test } from 'vitest'
import type { DataSource } from 'typeorm'
import { createDataSource } from '@server/data-source'
import { migrate } from '@server/cli/migrate'
import { freshDatabase } from '../support/database'
import type { TestDatabase } from '../support/database'

let database: TestDatabase
let app: Client
let owner: Client

const connect = async (connectionString: string): Promise<Client> => {
  const client = new Client({ connectionString })
  await client.connect()
  return client
}

/** A firm with one member and one project, written by the application's own role. */
const addFirm = async (name: string) => {
  const ids = { firm: randomUUID(), account: randomUUID(), project: randomUUID() }
  await app.query(`SELECT set_config('torfolio.firm', $1, false)`, [ids.firm])
  await app.query('INSERT INTO firm (id, name) VALUES ($1, $2)', [ids.firm, name])
  await app.query('INSERT INTO account (id, email, name) VALUES ($1, $2, $3)', [
    ids.account,
    `${ids.account}@example.test`,
    'Somebody',
  ])
  await app.query(`INSERT INTO membership (id, firm_id, account_id, role) VALUES ($1, $2, $3, 'engineer')`, [
    randomUUID(),
    ids.firm,
    ids.account,
  ])
  await app.query(`INSERT INTO project (id, firm_id, number, name) VALUES ($1, $2, 'P-1', 'Mill drive')`, [
    ids.project,
    ids.firm,
  ])
  return ids
}

let first: Awaited<ReturnType<typeof addFirm>>
let second: Awaited<ReturnType<typeof addFirm>>

beforeAll(async () => {
  database = await freshDatabase()
  app = await connect(database.appUrl)
  owner = await connect(database.ownerUrl)
  first = await addFirm('First')
  second = await addFirm('Second')
})

afterAll(async () => {
  await app?.end()
  await owner?.end()
  await database?.drop()
})

describe('the tables', () => {
  test('the migrations make exactly what the entities describe', async () => {
    const source: DataSource = createDataSource(database.ownerUrl)
    await source.initialize()
    try {
      const drift = await source.driver.createSchemaBuilder().log()
      expect(drift.upQueries.map((query) => query.query)).toEqual([])
    } finally {
      await source.destroy()
    }
  })

  test('a second run of the migrations does nothing', async () => {
    expect(await migrate(database.ownerUrl)).toEqual([])
  })

  test('the application owns no table and may not make one', async () => {
    const owned = await owner.query(
      `SELECT tablename FROM pg_tables WHERE schemaname = 'public' AND tableowner <> 'torfolio_owner'`,
    )
    expect(owned.rows).toEqual([])
    await expect(app.query('CREATE TABLE mine (id int)')).rejects.toThrow(/permission denied/)
  })

  test('neither role is above row-level security', async () => {
    const roles = await owner.query(
      `SELECT rolname FROM pg_roles WHERE rolname IN ('torfolio_app', 'torfolio_owner') AND (rolsuper OR rolbypassrls)`,
    )
    expect(roles.rows).toEqual([])
  })

  test('every table with a firm_id has forced row-level security', async () => {
    const open = await owner.query(`
      SELECT relname FROM pg_class JOIN pg_attribute ON attrelid = pg_class.oid
      WHERE relkind = 'r' AND attname = 'firm_id' AND NOT attisdropped
        AND NOT (relrowsecurity AND relforcerowsecurity)`)
    // A one-time link is looked up before its firm is known; only its digest is stored.
    expect(open.rows).toEqual([{ relname: 'token' }])
  })
})

describe('row-level security, asked directly as the application', () => {
  const asFirm = (id: string) => app.query(`SELECT set_config('torfolio.firm', $1, false)`, [id])

  test('without a firm no row below a firm is seen', async () => {
    await asFirm('')
    for (const table of ['firm', 'membership', 'project', 'calculation', 'audit_event'])
      expect((await app.query(`SELECT * FROM ${table}`)).rows).toEqual([])
  })

  test('a firm sees its own rows and none of another', async () => {
    await asFirm(first.firm)
    const projects = await app.query('SELECT id FROM project')
    expect(projects.rows).toEqual([{ id: first.project }])
    const others = await app.query('SELECT id FROM project WHERE id = $1', [second.project])
    expect(others.rows).toEqual([])
  })

  test("another firm's row can be neither changed nor written", async () => {
    await asFirm(first.firm)
    const changed = await app.query(`UPDATE project SET name = 'taken' WHERE id = $1`, [second.project])
    expect(changed.rowCount).toBe(0)
    await expect(
      app.query(`INSERT INTO project (id, firm_id, number, name) VALUES ($1, $2, 'P-2', 'x')`, [
        randomUUID(),
        second.firm,
      ]),
    ).rejects.toThrow(/row-level security/)
    await expect(
      app.query('UPDATE project SET firm_id = $1 WHERE id = $2', [second.firm, first.project]),
    ).rejects.toThrow(/row-level security/)
  })

  test("a row cannot refer to another firm's row", async () => {
    await asFirm(first.firm)
    await expect(
      app.query(
        `INSERT INTO calculation (id, firm_id, project_id, number, title, created_by)
         VALUES ($1, $2, $3, 'TF-9999', 'x', $4)`,
        [randomUUID(), first.firm, second.project, first.account],
      ),
    ).rejects.toThrow(/foreign key/)
  })

  test('a person without a firm sees the own memberships and their firms only', async () => {
    await asFirm('')
    await app.query(`SELECT set_config('torfolio.account', $1, false)`, [second.account])
    expect((await app.query('SELECT id FROM firm')).rows).toEqual([{ id: second.firm }])
    expect((await app.query('SELECT account_id FROM membership')).rows).toEqual([
      { account_id: second.account },
    ])
    expect((await app.query('SELECT id FROM project')).rows).toEqual([])
    await app.query(`SELECT set_config('torfolio.account', '', false)`)
  })
})

describe('the audit trail', () => {
  let event: string
  beforeAll(async () => {
    event = randomUUID()
    await app.query(`SELECT set_config('torfolio.firm', $1, false)`, [first.firm])
    await app.query(`INSERT INTO audit_event (id, firm_id, action) VALUES ($1, $2, 'project.create')`, [
      event,
      first.firm,
    ])
    await owner.query(`SELECT set_config('torfolio.firm', $1, false)`, [first.firm])
  })

  test('the application may add to it but neither change, delete nor empty it', async () => {
    await expect(app.query(`UPDATE audit_event SET action = 'x'`)).rejects.toThrow(/permission denied/)
    await expect(app.query('DELETE FROM audit_event')).rejects.toThrow(/permission denied/)
    await expect(app.query('TRUNCATE audit_event')).rejects.toThrow(/permission denied/)
  })

  test('triggers refuse the same to the owner of the tables', async () => {
    await owner.query('SELECT id FROM audit_event')
    await expect(owner.query(`TRUNCATE audit_event`)).rejects.toThrow(/kept as they were written/)
    await owner.query('BEGIN')
    await owner.query('ALTER TABLE audit_event NO FORCE ROW LEVEL SECURITY')
    await owner.query('SAVEPOINT before')
    await expect(owner.query(`UPDATE audit_event SET action = 'x'`)).rejects.toThrow(
      /kept as they were written/,
    )
    await owner.query('ROLLBACK TO before')
    await expect(owner.query('DELETE FROM audit_event')).rejects.toThrow(/kept as they were written/)
    await owner.query('ROLLBACK')
    const kept = await app.query('SELECT action FROM audit_event WHERE id = $1', [event])
    expect(kept.rows).toEqual([{ action: 'project.create' }])
  })
})
