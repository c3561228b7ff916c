import { expect, test } from 'vitest'
import { evaluateInWorker } from '@server/evaluation/evaluateInWorker'
import { evaluateSheet } from '@shared/pipeline'
import { sheetOf } from '../../support/sheetText'

const sheet = sheetOf('```given\nd = 40.0 mm\n```\n\n```formula\nr = d/2\n```\n')

test('a thread says the same as the engine at hand, with presentations when asked', async () => {
  const answer = await evaluateInWorker(sheet, { present: true })
  expect(answer.lines).toEqual(evaluateSheet(sheet).lines)
  expect(answer.presentations.map(({ id }) => id)).toEqual(['d', 'r'])
  expect(answer.nomenclature.map(({ symbol }) => symbol)).toEqual(['d', 'r'])
})

test('what takes too long is ended and said so', async () => {
  await expect(evaluateInWorker(sheet, { timeoutMs: 1 })).rejects.toMatchObject({ reason: 'timeout' })
})
