import { describe, expect, test } from 'vitest'
import * as Y from 'yjs'
import { encodeSheet } from '@shared/sheet/document'
import {
  addRow,
  duplicateLine,
  freeSymbol,
  insertLine,
  moveLine,
  nextAnalysisSymbol,
  nextCriterionSymbol,
  ownEdit,
  removeLine,
  removeRow,
  renameSymbol,
  restoreLine,
  separateRepeatedLine,
  setCell,
  setField,
} from '@shared/sheet/edits'
import { renameInText } from '@shared/sheet/edits/renameInText'
import { documentParts } from '@shared/sheet/document'
import { lineSchema } from '@shared/sheet/kinds'
import { linesOf } from '@shared/sheet/lines'
import { readSheet } from '@shared/sheet/readSheet'
import { importText } from '@shared/sheet/text'

const shaft = `
# Shaft

\`\`\`given
d = 40 mm +/- 0.1 -- seat [drawing]
T = 500 N m
\`\`\`

\`\`\`formula
tau = 16*T/(pi*d^3) to MPa
\`\`\`

\`\`\`criterion
C1: tau <= 60 MPa
\`\`\`

\`\`\`analysis yaml
- symbol: S1
  analysis: shaft-line
  inputs:
    start: fixed
    segments:
      - {name: '1', length: 200 mm, d: d}
      - {name: '2', length: 300 mm, d: 2*d}
\`\`\`

The stress is [tau](value:).
`

const live = (text = shaft): Y.Doc => {
  const doc = new Y.Doc()
  const { sheet, problems } = importText(text)
  expect(problems).toEqual([])
  if (sheet) Y.applyUpdate(doc, encodeSheet(sheet))
  return doc
}
const line = (doc: Y.Doc, id: string) =>
  linesOf(readSheet(doc).sheet).find((candidate) => candidate.id === id)
const order = (doc: Y.Doc) => linesOf(readSheet(doc).sheet).map(({ id }) => id)
const steps = (doc: Y.Doc, act: () => void): number => {
  let count = 0
  doc.on('update', () => count++)
  act()
  return count
}

describe('fields', () => {
  test('are set by the path that problems name, one step each', () => {
    const doc = live()
    expect(steps(doc, () => setField(doc, 'd', 'value', '45'))).toBe(1)
    setField(doc, 'd', 'tolerance.plus', '0.2')
    setField(doc, 'S1', 'inputs.segments.1.d', '50 mm')
    setField(doc, 'S1', 'inputs.end', 'free')
    expect(line(doc, 'd')).toMatchObject({ value: '45', tolerance: { plus: '0.2', minus: '0.1' } })
    expect(line(doc, 'S1')).toMatchObject({
      inputs: { end: 'free', segments: [{ cells: { d: 'd' } }, { cells: { d: '50 mm' } }] },
    })
  })

  test('a fit takes the place of plus and minus, and the other way round', () => {
    const doc = live()
    setField(doc, 'd', 'tolerance.fit', 'k6')
    expect(line(doc, 'd')).toMatchObject({ tolerance: { fit: 'k6' } })
    setField(doc, 'd', 'tolerance.plus', '0.1')
    expect(line(doc, 'd')).toMatchObject({ tolerance: { plus: '0.1', minus: '' } })
    setField(doc, 'd', 'tolerance', null)
    expect(line(doc, 'd')).not.toHaveProperty('tolerance')
  })

  test('nothing is written where nothing changes, and kind and id are no fields', () => {
    const doc = live()
    expect(steps(doc, () => setField(doc, 'd', 'value', '40'))).toBe(0)
    expect(steps(doc, () => setField(doc, 'd', 'kind', 'formula'))).toBe(0)
    expect(steps(doc, () => setField(doc, 'gone', 'value', '1'))).toBe(0)
  })
})

