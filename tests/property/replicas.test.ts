/**
 * Two people edit one sheet at once, in any order of arrival: whatever they do, both end with the same
 * sheet, no field lands on another line, and no line is lost.
 */
import fc from 'fast-check'
import { expect, test } from 'vitest'
import * as Y from 'yjs'
import {
  duplicateLine,
  insertBlocks,
  insertLine,
  moveLine,
  newId,
  ownEdit,
  placeOfLine,
  removeLine,
  restoreLine,
  setField,
} from '@shared/sheet/edits'
import { documentParts, encodeSheet } from '@shared/sheet/document'
import { lineSchema } from '@shared/sheet/kinds'
import { readSheet } from '@shared/sheet/readSheet'
import { sheetSchema } from '@shared/sheet/sheet'

const LINES = ['l0', 'l1', 'l2', 'l3', 'l4']

/** Every value says whose line it is: `l2|…` may stand in l2 or in a copy of it, and nowhere else. */
const startSheet = () =>
  sheetSchema.parse({
    front: {},
    blocks: LINES.map((id) => ({
      type: 'line',
      line: { id, kind: 'given', symbol: id, note: `${id}|note`, value: `${id}|0`, unit: 'mm' },
    })),
  })

type Act =
  | { act: 'edit'; line: number; field: 'value' | 'note'; mark: number }
  | { act: 'move'; line: number; to: number }
  | { act: 'paste'; line: number; to: number }
  | { act: 'insert'; to: number; mark: number }
  | { act: 'delete'; line: number }
  | { act: 'restore'; line: number; to: number }
  | { act: 'undo' }
  | { act: 'redo' }
  | { act: 'sync' }

const line = fc.nat(LINES.length - 1)
const place = fc.nat(8)
const mark = fc.nat(999)
const act: fc.Arbitrary<Act> = fc.oneof(
  {
    weight: 4,
    arbitrary: fc.record({
      act: fc.constant('edit' as const),
      line,
      field: fc.constantFrom('value' as const, 'note' as const),
      mark,
    }),
  },
  { weight: 3, arbitrary: fc.record({ act: fc.constant('move' as const), line, to: place }) },
  { weight: 2, arbitrary: fc.record({ act: fc.constant('paste' as const), line, to: place }) },
  fc.record({ act: fc.constant('insert' as const), to: place, mark }),
  fc.record({ act: fc.constant('delete' as const), line }),
  fc.record({ act: fc.constant('restore' as const), line, to: place }),
  fc.record({ act: fc.constant('undo' as const) }),
  fc.record({ act: fc.constant('redo' as const) }),
  fc.record({ act: fc.constant('sync' as const) }),
)
const step = fc.record({ who: fc.constantFrom(0, 1), what: act })

class Replica {
  readonly doc = new Y.Doc()
  readonly undo: Y.UndoManager
  constructor(start: Uint8Array) {
    Y.applyUpdate(this.doc, start)
    const { page, lines, front } = documentParts(this.doc)
    this.undo = new Y.UndoManager([page, lines, front], {
      trackedOrigins: new Set([ownEdit]),
      captureTimeout: 0,
    })
  }

  do(what: Act): void {
    const id = 'line' in what ? (LINES[what.line] ?? 'l0') : ''
    switch (what.act) {
      case 'edit':
        return setField(this.doc, id, what.field, `${id}|${what.mark}`)
      case 'move':
        return moveLine(this.doc, id, { index: what.to })
      case 'paste': {
        if (placeOfLine(this.doc, id) < 0) return
        if (what.to % 2 === 0) return void duplicateLine(this.doc, id, `${id}x`)
        const copy = lineSchema.parse({
          id: newId(),
          kind: 'given',
          symbol: `${id}y`,
          note: `${id}|copy`,
          value: `${id}|copy`,
        })
        return insertBlocks(this.doc, [{ type: 'line', line: copy }], { index: what.to })
      }
      case 'insert': {
        const fresh = newId()
        insertLine(
          this.doc,
          lineSchema.parse({
            id: fresh,
            kind: 'given',
            symbol: fresh,
            note: `${fresh}|n`,
            value: `${fresh}|${what.mark}`,
          }),
          { index: what.to },
        )
        return
      }
      case 'delete':
        return removeLine(this.doc, id)
      case 'restore':
        return restoreLine(this.doc, id, { index: what.to })
      case 'undo':
        return void this.undo.undo()
      case 'redo':
        return void this.undo.redo()
      case 'sync':
        return
    }
  }

