import { describe, expect, test } from 'vitest'
import * as Y from 'yjs'
import type { LineResult } from '@shared/engine/contracts'
import { writeSheet } from '@shared/sheet/document'
import { frontSchema, type Block, type Sheet } from '@shared/sheet/sheet'
import { lineSchema } from '@shared/sheet/kinds'
import { readSheet } from '@shared/sheet/readSheet'
import { commandOf } from '@/editor/commands/commandTable'
import { findProblem } from '@/editor/commands/findProblem'
import { keepAsText, replaceBlockByLine } from '@/editor/commands/makeLine'
import { moveLines } from '@/editor/commands/moveLines'
import { newLine, typedLine } from '@/editor/commands/newLine'
import { deletionNotice, removeLines, usersOf } from '@/editor/commands/removeLines'
import { settleContested } from '@/editor/commands/settleContested'
import { readTolerance, toleranceText } from '@/editor/commands/tolerance'

const front = frontSchema.parse({})
const given = (id: string, fields: object = {}): Block => ({
  type: 'line',
  line: lineSchema.parse({ kind: 'given', id, symbol: id, value: '1', ...fields }),
})
const text = (words: string): Block => ({
  type: 'paragraph',
  content: words ? [{ type: 'text', text: words }] : [],
})
const sheetOf = (...blocks: Block[]): Sheet => ({ front, blocks })
const documentOf = (...blocks: Block[]): Y.Doc => {
  const doc = new Y.Doc()
  writeSheet(doc, sheetOf(...blocks))
  return doc
}
/** Lines by id, prose by its text. */
const pageOf = (doc: Y.Doc): string[] =>
  readSheet(doc).sheet.blocks.map((block) => {
    if (block.type === 'line') return block.line.id
    return block.type === 'paragraph'
      ? block.content.map((run) => (run.type === 'text' ? run.text : '')).join('')
      : block.type
  })
const here = Symbol('this test')

describe('moving lines', () => {
  test('a line passes a paragraph as it passes a line', () => {
    const doc = documentOf(given('a'), text('words'), given('b'))
    moveLines(doc, ['a'], 1, here)
    expect(pageOf(doc)).toEqual(['words', 'a', 'b'])
    moveLines(doc, ['b'], -1, here)
    expect(pageOf(doc)).toEqual(['words', 'b', 'a'])
  })

  test('several lines move together and keep their order', () => {
    const doc = documentOf(given('a'), given('b'), given('c'), given('d'))
    moveLines(doc, ['c', 'b'], 1, here)
    expect(pageOf(doc)).toEqual(['a', 'd', 'b', 'c'])
    moveLines(doc, ['b', 'c'], -1, here)
    expect(pageOf(doc)).toEqual(['a', 'b', 'c', 'd'])
  })

  test('at the end of the page nothing moves and nothing is written', () => {
    const doc = documentOf(given('a'), given('b'))
    let updates = 0
    doc.on('update', () => (updates += 1))
    expect(moveLines(doc, ['b'], 1, here)).toBe(false)
    expect(moveLines(doc, ['a'], -1, here)).toBe(false)
    expect(updates).toBe(0)
  })
})

describe('making a line of a paragraph', () => {
  test('the line stands where the text stood, with a paragraph below for the next one', () => {
    const doc = documentOf(text('before'), text('d = 40 mm'))
    const line = newLine(sheetOf(), 'given', { symbol: 'd', value: '40', unit: 'mm' })
    const { next } = replaceBlockByLine(doc, 1, line, here)
    expect(pageOf(doc)).toEqual(['before', line.id, ''])
    expect(next).toBe(2)
  })

  test('kept as text, the paragraph is back', () => {
    const doc = documentOf(text('d = 40 mm'))
    replaceBlockByLine(doc, 0, newLine(sheetOf(), 'given', { symbol: 'd' }), here)
    keepAsText(doc, 0, 'd = 40 mm', here)
    expect(pageOf(doc)[0]).toBe('d = 40 mm')
  })

  test('the note of a criterion is its title, and it gets the next number', () => {
    const sheet = sheetOf({ type: 'line', line: newLine(sheetOf(), 'criterion') })
    const line = typedLine(sheet, {
      kind: 'criterion',
      symbol: '',
      demand: 'tau',
      relation: '<=',
      limit: '60 MPa',
      note: 'shear strength',
      source: 'EN 1993-1-1',
      fields: {},
    })
    expect(line).toMatchObject({ symbol: 'C2', title: 'shear strength', source: 'EN 1993-1-1', note: '' })
  })
})

