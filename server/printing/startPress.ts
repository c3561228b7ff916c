/** Starts a press process: the built program beside the server's, or the TypeScript source in development. */
import { fork, type ChildProcess } from 'node:child_process'
import { existsSync } from 'node:fs'
import { createRequire } from 'node:module'
import { fileURLToPath, pathToFileURL } from 'node:url'

/** Beside the entry, or one folder up where this module is in a chunk of the bundle. */
const built = ['./press.js', '../press.js'].map((path) => fileURLToPath(new URL(path, import.meta.url)))

const development = () => ({
  path: fileURLToPath(new URL('./press.ts', import.meta.url)),
  execArgv: ['--import', pathToFileURL(createRequire(import.meta.url).resolve('tsx')).href],
})

/** Its heap is bounded here; what Typst itself takes is watched by `watchMemory`. */
export const startPress = (heapMb: number): ChildProcess => {
  const path = built.find((one) => existsSync(one))
  const { path: program, execArgv } = path === undefined ? development() : { path, execArgv: [] }
  return fork(program, [], {
    execArgv: [...execArgv, `--max-old-space-size=${heapMb}`],
    serialization: 'advanced',
    stdio: ['ignore', 'ignore', 'pipe', 'ipc'],
    // Nothing of the server's settings: a press knows no database and no secret.
    env: { PATH: process.env.PATH, TZ: 'UTC', NODE_ENV: process.env.NODE_ENV },
  })
}
