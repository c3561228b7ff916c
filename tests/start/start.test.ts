/** `npm start` as a newcomer meets it: real processes, a real cluster, the built program. */
import { spawn, type ChildProcess } from 'node:child_process'
import { chmodSync, mkdtempSync, rmSync } from 'node:fs'
import { createServer, type AddressInfo } from 'node:net'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { afterAll, expect, test } from 'vitest'

const folder = mkdtempSync(join(tmpdir(), 'torfolio-start-'))
// As root, the cluster runs as `postgres`, which must be able to enter.
chmodSync(folder, 0o755)
afterAll(() => rmSync(folder, { recursive: true, force: true }))

const freePort = (): Promise<number> =>
  new Promise((resolve) => {
    const probe = createServer().listen(0, '127.0.0.1', () => {
      const { port } = probe.address() as AddressInfo
      probe.close(() => resolve(port))
    })
  })

interface Started {
  process: ChildProcess
  output(): string
  ended: Promise<number | null>
}

const start = (port: number, flags: string[] = [], environment: NodeJS.ProcessEnv = {}): Started => {
  const child = spawn(process.execPath, ['server/bootstrap/start.mjs', ...flags], {
    env: { ...process.env, PORT: String(port), TORFOLIO_DATA: folder, ...environment },
    stdio: ['ignore', 'pipe', 'pipe'],
  })
  let output = ''
  child.stdout.on('data', (chunk: Buffer) => (output += chunk.toString()))
  child.stderr.on('data', (chunk: Buffer) => (output += chunk.toString()))
  return {
    process: child,
    output: () => output,
    ended: new Promise((resolve) => child.once('exit', resolve)),
  }
}

const untilReady = async (started: Started): Promise<void> => {
  const last = Date.now() + 60_000
  while (!started.output().includes('Ctrl-C stops it')) {
    if (Date.now() > last || started.process.exitCode !== null) throw new Error(started.output())
    await new Promise((wake) => setTimeout(wake, 50))
  }
}

const health = (port: number): Promise<unknown> =>
  fetch(`http://127.0.0.1:${port}/api/health`).then((answer) => answer.json())

test('a first start makes the database and the demo, a second one keeps them, Ctrl-C stops everything', async () => {
  const port = await freePort()
  const first = start(port)
  await untilReady(first)
  expect(await health(port)).toMatchObject({ status: 'ok' })
  expect(first.output()).toContain(`Torfolio is ready at http://127.0.0.1:${port}`)
  expect(first.output()).toMatch(/administrator/)
  first.process.kill('SIGINT')
  expect(await first.ended).toBe(0)
  await expect(health(port)).rejects.toThrow()

  const began = Date.now()
  const second = start(port)
  await untilReady(second)
  expect(Date.now() - began).toBeLessThan(30_000)
  expect(await health(port)).toMatchObject({ status: 'ok' })

  const third = start(port)
  expect(await third.ended).toBe(1)
  expect(third.output()).toContain(`Port ${port} on 127.0.0.1 is taken`)
  expect(third.output()).toContain(`PORT=${port + 1} npm start`)
  expect(await health(port)).toMatchObject({ status: 'ok' })

  second.process.kill('SIGTERM')
  expect(await second.ended).toBe(0)
}, 180_000)

test.each([
  ['PORT=90000 is no port', { PORT: '90000' }],
  ['Browsers refuse to open port 4190', { PORT: '4190' }],
  ['HOST=203.0.113.9 is not an address of this machine', { HOST: '203.0.113.9' }],
])('settings that cannot be used are said: %s', async (message, environment) => {
  const refused = start(await freePort(), [], environment)
  expect(await refused.ended).toBe(1)
  expect(refused.output()).toContain(message)
})

test('a database that does not answer is named, and nothing is left running', async () => {
  const refused = start(await freePort(), [], { DATABASE_URL: 'postgresql://nobody:x@127.0.0.1:1/nothing' })
  expect(await refused.ended).toBe(1)
  expect(refused.output()).toContain('The database of DATABASE_URL at 127.0.0.1:1 cannot be used')
})
