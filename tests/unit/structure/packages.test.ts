/** Packages that are known in one place only: the linter refuses them elsewhere. */
import { ESLint } from 'eslint'
import { expect, test } from 'vitest'

const refuses = async (path: string, source: string): Promise<boolean> => {
  const [result] = await new ESLint().lintText(source, { filePath: path })
  return (result?.messages ?? []).some(({ ruleId }) => ruleId === '@typescript-eslint/no-restricted-imports')
}

test.each([
  ['mathjs', 'shared/sheet/x.ts', true],
  ['mathjs', 'src/workers/x.ts', true],
  ['mathjs', 'shared/engine/parse/x.ts', false],
  ['katex', 'src/components/sheet/x.ts', true],
  ['katex', 'src/editor/katex.ts', false],
  ['typeorm', 'server/services/x.ts', true],
  ['typeorm', 'server/entities/x.ts', false],
  ['express', 'server/services/x.ts', true],
  ['express', 'server/routes/x.ts', false],
])('%s in %s: refused is %s', async (name, path, refused) => {
  expect(await refuses(path, `import thing from '${name}'\nexport const it = thing\n`)).toBe(refused)
})
