import { mkdtemp, rm, writeFile } from 'node:fs/promises'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { afterAll, beforeAll, describe, expect, test } from 'vitest'
import { revision } from '@shared/api/revisions'
import { template, templateList } from '@shared/api/templates'
import { readStoredSheet } from '@server/services/calculations/storedSheet'
import { firmScope, inTransaction } from '@server/repositories/transaction'
import type { Line } from '@shared/sheet/kinds'
import { startServer } from '../support/server'
import type { Client, TestServer } from '../support/server'

const shaft = `---
torfolio: 1
title: Solid shaft
purpose: Size a solid round shaft.
method: Saint-Venant
template:
  name: solid-shaft
  edition: "3"
---

# Givens

\`\`\`given
d = 40 mm -- diameter [drawing]
T = 800 N m -- torque
\`\`\`

\`\`\`given yaml
- symbol: G
  value: "80"
  unit: GPa
  note: shear modulus
  range: { from: "60", to: "85" }
\`\`\`

\`\`\`formula
tau = 16*T/(pi*d^3) to MPa -- surface shear stress [Saint-Venant]
\`\`\`

\`\`\`criterion
C1: tau <= 60 MPa -- shear strength
\`\`\`
`

let office: TestServer
let engineer: Client
let folder: string

beforeAll(async () => {
  folder = await mkdtemp(join(tmpdir(), 'torfolio-templates-'))
  await writeFile(join(folder, 'solid-shaft.md'), shaft)
  await writeFile(join(folder, 'broken.md'), '---\ntorfolio: 99\n---\n')
  await writeFile(join(folder, 'notes.txt'), 'not a template')
  office = await startServer({ config: { templatesFolder: folder } })
  engineer = await office.signIn('engineer')
})
afterAll(async () => {
  await office?.close()
  await rm(folder, { recursive: true, force: true })
})

/** The lines of a calculation as they are stored. */
const linesOf = async (revisionId: string | undefined): Promise<Line[]> => {
  const { firmId, id, role } = office.people.engineer
  const scope = firmScope(office.server.dataSource, { firmId, accountId: id, role })
  const { sheet } = await inTransaction(scope, (tx) => readStoredSheet(tx, revisionId ?? ''))
  return sheet.blocks.flatMap((block) => (block.type === 'line' ? [block.line] : []))
}

const use = async (givens: Record<string, string>) => {
  const project = await office.addProject(engineer)
  return engineer.post('/api/calculations').send({
    projectId: project.id,
    title: 'From a template',
    beginning: { kind: 'template', template: 'solid-shaft', givens },
  })
}

describe('the template library', () => {
  test('lists what can be read; a broken file hides no other', async () => {
    const { templates } = templateList.parse((await engineer.get('/api/templates').expect(200)).body)
    expect(templates).toEqual([
      {
        name: 'solid-shaft',
        title: 'Solid shaft',
        edition: '3',
        purpose: 'Size a solid round shaft.',
        method: 'Saint-Venant',
        unitSystem: 'SI',
        lines: 5,
        criteria: 1,
      },
    ])
  })

  test('shows one with the form of its givens', async () => {
    const shown = template.parse((await engineer.get('/api/templates/solid-shaft').expect(200)).body)
    expect(shown.givens.map(({ symbol, value, unit }) => `${symbol} = ${value} ${unit}`)).toEqual([
      'd = 40 mm',
      'T = 800 N m',
      'G = 80 GPa',
    ])
    expect(shown.givens[2]?.range).toEqual({ from: '60', to: '85' })
    await engineer.get('/api/templates/not-there').expect(404)
    await engineer.get('/api/templates/..%2Fpackage').expect(404)
  })

  test('is not for observers', async () => {
    const observer = await office.signIn('observer')
    await observer.get('/api/templates').expect(403)
    await observer.get('/api/templates/solid-shaft').expect(403)
  })
})

describe('using a template', () => {
  test('fills its givens; every line knows where it came from', async () => {
    const answer = (await use({ d: '55 mm', T: ' 1.2e3 ' })) as {
      status: number
      body: { revisions: { id: string }[] }
    }
    expect(answer.status).toBe(201)
    const lines = await linesOf(answer.body.revisions[0]?.id)
    expect(lines).toMatchObject([
      { symbol: 'd', value: '55', unit: 'mm', note: 'diameter' },
      { symbol: 'T', value: '1.2e3', unit: 'N m' },
      { symbol: 'G', value: '80', unit: 'GPa' },
      { symbol: 'tau', kind: 'formula' },
      { symbol: 'C1', kind: 'criterion' },
    ])
    for (const line of lines)
      expect(line.origin).toEqual({ template: 'solid-shaft', edition: '3', line: line.symbol })
  })

  test('makes its user the author of its lines', async () => {
    const answer = (await use({})) as { body: { revisions: { id: string }[] } }
    const id = answer.body.revisions[0]?.id
    expect(revision.parse((await engineer.get(`/api/revisions/${id}`)).body).document.head).toBe(1)
    const read = await engineer.get(`/api/revisions/${id}/history`).expect(200)
    expect(read.body.entries).toHaveLength(5)
    expect(read.body.entries[0].person.name).toBe('Edda Brandt')
  })

  test.each([
    [{ d: 'thick' }, 'givens.d', 'd needs a number and its unit, as 40 mm.'],
    [{ G: '90' }, 'givens.G', 'G must be at most 85 GPa.'],
    [{ G: '59.9 GPa' }, 'givens.G', 'G must be at least 60 GPa.'],
    [{ q: '1 mm' }, 'givens.q', 'The template has no given called q.'],
    [{ tau: '1 MPa' }, 'givens.tau', 'The template has no given called tau.'],
  ])('refuses %j at its field, and makes nothing', async (givens, path, message) => {
    const before = (await engineer.get('/api/calculations')).body.calculations.length
    const answer = await use(givens)
    expect(answer.status).toBe(422)
    expect(answer.body.error.fields).toEqual([{ path, message }])
    expect((await engineer.get('/api/calculations')).body.calculations).toHaveLength(before)
  })

  test('a template that is not there is not found', async () => {
    const project = await office.addProject(engineer)
    await engineer
      .post('/api/calculations')
      .send({ projectId: project.id, title: 'x', beginning: { kind: 'template', template: 'broken' } })
      .expect(404)
  })
})
