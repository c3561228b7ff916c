/**
 * Evaluates a sheet beside the server's own thread, which never waits for a person's formula: a sheet
 * that takes too long, or too much memory, costs its thread and nothing else.
 */
import { existsSync } from 'node:fs'
import { fileURLToPath } from 'node:url'
import { Worker } from 'node:worker_threads'
import type { Sheet } from '@shared/sheet/sheet'
import type { EvaluationRequest, SheetEvaluation } from './messages'

/** The sheet was not evaluated; `reason` can be shown to people. */
export class EvaluationFailed extends Error {
  constructor(
    readonly reason: 'timeout' | 'memory' | 'fault',
    message: string,
  ) {
    super(message)
  }
}

export interface EvaluationOptions {
  timeoutMs?: number
  memoryMb?: number
  present?: boolean
}

export const evaluateInWorker = (sheet: Sheet, options: EvaluationOptions = {}): Promise<SheetEvaluation> => {
  const { timeoutMs = 20_000, memoryMb = 512, present = false } = options
  const request: EvaluationRequest = { sheet, present }
  const worker = startWorker(request, memoryMb)
  return new Promise<SheetEvaluation>((resolve, reject) => {
    const timer = setTimeout(() => {
      reject(new EvaluationFailed('timeout', `The sheet took longer than ${timeoutMs / 1000} s to evaluate.`))
    }, timeoutMs)
    worker.once('message', resolve)
    worker.once('error', (error) => reject(failureOf(error)))
    worker.once('exit', (code) => {
      clearTimeout(timer)
      reject(new EvaluationFailed('fault', `The evaluation ended without an answer (${code}).`))
    })
  }).finally(() => worker.terminate())
}

const failureOf = (error: Error): EvaluationFailed =>
  Reflect.get(error, 'code') === 'ERR_WORKER_OUT_OF_MEMORY'
    ? new EvaluationFailed('memory', 'The sheet needs too much memory to evaluate.')
    : new EvaluationFailed('fault', `The sheet could not be evaluated: ${error.message}`)

/** In the built server the thread's program lies beside the entry; in development it is TypeScript. */
const startWorker = (workerData: EvaluationRequest, memoryMb: number): Worker => {
  const resourceLimits = { maxOldGenerationSizeMb: memoryMb }
  // Beside this module, or one folder up where the bundler has put it into a chunk.
  const built = ['./evaluationWorker.js', '../evaluationWorker.js']
    .map((path) => new URL(path, import.meta.url))
    .find((path) => existsSync(fileURLToPath(path)))
  if (built) return new Worker(built, { workerData, resourceLimits })
  const source = new URL('./worker.ts', import.meta.url)
  return new Worker(developmentProgram(source), { eval: true, workerData, resourceLimits })
}

/** Threads do not inherit the loader that reads TypeScript: it is registered first. */
const developmentProgram = (source: URL): string =>
  `import('tsx/esm/api').then(({ register }) => { register(); return import(${JSON.stringify(source.href)}) })`
