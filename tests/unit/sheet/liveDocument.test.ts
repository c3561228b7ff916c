import fc from 'fast-check'
import { getSchema } from '@tiptap/core'
import { yXmlFragmentToProseMirrorRootNode } from '@tiptap/y-tiptap'
import { describe, expect, test } from 'vitest'
import * as Y from 'yjs'
import { canonicalText } from '@shared/sheet/canonical'
import { documentParts, encodeSheet, writeSheet } from '@shared/sheet/document'
import { normalise } from '@shared/sheet/normalise'
import { pageExtensions } from '@shared/sheet/page'
import { readSheet } from '@shared/sheet/readSheet'
import type { Sheet } from '@shared/sheet/sheet'
import { importText } from '@shared/sheet/text'
import { arbitrarySheet } from '../../support/arbitrarySheet'

const schema = getSchema(pageExtensions)

const sheetOf = (text: string): Sheet => {
  const { sheet } = importText(text)
  if (!sheet) throw new Error('the text of this test has no sheet')
  return sheet
}

const live = (text: string): Y.Doc => {
  const doc = new Y.Doc()
  Y.applyUpdate(doc, encodeSheet(sheetOf(text)))
  return doc
}

const withoutContested = (sheet: Sheet): Sheet => normalise(sheet)

describe('a sheet as a live document', () => {
  test('is read back as it was written, whatever people wrote', () => {
    fc.assert(
      fc.property(arbitrarySheet, (sheet) => {
        const normal = withoutContested(sheet)
        const doc = new Y.Doc()
        Y.applyUpdate(doc, encodeSheet(normal))
        const read = readSheet(doc)
        expect(read.problems).toEqual([])
        expect(read.setAside).toEqual([])
        expect(canonicalText(normalise(read.sheet))).toBe(canonicalText(normal))
      }),
      { numRuns: 120 },
    )
  })

  test('is a page that the editor accepts as it is', () => {
    fc.assert(
      fc.property(arbitrarySheet, (sheet) => {
        const doc = new Y.Doc()
        Y.applyUpdate(doc, encodeSheet(normalise(sheet)))
        const before = Y.encodeStateVector(doc)
        yXmlFragmentToProseMirrorRootNode(documentParts(doc).page, schema).check()
        expect(Y.encodeStateVector(doc)).toEqual(before)
      }),
      { numRuns: 100 },
    )
  })

  test('cannot be filled twice', () => {
    const doc = live('```given\nd = 40 mm\n```\n')
    expect(() => writeSheet(doc, sheetOf(''))).toThrow('not empty')
  })

  test('has a place for the caret when the sheet is empty', () => {
    expect(documentParts(live('')).page.toString()).toBe('<paragraph></paragraph>')
  })
})

describe('rubbish in a live document', () => {
  test('costs the field it is in and nothing else', () => {
    const doc = live('```given\nd = 40 mm -- seat [drawing]\nT = 500 N m\n```\n')
    const { lines } = documentParts(doc)
    lines.get('d')?.set('nature', 42)
    lines.get('d')?.set('tolerance.plus', { deep: true })
    const { sheet, problems } = readSheet(doc)
    expect(problems.map(({ lineId, code, span }) => [lineId, code, span?.field])).toEqual([
      ['d', 'invalid-field', 'tolerance'],
      ['d', 'invalid-field', 'nature'],
    ])
    const [d, T] = sheet.blocks
    expect(d).toMatchObject({
      line: { symbol: 'd', value: '40', unit: 'mm', nature: 'input', source: 'drawing' },
    })
    expect(T).toMatchObject({ line: { symbol: 'T', value: '500', unit: 'N m' } })
  })

  test('of a kind that nobody knows is a problem, and its neighbours stay', () => {
    const doc = live('```given\nd = 40 mm\nT = 500 N m\n```\n')
    documentParts(doc).lines.get('d')?.set('kind', 'teapot')
    const { sheet, problems } = readSheet(doc)
    expect(problems).toMatchObject([{ lineId: 'd', code: 'invalid-field' }])
    expect(problems[0]?.message).toContain('teapot')
    expect(sheet.blocks).toHaveLength(1)
  })

  test('never stops the reading, whatever stands there', () => {
    const rubbish = fc.oneof(fc.jsonValue(), fc.constant(undefined))
    fc.assert(
      fc.property(
        fc.array(
          fc.tuple(
            fc.constantFrom(
              'kind',
              'rows',
              'inputs.a',
              'between.1',
              'between.x',
              'tolerance.fit',
              'range.from',
              'made.rows',
              'outputs',
              'x.y.z',
              '__proto__',
            ),
            rubbish,
          ),
        ),
        fc.constantFrom('given', 'cases', 'sizing', 'table', 'analysis'),
        (entries, kind) => {
          const doc = live('```given\nd = 40 mm\n```\n')
          const { lines, front, page } = documentParts(doc)
          const map = lines.get('d')
          map?.set('kind', kind)
          for (const [key, value] of entries) {
            map?.set(key, value)
            front.set(key, value)
          }
          front.set('sources', entries[0]?.[1])
          const odd = new Y.XmlElement('teapot')
          page.insert(0, [odd])
          odd.insert(0, [new Y.XmlText('kept')])
          const { sheet } = readSheet(doc)
          expect(JSON.stringify(sheet.blocks[0])).toContain('kept')
        },
      ),
      { numRuns: 120 },
    )
  })
})

