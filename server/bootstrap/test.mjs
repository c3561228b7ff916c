/**
 * `npm test`: from a bare clone to a verdict. Installs what the tests need, then lint, types, build and all
 * tests; ends with the line `N passed, N failed`. `--long` runs the long forms of fuzz, faults and soak.
 */
import { spawnSync } from 'node:child_process'
import { existsSync, mkdirSync, readFileSync, rmSync } from 'node:fs'
import { join } from 'node:path'
import { buildWhenStale } from './build.mjs'
import { checkNode, installDebianPackages, installPackages, root, say, withMessages } from './machine.mjs'
import { ensurePrograms } from './postgres.mjs'

const long = process.argv.includes('--long')
const files = process.argv.slice(2).filter((argument) => argument !== '--long')
const report = join(root, '.artefacts/tests.json')

/** A step that counts as one check: its output is shown, its failure does not keep the others from running. */
function check(title, command, args) {
  say(`\n— ${title}`)
  return spawnSync(command, args, { cwd: root, stdio: 'inherit' }).status === 0
}

function runTests() {
  mkdirSync(join(root, '.artefacts'), { recursive: true })
  rmSync(report, { force: true })
  const reporters = ['--reporter=dot', '--reporter=json', `--outputFile.json=${report}`]
  const outcome = spawnSync('npx', ['vitest', 'run', ...reporters, ...files], {
    cwd: root,
    stdio: 'inherit',
    env: { ...process.env, TORFOLIO_TEST_LONG: long ? 'on' : '' },
  })
  if (!existsSync(report)) return { passed: 0, failed: 1, skipped: 0 }
  const counts = JSON.parse(readFileSync(report, 'utf8'))
  // A file that cannot be loaded has no tests to fail, and an error outside of any test fails the run.
  const brokenFiles = counts.testResults.filter(
    (file) => file.status === 'failed' && file.assertionResults.length === 0,
  )
  const failed = counts.numFailedTests + brokenFiles.length
  return {
    passed: counts.numPassedTests,
    failed: failed === 0 && outcome.status !== 0 ? 1 : failed,
    skipped: counts.numPendingTests + counts.numTodoTests,
  }
}

await withMessages(async () => {
  checkNode()
  installPackages()
  ensurePrograms()
  installDebianPackages(['chromium', 'fonts-dejavu-core', 'poppler-utils'])
  const steps = [
    check('lint', 'npm', ['run', '--silent', 'lint']),
    check('types', 'npm', ['run', '--silent', 'typecheck']),
  ]
  buildWhenStale()
  say('\n— tests')
  const tests = runTests()
  const passed = tests.passed + steps.filter(Boolean).length
  const failed = tests.failed + steps.filter((ok) => !ok).length
  const skipped = tests.skipped > 0 ? `, ${tests.skipped} skipped` : ''
  console.log(`\n${passed} passed, ${failed} failed${skipped}`)
  if (failed > 0) process.exitCode = 1
})