describe('lines', () => {
  test('move by their place alone: a colleague may write in them meanwhile', () => {
    const one = live()
    const two = new Y.Doc()
    Y.applyUpdate(two, Y.encodeStateAsUpdate(one))
    moveLine(one, 'd', { after: 'tau' })
    setField(two, 'd', 'value', '45')
    Y.applyUpdate(one, Y.encodeStateAsUpdate(two))
    expect(order(one)).toEqual(['T', 'tau', 'd', 'C1', 'S1'])
    expect(line(one, 'd')).toMatchObject({ value: '45' })
  })

  test('moved by two people at once stand twice, until one is made a line of its own', () => {
    const one = live()
    const two = new Y.Doc()
    Y.applyUpdate(two, Y.encodeStateAsUpdate(one))
    moveLine(one, 'd', 'end')
    moveLine(two, 'd', { after: 'tau' })
    Y.applyUpdate(one, Y.encodeStateAsUpdate(two))
    expect(readSheet(one).problems).toMatchObject([{ code: 'repeated-line', lineId: 'd' }])
    const id = separateRepeatedLine(one, 'd')
    expect(readSheet(one).problems).toEqual([])
    expect(line(one, id ?? '')).toMatchObject({ symbol: 'd', value: '40' })
  })

  test('are removed from the page, kept aside, and come back as they were', () => {
    const doc = live()
    const before = line(doc, 'd')
    removeLine(doc, 'd')
    expect(order(doc)).not.toContain('d')
    restoreLine(doc, 'd', { before: 'T' })
    expect(order(doc)[0]).toBe('d')
    expect(line(doc, 'd')).toEqual(before)
  })

  test('are undone as one step together with their place on the page', () => {
    const doc = live()
    const { page, lines, front } = documentParts(doc)
    const undo = new Y.UndoManager([page, lines, front], { trackedOrigins: new Set([ownEdit]) })
    insertLine(doc, lineSchema.parse({ id: 'new', kind: 'given', symbol: 'b', value: '3' }), { after: 'd' })
    expect(order(doc)).toEqual(['d', 'new', 'T', 'tau', 'C1', 'S1'])
    undo.undo()
    expect(order(doc)).toEqual(['d', 'T', 'tau', 'C1', 'S1'])
    expect(readSheet(doc).setAside).toEqual([])
    undo.redo()
    expect(line(doc, 'new')).toMatchObject({ symbol: 'b', value: '3' })
  })

  test('a copy has an id and a symbol of its own', () => {
    const doc = live()
    const id = duplicateLine(doc, 'd', freeSymbol(readSheet(doc).sheet, 'd'))
    expect(line(doc, id ?? '')).toMatchObject({ symbol: 'd_2', value: '40', source: 'drawing' })
    expect(order(doc)[1]).toBe(id)
  })
})

describe('rows', () => {
  test('get a number that no row of their table ever had', () => {
    const doc = live()
    removeRow(doc, 'S1', 'inputs.segments', '2')
    expect(addRow(doc, 'S1', 'inputs.segments', { cells: { length: '100 mm' } })).toBe('3')
    removeRow(doc, 'S1', 'inputs.segments', '3')
    expect(addRow(doc, 'S1', 'inputs.segments', {}, 0)).toBe('4')
    setCell(doc, 'S1', 'inputs.segments', '4', 'd', '30 mm')
    expect(line(doc, 'S1')).toMatchObject({
      inputs: {
        segments: [
          { name: '4', cells: { d: '30 mm' } },
          { name: '1', cells: { length: '200 mm', d: 'd' } },
        ],
      },
    })
  })

  test('a table that was not there begins with its first row', () => {
    const doc = live()
    expect(addRow(doc, 'S1', 'inputs.torques', { cells: { x: '0 mm', T: 'T' } })).toBe('1')
    expect(line(doc, 'S1')).toMatchObject({ inputs: { torques: [{ name: '1', cells: { T: 'T' } }] } })
  })
})

describe('symbols', () => {
  test('new ones count on from the highest, also where one was removed', () => {
    const { sheet } = readSheet(live('```criterion\nC1: a <= b\nC7: a <= c\n```\n'))
    expect(nextCriterionSymbol(sheet)).toBe('C8')
    expect(nextAnalysisSymbol(sheet)).toBe('S1')
    expect(freeSymbol(readSheet(live('```given\nd_o = 1 mm\nd_o_2 = 2 mm\n```\n')).sheet, 'd_o')).toBe(
      'd_o_3',
    )
  })

  test('are renamed wherever they are read, in one step', () => {
    const doc = live()
    expect(steps(doc, () => renameSymbol(doc, 'd', 'd_seat'))).toBe(1)
    renameSymbol(doc, 'tau', 'tau_s')
    expect(line(doc, 'd')).toMatchObject({ symbol: 'd_seat', unit: 'mm' })
    expect(line(doc, 'tau')).toMatchObject({ symbol: 'tau_s', expression: '16*T/(pi*d_seat^3)' })
    expect(line(doc, 'C1')).toMatchObject({ demand: 'tau_s', limit: '60 MPa' })
    expect(line(doc, 'S1')).toMatchObject({
      inputs: { segments: [{ cells: { d: 'd_seat' } }, { cells: { d: '2*d_seat' } }] },
    })
    expect(JSON.stringify(readSheet(doc).sheet.blocks.at(-1))).toContain('"symbol":"tau_s"')
  })

  test.each([
    ['m', 'm*9.81 m/s^2', 'mass*9.81 m/s^2'],
    ['m', '10 m + m', '10 m + mass'],
    ['d', 'd_o + d + d.x', 'd_o + mass + mass.x'],
    ['tau_max', 'τ_max/2', 'mass/2'],
    ['MPa', 'numerical_value(p, MPa)', 'numerical_value(p, MPa)'],
    ['m', 'x to m', 'x to m'],
  ])('renaming %s in “%s” leaves units alone', (from, text, expected) => {
    expect(renameInText(text, { from, to: 'mass' })).toBe(expected)
  })
})