describe('ids and places', () => {
  test('the first place of an id is the line, the second is a problem with its repair', () => {
    const doc = live('```given\nd = 40 mm\n```\n\nText\n')
    const again = new Y.XmlElement('line')
    again.setAttribute('id', 'd')
    documentParts(doc).page.push([again])
    const { sheet, problems } = readSheet(doc)
    expect(sheet.blocks.map((block) => block.type)).toEqual(['line', 'paragraph'])
    expect(problems).toMatchObject([
      { lineId: 'd', code: 'repeated-line', repairs: [{ label: 'Make it a line of its own' }] },
    ])
  })

  test('a line without a place is set aside, not lost', () => {
    const doc = live('```given\nd = 40 mm\n```\n')
    documentParts(doc).page.delete(0)
    const { sheet, setAside, problems } = readSheet(doc)
    expect(sheet.blocks).toEqual([])
    expect(problems).toEqual([])
    expect(setAside).toMatchObject([{ symbol: 'd', value: '40' }])
  })
})

describe('two people at once', () => {
  const twins = (text: string): [Y.Doc, Y.Doc, () => void] => {
    const one = live(text)
    const two = new Y.Doc()
    Y.applyUpdate(two, Y.encodeStateAsUpdate(one))
    const meet = () => {
      Y.applyUpdate(two, Y.encodeStateAsUpdate(one))
      Y.applyUpdate(one, Y.encodeStateAsUpdate(two))
    }
    return [one, two, meet]
  }

  test('leave a page that the schema admits: lists, items and tables emptied from two sides', () => {
    const [one, two, meet] = twins('- a\n- b\n\n| x | y |\n| --- | --- |\n| 1 | 2 |\n')
    const child = (doc: Y.Doc, ...path: number[]) =>
      path.reduce<Y.XmlElement | Y.XmlFragment>(
        (node, index) => node.get(index) as Y.XmlElement,
        documentParts(doc).page,
      )
    child(one, 0).delete(0)
    child(two, 0).delete(1)
    child(one, 1, 0).delete(0)
    child(two, 1, 1).delete(0, 2)
    meet()
    const page = yXmlFragmentToProseMirrorRootNode(documentParts(one).page, schema)
    page.check()
    expect(page.toString()).toContain('bulletList')
    expect(readSheet(one).problems).toEqual([])
    expect(readSheet(one).sheet).toEqual(readSheet(two).sheet)
  })

  test('may give one text two marks', () => {
    const [one, two, meet] = twins('shaft\n')
    const text = (doc: Y.Doc) => (documentParts(doc).page.get(0) as Y.XmlElement).get(0) as Y.XmlText
    text(one).format(0, 5, { bold: {} })
    text(two).format(0, 5, { code: {} })
    meet()
    yXmlFragmentToProseMirrorRootNode(documentParts(one).page, schema).check()
    expect(readSheet(one).sheet.blocks).toEqual([
      {
        type: 'paragraph',
        content: [{ type: 'text', text: 'shaft', marks: [{ type: 'bold' }, { type: 'code' }] }],
      },
    ])
  })
})
