/** A process of its own with nothing but collaboration, for tests that kill it. Prints its port. */
import type { AddressInfo } from 'node:net'
import { startProcess } from './process'

const started = await startProcess(String(process.argv[2]))
const { port } = started.server.address() as AddressInfo
process.stdout.write(`${port}\n`)
