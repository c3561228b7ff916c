/**
 * Sets a document in a press of its own. A press that takes too long or too much memory is killed, and
 * nothing else dies of it. How many run at once is for the caller to say.
 */
import type { ChildProcess } from 'node:child_process'
import type { PressAnswer, PressOrder } from './order'
import { typstProgram } from './program'
import { startPress } from './startPress'
import { watchMemory } from './watchMemory'

export type SetPages = Extract<PressAnswer, { is: 'pdf' }>

/** No pages were made; `message` is for the log. */
export class PressFailed extends Error {
  constructor(
    readonly reason: 'timeout' | 'memory' | 'fault',
    message: string,
  ) {
    super(message)
  }
}

export interface PressLimits {
  timeoutMs?: number
  memoryMb?: number
}

const HEAP_MB = 512

/** @throws {PressFailed} */
export const setPages = (order: Omit<PressOrder, 'program'>, limits: PressLimits = {}): Promise<SetPages> =>
  press({ ...order, program: typstProgram }, limits)

const press = (
  order: PressOrder,
  { timeoutMs = 60_000, memoryMb = 1024 }: PressLimits,
): Promise<SetPages> => {
  const child = startPress(HEAP_MB)
  let complaint = ''
  child.stderr?.on('data', (chunk: Buffer) => (complaint = (complaint + chunk.toString()).slice(-4000)))
  return new Promise<SetPages>((resolve, reject) => {
    const end = (reason: PressFailed['reason'], message: string) => {
      child.kill('SIGKILL')
      reject(new PressFailed(reason, message))
    }
    const timer = setTimeout(() => end('timeout', `The press took longer than ${timeoutMs} ms.`), timeoutMs)
    const memory = watchMemory(child.pid ?? 0, memoryMb, () =>
      end('memory', `The press needed more than ${memoryMb} MB.`),
    )
    child.once('message', (answer: PressAnswer) => {
      if (answer.is === 'pdf') resolve(answer)
      else reject(new PressFailed('fault', answer.reason))
    })
    child.once('error', (error) => end('fault', error.message))
    child.once('exit', (code, signal) => {
      clearTimeout(timer)
      memory.stop()
      reject(new PressFailed('fault', `The press ended without an answer (${code ?? signal}). ${complaint}`))
    })
    deliver(child, order, (message) => end('fault', message))
  })
}

/** A press that dies at once closes the channel under what is being sent. */
const deliver = (child: ChildProcess, order: PressOrder, failed: (message: string) => void): void => {
  child.send(order, (error) => {
    if (error) failed(error.message)
  })
}
