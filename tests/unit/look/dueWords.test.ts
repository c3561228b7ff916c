import { expect, test } from 'vitest'
import { dueWords } from '@/composables/dueWords'

// 2026-12-01 is a Tuesday.
test.each([
  ['2026-12-01', 'due today'],
  ['2026-12-02', 'due tomorrow'],
  ['2026-12-04', 'due Friday'],
  ['2026-12-07', 'due Monday'],
  ['2026-12-08', 'due 8 December'],
  ['2027-01-15', 'due 15 January 2027'],
  ['2026-11-30', '1 day late'],
  ['2026-11-24', '7 days late'],
])('on 1 December a calculation wanted on %s is %s', (dueOn, text) => {
  expect(dueWords(dueOn, '2026-12-01').text).toBe(text)
})

test('only a day that has passed is late', () => {
  expect(dueWords('2026-12-01', '2026-12-01').isLate).toBe(false)
  expect(dueWords('2026-11-30', '2026-12-01').isLate).toBe(true)
})
