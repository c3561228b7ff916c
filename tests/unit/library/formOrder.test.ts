import type { LineResult } from '@shared/engine/contracts'
import { lineSchema } from '@shared/sheet/kinds'
import { describe, expect, test } from 'vitest'
import { formOrder, governing } from '@/components/library/formOrder'

const given = (symbol: string) =>
  lineSchema.parse({ id: symbol, symbol, kind: 'given', value: '1', unit: 'mm' })
const formula = (symbol: string) => lineSchema.parse({ id: symbol, symbol, kind: 'formula', expression: '1' })
const criterion = (id: string) => lineSchema.parse({ id, kind: 'criterion', demand: 'tau', limit: 'tau_all' })

const result = (id: string, reads: string[], more: Partial<LineResult> = {}): [string, LineResult] => [
  id,
  { id, symbol: id, state: 'value', waitsFor: [], problems: [], reads, ...more },
]

const quantity = { si: 1, dimension: {}, unit: '', number: 1, shown: '1' } as never
const judged = (id: string, satisfied: boolean, utilisation?: number): LineResult =>
  result(id, [], {
    criterion: {
      demand: quantity,
      limit: quantity,
      satisfied,
      ...(utilisation === undefined ? {} : { utilisation }),
    },
  })[1]

describe('the form of a template', () => {
  test('a criterion stands under the last given that it needs, through the formulas between', () => {
    const lines = [
      given('T'),
      given('d'),
      formula('tau'),
      given('tau_all'),
      given('L'),
      criterion('strength'),
    ]
    const results = new Map([result('tau', ['T', 'd']), result('strength', ['tau', 'tau_all'])])
    const steps = formOrder(lines, results).map((step) => [
      step.given.symbol,
      step.criteria.map(({ id }) => id),
    ])
    expect(steps).toEqual([
      ['T', []],
      ['d', []],
      ['tau_all', ['strength']],
      ['L', []],
    ])
  })

  test('a member of an analysis counts as that analysis', () => {
    const lines = [given('d'), formula('S1'), given('L'), criterion('strength')]
    const results = new Map([result('S1', ['d']), result('strength', ['S1.tau_max'])])
    expect(formOrder(lines, results)[0]?.criteria).toHaveLength(1)
  })

  test('a circle of formulas does not hang the form; its criterion stands at the end', () => {
    const lines = [given('d'), formula('a'), formula('b'), criterion('strength')]
    const results = new Map([result('a', ['b']), result('b', ['a']), result('strength', ['a'])])
    expect(formOrder(lines, results).at(-1)?.criteria).toHaveLength(1)
  })
})

describe('the governing criterion', () => {
  test('is the one with the highest utilisation', () => {
    expect(governing([judged('twist', true, 0.4), judged('strength', true, 0.9)])?.id).toBe('strength')
  })

  test('is one that is not satisfied, even where its utilisation has no number', () => {
    expect(governing([judged('strength', true, 0.9), judged('reversed', false)])?.id).toBe('reversed')
  })

  test('is none where nothing has been judged', () => {
    expect(governing([result('tau', [])[1]])).toBeUndefined()
  })
})
