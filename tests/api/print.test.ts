import { mkdtemp, rm, writeFile } from 'node:fs/promises'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { Client as PgClient } from 'pg'
import { afterAll, beforeAll, describe, expect, test } from 'vitest'
import { errorBody } from '@shared/api/problems'
import type { Calculation } from '@shared/api/calculations'
import { firmScope } from '@server/repositories/transaction'
import { printPages } from '@server/services/revisions/printPages'
import { factsOf, textOfPages } from '../support/printed'
import { startServer } from '../support/server'
import type { Client, PersonName, TestServer } from '../support/server'

const shaft = `---
torfolio: 1
title: Solid shaft
purpose: Sizes a solid round shaft.
method: Saint-Venant torsion of a round bar.
conclusion: The chosen diameter is not enough.
sources:
  drawings: { title: General arrangement, edition: rev. C }
---

# Givens

\`\`\`given
d = 60 mm -- outside diameter [drawings]
T = 800 N m -- torque [drawings]
\`\`\`

# Section

\`\`\`analysis yaml
- symbol: S1
  analysis: section
  inputs: { shape: solid-round, d_o: d, T: T }
\`\`\`

# Strength

\`\`\`formula
tau = 16*T/(pi*d^3) to MPa -- stress at the surface {reported=true}
\`\`\`

\`\`\`criterion
C1: tau <= 60 MPa -- strength
C2: tau <= 10 MPa -- stress range
\`\`\`
`

const faulty = `---
torfolio: 1
title: Faulty
---

# Lines

\`\`\`given
d = 60 mm
\`\`\`

\`\`\`formula
x = d + missing
\`\`\`
`

let office: TestServer
let engineer: Client
let folder: string
let made: Calculation
let pdf: Buffer
let pages: string[]

const revisionOf = ({ revisions }: Calculation): string => revisions[0]?.id ?? ''
const address = (calculation: Calculation, query = '') =>
  `/api/revisions/${revisionOf(calculation)}/pages.pdf${query}`

const print = (client: Client, calculation: Calculation, query = '') =>
  client
    .get(address(calculation, query))
    .buffer(true)
    .parse((response, done) => {
      const chunks: Buffer[] = []
      response.on('data', (chunk: Buffer) => chunks.push(chunk))
      response.on('end', () => done(null, Buffer.concat(chunks)))
    })

const fromTemplate = (template: string, title: string) =>
  office.addCalculation(engineer, { title, beginning: { kind: 'template', template, givens: {} } })

beforeAll(async () => {
  folder = await mkdtemp(join(tmpdir(), 'torfolio-print-templates-'))
  await writeFile(join(folder, 'shaft.md'), shaft)
  await writeFile(join(folder, 'faulty.md'), faulty)
  office = await startServer({ config: { templatesFolder: folder } })
  engineer = await office.signIn('engineer')
  made = await fromTemplate('shaft', 'Input shaft of the mill')
  const answer = await print(engineer, made).expect(200)
  expect(answer.headers['content-type']).toBe('application/pdf')
  expect(answer.headers['content-disposition']).toBe(`inline; filename="${made.number}-A.pdf"`)
  pdf = answer.body as Buffer
  pages = textOfPages(pdf)
}, 180_000)
afterAll(async () => {
  await office?.close()
  await rm(folder, { recursive: true })
})

