/**
 * `npm run bench`: ratios against named baselines, measured in one run. It prints a table and never
 * fails: a loaded machine is no defect. What is measured is built first, as for production: the loader
 * that runs TypeScript directly gives every function that is made at run time a name of its own, which
 * costs closures several times their worth. Words after `--` choose rows by a part of their text.
 */
import { spawnSync } from 'node:child_process'
import { fileURLToPath } from 'node:url'
import { build } from 'vite'

const path = (relative: string): string => fileURLToPath(new URL(relative, import.meta.url))
const outDir = path('../../node_modules/.cache/bench')

await build({
  configFile: false,
  logLevel: 'error',
  root: path('../..'),
  resolve: { alias: { '@shared': path('../../shared'), '@server': path('../../server') } },
  build: {
    ssr: path('./table.ts'),
    target: 'node20',
    outDir,
    emptyOutDir: true,
    rolldownOptions: { output: { entryFileNames: 'table.mjs' } },
  },
})
spawnSync(process.execPath, [`${outDir}/table.mjs`, ...process.argv.slice(2)], { stdio: 'inherit' })
