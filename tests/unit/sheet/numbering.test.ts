import { expect, test } from 'vitest'
import { canonicalText } from '@shared/sheet/canonical'
import { numberSheet, proseSections } from '@shared/sheet/numbering'
import { reportedLines } from '@shared/sheet/reported'
import { importText } from '@shared/sheet/text'

const text =
  '```given\na = 1\n```\n\n# One {#one}\n\n```given\nb = 1\nc = 1\n```\n\n## Part {#part}\n\n```formula\nd = a + b {reported=true}\n```\n\n# Two {#two}\n\nText\n\n```criterion\nC1: d <= 3\n```\n'

test('lines are numbered by section and order, whatever the subsections', () => {
  const { sheet } = importText(text)
  if (!sheet) throw new Error('the text of this test has no sheet')
  const { lines, headings, sections } = numberSheet(sheet)
  expect(Object.fromEntries(lines)).toEqual({ a: '0.1', b: '1.1', c: '1.2', d: '1.3', C1: '2.1' })
  expect(Object.fromEntries(headings)).toEqual({ one: '1', part: '1.1', two: '2' })
  expect(sections.map(({ number }) => number)).toEqual(['0', '1', '2'])
  expect(proseSections(sheet).map(({ headingId, blocks }) => [headingId, blocks.length])).toEqual([
    [null, 0],
    ['one', 1],
    ['part', 1],
    ['two', 2],
  ])
  expect(reportedLines(sheet)).toEqual({ results: ['d'], criteria: ['C1'] })
})

// RFC 8785, section 3.2.3, the example of sorted keys and section 3.2.2.3 on numbers
test('canonical text sorts keys by UTF-16 code units and writes numbers as ECMAScript does', () => {
  expect(
    canonicalText({ '\u20ac': 1, '\r': 2, '\ud83d\ude00': 3, '\ufb33': 4, 1: 1e30, a: [4.5, 2e-3, 1e-27] }),
  ).toBe('{"\\r":2,"1":1e+30,"a":[4.5,0.002,1e-27],"\u20ac":1,"\ud83d\ude00":3,"\ufb33":4}')
})
