/** Builds client and server when any of their sources is newer than the last build. */
import { existsSync, readdirSync, statSync, writeFileSync } from 'node:fs'
import { join } from 'node:path'
import { root, run, say } from './machine.mjs'

const SOURCES = ['src', 'shared', 'server', 'templates', 'index.html', 'package-lock.json', 'tsconfig.json']
const CONFIGURATION = ['vite.config.ts', 'vite.server.config.ts']
const stamp = join(root, 'dist/built')

const newest = (path) => {
  if (!existsSync(path)) return 0
  const state = statSync(path)
  if (!state.isDirectory()) return state.mtimeMs
  // A folder's own time counts too: it changes when a file in it is removed.
  return readdirSync(path).reduce((latest, name) => Math.max(latest, newest(join(path, name))), state.mtimeMs)
}

export function buildWhenStale() {
  const built = existsSync(stamp) ? statSync(stamp).mtimeMs : 0
  if ([...SOURCES, ...CONFIGURATION].every((path) => newest(join(root, path)) <= built)) return
  const began = Date.now()
  say('Building client and server …')
  for (const part of ['build:client', 'build:server'])
    run('npm', ['run', '--silent', part, '--', '--logLevel', 'error'])
  writeFileSync(stamp, '')
  say(`Built in ${((Date.now() - began) / 1000).toFixed(0)} s.`)
}
