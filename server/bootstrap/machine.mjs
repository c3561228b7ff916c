/**
 * What the machine must have before anything of ours can run: Node, the packages of the lock file, and
 * Debian's packages. Plain Node without dependencies, as it runs before anything is installed.
 */
import { spawnSync } from 'node:child_process'
import { existsSync, statSync } from 'node:fs'
import { dirname, join } from 'node:path'
import { fileURLToPath } from 'node:url'

export const root = join(dirname(fileURLToPath(import.meta.url)), '../..')
export const isRoot = process.getuid?.() === 0

/** Ends the process with a message that says what to do. */
export class SetupError extends Error {}

export const say = (line) => console.log(line)

/** Runs a command in the clone with its output on our terminal; throws SetupError where it fails. */
export function run(command, args, options = {}) {
  const outcome = spawnSync(command, args, { cwd: root, stdio: 'inherit', ...options })
  if (outcome.error) throw new SetupError(`${command} could not be started: ${outcome.error.message}`)
  if (outcome.status !== 0)
    throw new SetupError(`${command} ${args.join(' ')} ended with code ${outcome.status}.`)
}

export function checkNode() {
  const [major = 0, minor = 0] = process.versions.node.split('.').map(Number)
  if (major < 20 || (major === 20 && minor < 19)) {
    throw new SetupError(`Torfolio needs Node.js 20.19 or newer; this is ${process.versions.node}.`)
  }
}

const modified = (path) => (existsSync(path) ? statSync(path).mtimeMs : 0)

/** `npm ci` when node_modules is missing or older than the lock. */
export function installPackages() {
  const installed = modified(join(root, 'node_modules/.package-lock.json'))
  if (installed >= modified(join(root, 'package-lock.json')) && installed > 0) return
  say('Installing packages (npm ci) …')
  run('npm', ['ci', '--no-audit', '--no-fund', '--loglevel=error'])
}

const isInstalled = (name) =>
  spawnSync('dpkg-query', ['-W', '-f=${db:Status-Status}', name], { encoding: 'utf8' }).stdout === 'installed'

let listsAreFresh = false

/**
 * Installs those of Debian's packages that are missing.
 * @param names Debian package names
 * @throws SetupError with the one command to run, where this user may not install
 */
export function installDebianPackages(names) {
  const missing = names.filter((name) => !isInstalled(name))
  if (missing.length === 0) return
  const command = `apt-get install -y --no-install-recommends ${missing.join(' ')}`
  const sudo = isRoot ? [] : ['sudo', '-n']
  const maySudo = isRoot || spawnSync('sudo', ['-n', 'true'], { stdio: 'ignore' }).status === 0
  if (!maySudo || spawnSync('apt-get', ['--version'], { stdio: 'ignore' }).status !== 0) {
    throw new SetupError(`Please install ${missing.join(', ')} and start again:\n\n  sudo ${command}\n`)
  }
  say(`Installing ${missing.join(', ')} …`)
  const apt = (...args) => {
    const [program, ...rest] = [...sudo, 'apt-get', ...args]
    run(program, rest, {
      stdio: ['ignore', 'ignore', 'inherit'],
      env: { ...process.env, DEBIAN_FRONTEND: 'noninteractive' },
    })
  }
  if (!listsAreFresh) apt('update', '-q')
  listsAreFresh = true
  apt('install', '-y', '-q', '--no-install-recommends', ...missing)
}

/** Runs `main` and turns a SetupError into a message and exit code 1. */
export async function withMessages(main) {
  try {
    await main()
  } catch (error) {
    if (!(error instanceof SetupError)) throw error
    console.error(`\n${error.message}`)
    process.exitCode = 1
  }
}
