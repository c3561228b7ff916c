import type { AnalysisSpec, Changes, EngineLine, LineId } from '@shared/engine/contracts'
import type { DrawnFigure, Drawing, EngineAnswer, EngineRequest, ShownWorking, Trial } from './engineMessages'

/** What carries messages to the engine and back: a worker, or the engine itself in a test. */
export interface EngineChannel {
  send(request: EngineRequest): void
  listen(listener: (answer: EngineAnswer) => void): void
  close(): void
}

export interface EngineListener {
  results(answer: Extract<EngineAnswer, { answer: 'results' }>): void
  presentations(answer: Extract<EngineAnswer, { answer: 'presentations' }>): void
  fault(message: string): void
}

export interface EngineClient {
  /** Sends changes and answers their number; the results come to the listener under the same number. */
  apply(changes: Changes): number
  show(ids: LineId[]): void
  hide(ids: LineId[]): void
  try(line: EngineLine, after: LineId | null): Promise<Trial | null>
  draw(drawing: Drawing): Promise<DrawnFigure | null>
  working(id: LineId): Promise<ShownWorking | null>
  specs(): Promise<AnalysisSpec[]>
  close(): void
}

/** The worker of one sheet. */
export const workerChannel = (): EngineChannel => {
  const worker = new Worker(new URL('./engine.worker.ts', import.meta.url), { type: 'module' })
  return {
    send: (request) => worker.postMessage(request),
    listen: (listener) => {
      worker.onmessage = (event: MessageEvent<EngineAnswer>) => listener(event.data)
      worker.onerror = (event) => listener({ answer: 'fault', message: event.message })
    },
    close: () => worker.terminate(),
  }
}

export const createEngineClient = (channel: EngineChannel, listener: EngineListener): EngineClient => {
  let last = 0
  const waiting = new Map<number, (answer: EngineAnswer) => void>()

  const question = <T>(request: (number: number) => EngineRequest, read: (answer: EngineAnswer) => T) =>
    new Promise<T>((resolve) => {
      const number = ++last
      waiting.set(number, (answer) => resolve(read(answer)))
      channel.send(request(number))
    })

  channel.listen((answer) => {
    if (answer.answer === 'results') return listener.results(answer)
    if (answer.answer === 'presentations') return listener.presentations(answer)
    if (answer.answer === 'fault') return listener.fault(answer.message)
    waiting.get(answer.number)?.(answer)
    waiting.delete(answer.number)
  })

  return {
    apply: (changes) => {
      const number = ++last
      channel.send({ ask: 'apply', number, changes })
      return number
    },
    show: (ids) => channel.send({ ask: 'show', ids }),
    hide: (ids) => channel.send({ ask: 'hide', ids }),
    try: (line, after) =>
      question(
        (number) => ({ ask: 'try', number, after, line }),
        (answer) => (answer.answer === 'trial' ? answer.trial : null),
      ),
    draw: (drawing) =>
      question(
        (number) => ({ ask: 'draw', number, ...drawing }),
        (answer) => (answer.answer === 'figure' ? answer.figure : null),
      ),
    working: (id) =>
      question(
        (number) => ({ ask: 'working', number, id }),
        (answer) => (answer.answer === 'working' ? answer.working : null),
      ),
    specs: () =>
      question(
        (number) => ({ ask: 'specs', number }),
        (answer) => (answer.answer === 'specs' ? answer.specs : []),
      ),
    close: () => channel.close(),
  }
}
