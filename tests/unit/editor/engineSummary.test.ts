import { expect, test } from 'vitest'
import type { LineResult, Quantity } from '@shared/engine/contracts'
import { dimensionless } from '@shared/engine/dimensions/dimension'
import { usedBy, waitingOn } from '@/composables/engineDependents'
import { summariseChanges } from '@/composables/engineSummary'

const quantity = (number: number): Quantity => ({
  si: number,
  number,
  unit: '',
  dimension: dimensionless,
  shown: String(number),
})
const line = (id: string, fields: Partial<LineResult>): LineResult => ({
  id,
  symbol: id,
  state: 'value',
  waitsFor: [],
  problems: [],
  reads: [],
  ...fields,
})
const byId = (...lines: LineResult[]) => new Map(lines.map((one) => [one.id, one]))

test('changed values and criteria that fail are summed up in one sentence; what is new is no change', () => {
  const before = byId(line('d', { value: quantity(40) }), line('tau', { value: quantity(39.8) }))
  const criterion = { demand: quantity(94.3), limit: quantity(60), satisfied: false }
  const after = [
    line('d', { value: quantity(30) }),
    line('tau', { value: quantity(94.3) }),
    line('C1', { criterion }),
    line('J', { value: quantity(1) }),
  ]
  expect(summariseChanges(before, after)).toEqual({
    sentence: '2 values changed, 1 criterion not satisfied',
    ids: ['d', 'tau'],
  })
})

test('nothing is said where nothing changed', () => {
  const same = line('d', { value: quantity(40) })
  expect(summariseChanges(byId(same), [same]).sentence).toBe('')
})

test('what waits on a change is everything that reads it, through others and through members', () => {
  const results = byId(
    line('d', {}),
    line('S1', { reads: ['d'] }),
    line('tau', { reads: ['S1.tau_max'] }),
    line('C1', { reads: ['tau'] }),
    line('L', {}),
  )
  expect([...waitingOn(['d'], results)].sort()).toEqual(['C1', 'S1', 'd', 'tau'])
  expect(usedBy('S1', results)).toEqual(['tau'])
})
