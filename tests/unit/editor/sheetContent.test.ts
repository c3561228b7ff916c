import { effectScope, shallowRef } from 'vue'
import { describe, expect, test } from 'vitest'
import * as Y from 'yjs'
import { documentParts, writeSheet } from '@shared/sheet/document'
import { setField } from '@shared/sheet/edits'
import { lineSchema } from '@shared/sheet/kinds'
import { blockElement } from '@shared/sheet/pageWriting'
import { frontSchema } from '@shared/sheet/sheet'
import { useSheetContent, type SheetContent } from '@/composables/useSheetContent'

const given = (id: string) => ({
  type: 'line' as const,
  line: lineSchema.parse({ kind: 'given', id, symbol: id, value: '1' }),
})

const withContent = (work: (content: SheetContent, doc: Y.Doc) => void): void => {
  const doc = new Y.Doc()
  writeSheet(doc, { front: frontSchema.parse({}), blocks: [given('a'), given('b')] })
  const scope = effectScope()
  scope.run(() => work(useSheetContent(shallowRef(doc)), doc))
  scope.stop()
}

describe('the live document as plain data', () => {
  test('a changed field makes its line a new object and leaves the others the same', () =>
    withContent((content, doc) => {
      const [a, b] = [content.lines.get('a'), content.lines.get('b')]
      setField(doc, 'a', 'value', '2')
      content.refresh()
      expect(content.lines.get('a')).not.toBe(a)
      expect(content.lines.get('a')).toMatchObject({ value: '2' })
      expect(content.lines.get('b')).toBe(b)
    }))

  test('reading writes nothing', () =>
    withContent((content, doc) => {
      let updates = 0
      doc.on('update', () => (updates += 1))
      content.refresh()
      expect(updates).toBe(0)
    }))

  test('a line that stands twice counts once and has a problem with its repair', () =>
    withContent((content, doc) => {
      documentParts(doc).page.insert(2, [blockElement(given('a'))])
      content.refresh()
      expect(content.order.value).toEqual(['a', 'b'])
      expect(content.fieldProblems.get('a')).toMatchObject([
        { code: 'repeated-line', repairs: [{ lineId: 'a' }] },
      ])
      documentParts(doc).page.delete(2)
      content.refresh()
      expect(content.fieldProblems.has('a')).toBe(false)
    }))

  test('rubbish under an id is a line that is not there, and nothing breaks', () =>
    withContent((content, doc) => {
      documentParts(doc).lines.set('a', 'rubbish' as never)
      content.refresh()
      expect(content.order.value).toEqual(['a', 'b'])
      expect(content.lines.has('a')).toBe(false)
    }))
})