describe('the printed sheet', () => {
  test('carries the title block on every page, with page x of y', () => {
    expect(pages.length).toBeGreaterThan(1)
    pages.forEach((page, index) => {
      expect(page).toContain('The first firm')
      expect(page).toContain(made.number)
      expect(page).toContain('Input shaft of the mill')
      expect(page).toContain('Mill drive')
      expect(page).toContain('A, preparing')
      expect(page).toContain('Edda Brandt')
      expect(page).toContain(`${index + 1} of ${pages.length}`)
      expect(page).toMatch(/Checked[\s\S]*not yet/)
    })
  })

  test('says on every page that it is preliminary, for what, by whom and when', () => {
    const day = new Intl.DateTimeFormat('en-GB', {
      timeZone: 'Europe/Stockholm',
      day: 'numeric',
      month: 'long',
      year: 'numeric',
    }).format(new Date())
    for (const page of pages)
      expect(page).toContain(`PRELIMINARY – NOT ISSUED · for preparation and review · Edda Brandt · ${day}`)
  })

  test('shows purpose, method, values, verdicts, conclusion and nomenclature', () => {
    const text = pages.join('\n')
    for (const words of [
      'Sizes a solid round shaft.',
      'Saint-Venant torsion of a round bar.',
      'The chosen diameter is not enough.',
      'Nomenclature',
      'outside diameter',
      'General arrangement',
      'Assumptions and defaults',
      'A satisfied criterion is not by itself a safe design.',
      'Torfolio 0.0.0-test',
    ])
      expect(text).toContain(words)
    // 16·800 N·m/(π·(60 mm)³) = 18.86 MPa by hand.
    expect(text).toContain('18.9 MPa')
    expect(text).toMatch(/not satisfied +.*utilisation 1\.89/)
    expect(text).toMatch(/satisfied +.*utilisation 0\.314/)
    expect(text).toContain('1 criterion is not satisfied: line 3.3.')
    // π·(60 mm)⁴/32 = 1.272·10⁶ mm⁴ by hand.
    expect(text).toMatch(/torsion constant 1\.27 ?× ?10\s?6 ?mm/)
  })

  test('is A4 unless Letter is asked for, and names the firm as its author', async () => {
    expect(factsOf(pdf)).toMatch(/Page size: +595\.\d+ x 841\.\d+ pts \(A4\)/)
    expect(factsOf(pdf)).toMatch(/Author: +The first firm/)
    const letter = await print(engineer, made, '?paper=Letter&purpose=for the shop').expect(200)
    expect(factsOf(letter.body as Buffer)).toContain('612 x 792 pts (letter)')
    expect(textOfPages(letter.body as Buffer)[0]).toContain('NOT ISSUED · for the shop · Edda Brandt')
  }, 120_000)

  test('of the same sheet at the same moment is the same, byte for byte', async () => {
    const { id, firmId, role } = office.people.engineer
    const scope = firmScope(office.server.dataSource, { firmId, accountId: id, role })
    const once = () =>
      printPages(scope, revisionOf(made), {
        paper: 'A4',
        purpose: '',
        at: new Date('2026-12-01T12:00:00Z'),
        version: '1',
      })
    const first = await once()
    const second = await once()
    expect(Buffer.from(first.pdf).equals(Buffer.from(second.pdf))).toBe(true)
  }, 120_000)

  test('with errors in the sheet is printed all the same, and says so at the top', async () => {
    const printed = await print(engineer, await fromTemplate('faulty', 'Faulty shaft')).expect(200)
    const [first = ''] = textOfPages(printed.body as Buffer)
    expect(first).toContain('This sheet has 1 error. Values that depend on them are missing.')
    expect(first).toContain('1 line has no value: line 1.2.')
    expect(first).toMatch(/Error: .*missing/)
  }, 120_000)
})

describe('who may print', () => {
  test.each<[PersonName, number, string]>([
    ['colleague', 200, ''],
    ['observer', 404, 'not-found'],
    ['stranger', 404, 'not-found'],
  ])(
    '%s: %i',
    async (person, status, code) => {
      const client = await office.signIn(person)
      const answer = await client.get(address(made)).expect(status)
      if (status !== 200) expect(errorBody.parse(answer.body).error.code).toBe(code)
    },
    120_000,
  )

  test('nobody without signing in', async () => {
    const answer = await office.anonymous().get(address(made)).expect(401)
    expect(errorBody.parse(answer.body).error.code).toBe('not-signed-in')
  })

  test('an observer who is invited', async () => {
    const { id } = office.people.observer
    await engineer
      .post(`/api/calculations/${made.id}/participations`)
      .send({ accountId: id, part: 'observer' })
      .expect(201)
    await print(await office.signIn('observer'), made).expect(200)
  }, 120_000)
})

describe('what cannot be printed', () => {
  test('more than one person needs: refused before anything is computed, and nobody else waits for it', async () => {
    const { id } = office.people.engineer
    const key = `print:${id}`
    const sql = new PgClient({ connectionString: office.database.appUrl })
    await sql.connect()
    await sql.query(
      `INSERT INTO rate_window VALUES ($1, 100, now() + interval '1 minute')
       ON CONFLICT (key) DO UPDATE SET hits = 100`,
      [key],
    )
    const answer = await engineer.get(address(made)).expect(429)
    expect(errorBody.parse(answer.body).error.message).toMatch(/100 prints/)
    await sql.query('DELETE FROM rate_window WHERE key = $1', [key])
    await sql.end()
  })

  test('many prints of one person at once: a few are made, the others told to come later', async () => {
    const answers = await Promise.all(Array.from({ length: 7 }, () => engineer.get(address(made))))
    const statuses = answers.map((answer) => answer.status).sort()
    expect(statuses).toEqual([200, 200, 200, 200, 503, 503, 503])
  }, 120_000)

  test.each(['?paper=A3', `?purpose=${'x'.repeat(121)}`])('%s is refused at its field', async (query) => {
    const answer = await engineer.get(address(made, query)).expect(400)
    expect(errorBody.parse(answer.body).error.fields).toHaveLength(1)
  })

  test('a sheet that takes the press too long is refused in words; the server goes on', async () => {
    const { id, firmId, role } = office.people.engineer
    const scope = firmScope(office.server.dataSource, { firmId, accountId: id, role })
    const wanted = { paper: 'A4', purpose: '', at: new Date(), version: '1' } as const
    await expect(printPages(scope, revisionOf(made), wanted, { timeoutMs: 1 })).rejects.toMatchObject({
      code: 'unusable',
      message: expect.stringContaining('too large to print') as unknown,
    })
    await engineer.get('/api/health').expect(200)
  }, 120_000)
})