describe('deleting lines', () => {
  const result = (id: string, reads: string[]): LineResult => ({
    id,
    symbol: id,
    state: 'value',
    waitsFor: [],
    problems: [],
    reads,
  })

  test('it is said how many lines used what is gone; those that go with it are not counted', () => {
    const results = new Map(
      [
        result('d', []),
        result('tau', ['d']),
        result('J', ['d']),
        result('S1', []),
        result('x', ['S1.tau_max']),
      ].map((one) => [one.id, one]),
    )
    expect(usersOf(['d'], results)).toBe(2)
    expect(usersOf(['d', 'tau'], results)).toBe(1)
    expect(usersOf(['S1'], results)).toBe(1)
    expect(deletionNotice(1, 4)).toBe('Line deleted; 4 lines used it.')
    expect(deletionNotice(3, 1)).toBe('3 lines deleted; 1 line used them.')
    expect(deletionNotice(1, 0)).toBe('Line deleted.')
  })

  test('an emptied page keeps a place for the caret', () => {
    const doc = documentOf(given('a'))
    removeLines(doc, ['a'], here)
    expect(pageOf(doc)).toEqual([''])
  })
})

describe('finding problems', () => {
  const order = ['a', 'b', 'c', 'd']
  test('the next one below, going round at the end', () => {
    const troubled = new Set(['b', 'd'])
    expect(findProblem(order, troubled, undefined, 1)).toBe('b')
    expect(findProblem(order, troubled, 'b', 1)).toBe('d')
    expect(findProblem(order, troubled, 'd', 1)).toBe('b')
    expect(findProblem(order, troubled, 'b', -1)).toBe('d')
    expect(findProblem(order, new Set(), 'a', 1)).toBeUndefined()
  })
})

describe('a contested line', () => {
  const contested = { fields: { value: '65' }, by: 'Ben', at: '2026-12-01T10:00:00Z' }

  test('taking the other version writes its fields and ends the contest', () => {
    const doc = documentOf(given('a', { value: '79', contested }))
    settleContested(doc, 'a', 'mine', here)
    expect(readSheet(doc).sheet.blocks[0]).toMatchObject({ line: { value: '65' } })
    expect(readSheet(doc).sheet.blocks[0]).not.toHaveProperty('line.contested')
  })

  test('keeping what stands there ends the contest, too', () => {
    const doc = documentOf(given('a', { value: '79', contested }))
    settleContested(doc, 'a', 'theirs', here)
    expect(readSheet(doc).sheet.blocks[0]).toMatchObject({ line: { value: '79' } })
    expect(readSheet(doc).sheet.blocks[0]).not.toHaveProperty('line.contested')
  })
})

describe('tolerances as typed', () => {
  test.each([
    ['0.1', { plus: '0.1', minus: '0.1' }],
    ['+/- 0.10', { plus: '0.10', minus: '0.10' }],
    ['± 0.1', { plus: '0.1', minus: '0.1' }],
    ['+0.2/-0.05', { plus: '0.2', minus: '0.05' }],
    ['+ 0.2 / −0', { plus: '0.2', minus: '0' }],
    ['k6', { fit: 'k6' }],
    ['JS7', { fit: 'JS7' }],
    ['', null],
    ['+0.2/', undefined],
    ['about a tenth', undefined],
  ])('%s', (typed, read) => expect(readTolerance(typed)).toEqual(read))

  test('are shown as they would be typed', () => {
    for (const typed of ['0.1', '+0.2/-0.05', 'k6']) {
      const read = readTolerance(typed)
      expect(toleranceText(read ?? undefined)).toBe(typed)
    }
  })
})

test('a letter of the command list is found with or without Shift, and Shift+E is its own', () => {
  expect(commandOf('g', false)).toMatchObject({ does: 'insert', kind: 'given' })
  expect(commandOf('G', true)).toMatchObject({ does: 'insert', kind: 'given' })
  expect(commandOf('E', true)).toMatchObject({ does: 'previous-problem' })
  expect(commandOf('e', false)).toMatchObject({ does: 'next-problem' })
  expect(commandOf('z', false)).toBeUndefined()
})
