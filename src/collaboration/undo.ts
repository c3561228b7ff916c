/**
 * Undoing own steps across page, lines and front. A step whose line a colleague has changed since is
 * skipped; undoing changes fields, so the pens of its lines are taken first.
 */
import * as Y from 'yjs'
import { frontTexts, penOfFront } from '@shared/protocol'
import type { UndoOutcome } from './contracts'

export interface UndoOptions {
  doc: Y.Doc
  /** Origins of own steps; the editor binding's key must be among them, or page steps are not undone. */
  trackedOrigins: unknown[]
  takePens: (keys: string[]) => Promise<boolean>
  releasePens: (keys: string[]) => void
}

type StackItem = Y.UndoManager['undoStack'][number]

const keysOf = (step: StackItem): Set<string> => {
  const kept: unknown = step.meta.get('keys')
  if (kept instanceof Set) return kept as Set<string>
  const keys = new Set<string>()
  step.meta.set('keys', keys)
  return keys
}

/** Lines and front texts that a transaction changed. */
const changedKeys = (transaction: Y.Transaction, doc: Y.Doc): Set<string> => {
  const keys = new Set<string>()
  // Yjs types this map's keys by their own events; a map of ours is one of them.
  const events = (part: string): Y.YEvent<Y.AbstractType<unknown>>[] =>
    [...transaction.changedParentTypes].flatMap(([type, list]) => (type === doc.share.get(part) ? list : []))
  for (const event of events('lines')) {
    const [id] = event.path
    if (id !== undefined) keys.add(String(id))
    else if (event instanceof Y.YMapEvent) for (const key of event.keysChanged) keys.add(String(key))
  }
  for (const event of events('front'))
    if (event instanceof Y.YMapEvent)
      for (const key of event.keysChanged)
        if ((frontTexts as readonly unknown[]).includes(key)) keys.add(penOfFront(String(key)))
  return keys
}

export class Undo {
  readonly manager: Y.UndoManager
  readonly #options: UndoOptions
  readonly #tracked: Set<unknown>

  constructor(options: UndoOptions) {
    this.#options = options
    const { doc } = options
    this.#tracked = new Set(options.trackedOrigins)
    this.manager = new Y.UndoManager([doc.getXmlFragment('page'), doc.getMap('lines'), doc.getMap('front')], {
      trackedOrigins: new Set(options.trackedOrigins),
      captureTimeout: 500,
    })
    doc.on('afterTransaction', this.#watch)
  }

  readonly #watch = (transaction: Y.Transaction): void => {
    const { origin } = transaction
    const isOwn = this.#tracked.has(origin) || origin === this.manager
    const keys = changedKeys(transaction, this.#options.doc)
    if (keys.size === 0) return
    const steps = [...this.manager.undoStack, ...this.manager.redoStack]
    if (isOwn) {
      // The manager has made or extended its newest step by now, as it listens since before.
      const stack = this.manager.undoing ? this.manager.redoStack : this.manager.undoStack
      const newest = stack[stack.length - 1]
      if (newest !== undefined) for (const key of keys) keysOf(newest).add(key)
      return
    }
    for (const step of steps)
      if ([...keysOf(step)].some((key) => keys.has(key))) step.meta.set('overtaken', true)
  }

  undo(): Promise<UndoOutcome> {
    return this.#step(this.manager.undoStack, () => this.manager.undo())
  }

  redo(): Promise<UndoOutcome> {
    return this.#step(this.manager.redoStack, () => this.manager.redo())
  }

  async #step(stack: StackItem[], act: () => void): Promise<UndoOutcome> {
    this.manager.stopCapturing()
    const step = stack[stack.length - 1]
    if (step === undefined) return 'nothing'
    const skipped = () => {
      stack.splice(stack.indexOf(step), 1)
      return 'skipped' as const
    }
    if (step.meta.get('overtaken') === true) return skipped()
    const keys = [...keysOf(step)].filter((key) => this.#stands(key))
    if (keys.length > 0 && !(await this.#options.takePens(keys))) return 'pen-of-another'
    // What a colleague wrote before the grant has been applied by now.
    if (step.meta.get('overtaken') === true) return skipped()
    if (stack[stack.length - 1] !== step) return 'nothing'
    act()
    if (keys.length > 0) this.#options.releasePens(keys)
    return 'done'
  }

  /** A line that does not stand there needs no pen. */
  #stands(key: string): boolean {
    return key.includes(':') || this.#options.doc.getMap('lines').has(key)
  }

  end(): void {
    this.#options.doc.off('afterTransaction', this.#watch)
    this.manager.destroy()
  }
}
