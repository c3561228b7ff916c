import { expect, test } from 'vitest'
import { linesOf } from '@shared/sheet/lines'
import { copyText, hasLines, importText, pasteText } from '@shared/sheet/text'
import type { Sheet } from '@shared/sheet/sheet'

const sheetOf = (text: string): Sheet => {
  const { sheet } = importText(text)
  if (!sheet) throw new Error('the text of this test has no sheet')
  return sheet
}

const given =
  '```given\nd_o = 60 mm -- outside diameter [drawing] {origin.template=Solid\\ shaft origin.edition=1 origin.line=d_o}\n```\n'

test('pasted lines get new ids, keep their origin, and take the next free symbol where theirs is taken', () => {
  const sheet = sheetOf(given)
  const { blocks, renamed, problems } = pasteText(copyText(sheet.blocks), sheet)
  expect(problems).toEqual([])
  const [line] = linesOf({ ...sheet, blocks })
  expect(line).toMatchObject({
    symbol: 'd_o_2',
    value: '60',
    origin: { template: 'Solid shaft', edition: '1', line: 'd_o' },
  })
  expect(line?.id).not.toBe('d_o')
  expect(renamed).toEqual([{ lineId: line?.id, wanted: 'd_o', symbol: 'd_o_2' }])
})

test('references among pasted lines follow them', () => {
  const copied = copyText(sheetOf('```criterion\nC1: a <= b\n```\n\nSee [C1](line:).\n').blocks)
  const { blocks } = pasteText(copied, sheetOf(''))
  const [line, prose] = blocks
  expect(line?.type === 'line' && prose?.type === 'paragraph' && prose.content[1]).toEqual({
    type: 'reference',
    line: line?.type === 'line' ? line.line.id : '',
  })
})

test('a heading that is pasted gets an id of its own', () => {
  const sheet = sheetOf('# Givens {#givens}\n')
  const { blocks } = pasteText(copyText(sheet.blocks), sheet)
  expect(blocks[0]).toMatchObject({ type: 'heading', level: 1 })
  expect(blocks[0]).not.toMatchObject({ id: 'givens' })
})

test('ordinary text is told from lines', () => {
  expect(hasLines(given)).toBe(true)
  expect(hasLines('a given is a line')).toBe(false)
  expect(hasLines('```python\nx\n```')).toBe(false)
})
