/**
 * Who wrote what: applies an update to the server's own copy and says which lines, front texts and
 * blocks of prose it changed, field by field, before and after. What stood before comes from a copy as
 * text, kept beside the document, as Yjs empties what is deleted.
 */
import * as Y from 'yjs'
import { frontTexts, penOfFront, penOfLine } from '@shared/protocol'
import { PageRecord } from './pageRecord'
import type { Entry } from './recordEntry'

export interface Recorded {
  entries: Entry[]
  /** Pens that the writer must hold: lines that stood there before, and front texts. */
  pens: Set<string>
}

type Fields = Map<string, string>

const text = (value: unknown): string =>
  JSON.stringify(value instanceof Y.AbstractType ? value.toJSON() : value) ?? 'null'

const fieldsOf = (value: unknown): Fields => {
  const fields: Fields = new Map()
  if (value instanceof Y.Map) for (const [field, content] of value.entries()) fields.set(field, text(content))
  else fields.set('', text(value))
  return fields
}

const asObject = (fields: Fields): string =>
  `{${[...fields].map(([field, value]) => `${JSON.stringify(field)}:${value}`).join(',')}}`

export class EditRecord {
  readonly #lines = new Map<string, Fields>()
  #front: Fields
  readonly #page: PageRecord
  readonly #doc: Y.Doc

  constructor(doc: Y.Doc) {
    this.#doc = doc
    for (const [id, line] of doc.getMap('lines').entries()) this.#lines.set(id, fieldsOf(line))
    this.#front = fieldsOf(doc.getMap('front'))
    this.#page = new PageRecord(doc.getXmlFragment('page'))
  }

  /** Applies by `apply` and records what it did. */
  record(apply: () => void): Recorded {
    const lines = this.#doc.getMap('lines')
    const front = this.#doc.getMap('front')
    const touched = new Set<string>()
    let isFrontTouched = false
    const watchLines = (events: Y.YEvent<Y.AbstractType<unknown>>[]) => {
      for (const event of events) {
        if (event.path.length > 0) touched.add(String(event.path[0]))
        else for (const id of event.changes.keys.keys()) touched.add(id)
      }
    }
    const watchFront = () => {
      isFrontTouched = true
    }
    lines.observeDeep(watchLines)
    front.observeDeep(watchFront)
    const page = this.#page.watch()
    try {
      apply()
    } finally {
      lines.unobserveDeep(watchLines)
      front.unobserveDeep(watchFront)
      page.stop()
    }
    const recorded: Recorded = { entries: [], pens: new Set() }
    const isNew = new Set<string>()
    for (const id of touched) this.#compareLine(id, lines, recorded, isNew)
    if (isFrontTouched) this.#compareFront(front, recorded)
    recorded.entries.push(...page.entries(isNew))
    return recorded
  }

  #compareLine(id: string, lines: Y.Map<unknown>, recorded: Recorded, isNew: Set<string>): void {
    const before = this.#lines.get(id)
    const after = lines.has(id) ? fieldsOf(lines.get(id)) : undefined
    if (after === undefined) this.#lines.delete(id)
    else this.#lines.set(id, after)
    if (before !== undefined && after !== undefined) {
      const entries = differing('line', id, before, after)
      if (entries.length > 0) recorded.pens.add(penOfLine(id))
      recorded.entries.push(...entries)
      return
    }
    if (before !== undefined) recorded.pens.add(penOfLine(id))
    if (after !== undefined) isNew.add(id)
    recorded.entries.push({
      subject: 'line',
      subjectId: id,
      field: '',
      before: before === undefined ? null : asObject(before),
      after: after === undefined ? null : asObject(after),
    })
  }

  #compareFront(front: Y.Map<unknown>, recorded: Recorded): void {
    const after = fieldsOf(front)
    const before = this.#front
    this.#front = after
    for (const field of new Set([...before.keys(), ...after.keys()])) {
      const was = before.get(field) ?? null
      const is = after.get(field) ?? null
      if (was === is) continue
      recorded.entries.push({ subject: 'front', subjectId: field, field: '', before: was, after: is })
      if ((frontTexts as readonly string[]).includes(field)) recorded.pens.add(penOfFront(field))
    }
  }
}

const differing = (subject: Entry['subject'], subjectId: string, before: Fields, after: Fields): Entry[] => {
  const entries: Entry[] = []
  for (const field of new Set([...before.keys(), ...after.keys()])) {
    const was = before.get(field) ?? null
    const is = after.get(field) ?? null
    if (was !== is) entries.push({ subject, subjectId, field, before: was, after: is })
  }
  return entries
}