  end(): void {
    this.undo.destroy()
    this.doc.destroy()
  }
}

const exchange = (one: Replica, other: Replica): void => {
  const first = Y.encodeStateAsUpdate(one.doc, Y.encodeStateVector(other.doc))
  const second = Y.encodeStateAsUpdate(other.doc, Y.encodeStateVector(one.doc))
  Y.applyUpdate(other.doc, first)
  Y.applyUpdate(one.doc, second)
}

/** The line that a value was written for. */
const ownerOf = (text: unknown): string => String(text).split('|')[0] ?? ''

const checkFields = (doc: Y.Doc): void => {
  for (const [id, fields] of documentParts(doc).lines.entries()) {
    const owner = ownerOf(fields.get('value'))
    // Both fields of a line come from the same line: its own, or the one it was copied from.
    expect(ownerOf(fields.get('note'))).toBe(owner)
    if (LINES.includes(id)) expect(owner).toBe(id)
  }
}

const run = (steps: { who: number; what: Act }[]): void => {
  const start = encodeSheet(startSheet())
  const replicas = [new Replica(start), new Replica(start)] as const
  try {
    for (const { who, what } of steps) {
      if (what.act === 'sync') exchange(...replicas)
      else replicas[who === 0 ? 0 : 1].do(what)
    }
    exchange(...replicas)
    const [one, other] = replicas
    expect(readSheet(one.doc)).toEqual(readSheet(other.doc))
    expect(one.doc.getMap('lines').toJSON()).toEqual(other.doc.getMap('lines').toJSON())
    checkFields(one.doc)
    // Deleting takes a line off the page; what was written in it stays until the revision is issued.
    for (const id of LINES) expect(documentParts(one.doc).lines.has(id)).toBe(true)
  } finally {
    for (const replica of replicas) replica.end()
  }
}

test('edit, move, paste, delete, undo by two at once: both agree, and every field stays with its line', () => {
  fc.assert(fc.property(fc.array(step, { minLength: 2, maxLength: 30 }), run), { numRuns: 300, verbose: 1 })
}, 120_000)

test('a line that one moves while the other edits it keeps the edit and its new place', () => {
  fc.assert(
    fc.property(line, place, mark, (index, to, value) => {
      const start = encodeSheet(startSheet())
      const [one, other] = [new Replica(start), new Replica(start)]
      one.do({ act: 'move', line: index, to })
      other.do({ act: 'edit', line: index, field: 'value', mark: value })
      exchange(one, other)
      const id = LINES[index] ?? ''
      expect(documentParts(one.doc).lines.get(id)?.get('value')).toBe(`${id}|${value}`)
      expect(placeOfLine(other.doc, id)).toBe(placeOfLine(one.doc, id))
      one.end()
      other.end()
    }),
    { numRuns: 100 },
  )
})

test('undo takes back own steps only: what a colleague wrote in another line stays', () => {
  fc.assert(
    fc.property(line, line, mark, (mine, theirs, value) => {
      fc.pre(mine !== theirs)
      const start = encodeSheet(startSheet())
      const [one, other] = [new Replica(start), new Replica(start)]
      one.do({ act: 'edit', line: mine, field: 'value', mark: value })
      other.do({ act: 'edit', line: theirs, field: 'value', mark: value })
      exchange(one, other)
      one.do({ act: 'undo' })
      exchange(one, other)
      const value0 = (id: string) => documentParts(other.doc).lines.get(id)?.get('value')
      expect(value0(`l${mine}`)).toBe(`l${mine}|0`)
      expect(value0(`l${theirs}`)).toBe(`l${theirs}|${value}`)
      one.end()
      other.end()
    }),
    { numRuns: 100 },
  )
})
