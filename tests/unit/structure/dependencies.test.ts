/** The rules of `.dependency-cruiser.cjs` bite: each of these imports is refused, and the tree's own pass. */
import { mkdirSync, mkdtempSync, rmSync, writeFileSync } from 'node:fs'
import { createRequire } from 'node:module'
import { tmpdir } from 'node:os'
import { dirname, join } from 'node:path'
import { cruise, type ICruiseOptions, type ICruiseResult } from 'dependency-cruiser'
import { afterEach, expect, test } from 'vitest'

const configuration = createRequire(import.meta.url)('../../../.dependency-cruiser.cjs') as {
  forbidden: object[]
  options: object
}

let folder = ''
afterEach(() => rmSync(folder, { recursive: true, force: true }))

const violations = async (files: Record<string, string>): Promise<string[]> => {
  folder = mkdtempSync(join(tmpdir(), 'torfolio-rules-'))
  for (const [path, text] of Object.entries(files)) {
    mkdirSync(dirname(join(folder, path)), { recursive: true })
    writeFileSync(join(folder, path), text)
  }
  const top = [...new Set(Object.keys(files).map((path) => path.split('/')[0] ?? ''))]
  const result = await cruise(top, {
    ...configuration.options,
    tsConfig: undefined,
    baseDir: folder,
    validate: true,
    ruleSet: { forbidden: configuration.forbidden },
  } as unknown as ICruiseOptions)
  return (result.output as ICruiseResult).summary.violations.map((violation) => violation.rule.name)
}

const empty = 'export const nothing = 0\n'
const importing = (path: string) => `import { nothing } from '${path}'\nexport const copy = nothing\n`

test.each([
  ['shared never imports the client', 'shared/engine/a.ts', '../../src/b', 'src/b.ts', 'shared-stands-alone'],
  [
    'shared never imports the server',
    'shared/sheet/a.ts',
    '../../server/b',
    'server/b.ts',
    'shared-stands-alone',
  ],
  [
    'the client never imports the server',
    'src/a.ts',
    '../server/b',
    'server/b.ts',
    'client-apart-from-server',
  ],
  ['the server never imports the client', 'server/a.ts', '../src/b', 'src/b.ts', 'server-apart-from-client'],
  ['the engine knows no sheet', 'shared/engine/a.ts', '../sheet/b', 'shared/sheet/b.ts', 'shared-engine'],
  [
    'numerics know no mechanics',
    'shared/numerics/a.ts',
    '../mechanics/b',
    'shared/mechanics/b.ts',
    'shared-numerics',
  ],
  [
    'mechanics know no analysis',
    'shared/mechanics/a.ts',
    '../analyses/b',
    'shared/analyses/b.ts',
    'shared-mechanics',
  ],
  [
    'analyses know no parser',
    'shared/analyses/a.ts',
    '../engine/parse/b',
    'shared/engine/parse/b.ts',
    'shared-analyses',
  ],
  [
    'a sheet knows no evaluation',
    'shared/sheet/a.ts',
    '../engine/evaluate/b',
    'shared/engine/evaluate/b.ts',
    'shared-sheet',
  ],
  ['review knows no engine', 'shared/review/a.ts', '../engine/b', 'shared/engine/b.ts', 'shared-review'],
  [
    'nobody below knows the pipeline',
    'shared/sheet/a.ts',
    '../pipeline/b',
    'shared/pipeline/b.ts',
    'pipeline-is-above',
  ],
  [
    'a repository calls no service',
    'server/repositories/a.ts',
    '../services/b',
    'server/services/b.ts',
    'repositories-know-entities',
  ],
  [
    'a service calls no route',
    'server/services/a.ts',
    '../routes/b',
    'server/routes/b.ts',
    'services-call-no-route',
  ],
  [
    'a route reaches no repository',
    'server/routes/a.ts',
    '../repositories/b',
    'server/repositories/b.ts',
    'routes-ask-services',
  ],
  [
    'a component knows no view',
    'src/components/a.ts',
    '../views/b',
    'src/views/b.ts',
    'components-know-no-view',
  ],
  ['the API client is last', 'src/api/a.ts', '../stores/b', 'src/stores/b.ts', 'api-is-last'],
])('%s', async (_rule, importer, path, imported, name) => {
  expect(await violations({ [importer]: importing(path), [imported]: empty })).toContain(name)
})

test('an import cycle is refused', async () => {
  const found = await violations({
    'shared/sheet/a.ts': importing('./b'),
    'shared/sheet/b.ts': `import { copy } from './a'\nexport const nothing = () => copy\n`,
  })
  expect(found).toContain('no-cycle')
})

test('what the rules allow passes', async () => {
  const found = await violations({
    'shared/analyses/a.ts': importing('../mechanics/b'),
    'shared/mechanics/b.ts': `import { zero } from '../numerics/c'\nexport const nothing = zero\n`,
    'shared/numerics/c.ts': 'export const zero = 0\n',
    'server/services/a.ts': importing('../repositories/b'),
    'server/repositories/b.ts': empty,
  })
  expect(found).toEqual([])
})
