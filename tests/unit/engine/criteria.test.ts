import { describe, expect, test } from 'vitest'
import type { LineResult } from '@shared/engine/contracts'
import { criterion, engineWith, given } from '../../support/engineLines'

type Criterion = Parameters<typeof criterion>

const judged = (
  demand: string,
  limit: string,
  relation?: Criterion[3],
  more?: Criterion[4],
): LineResult | undefined =>
  engineWith([
    given('tau', '42', 'MPa'),
    given('tau_allow', '60', 'MPa'),
    given('T', '-800', 'N m'),
    given('F', '3', 'kN'),
    criterion('C1', demand, limit, relation, more),
  ]).result('C1')

const codes = (result: LineResult | undefined) => result?.problems.map(({ code }) => code)

describe('demand against limit', () => {
  test('satisfied, with demand over limit as its utilisation', () => {
    expect(judged('tau', 'tau_allow')?.criterion).toMatchObject({ satisfied: true, utilisation: 0.7 })
  })

  test('a lower limit: limit over demand', () => {
    expect(judged('tau', '21 MPa', '>=')?.criterion).toMatchObject({ satisfied: true, utilisation: 0.5 })
    expect(judged('tau', '84 MPa', '>=')?.criterion).toMatchObject({ satisfied: false, utilisation: 2 })
  })

  test('equality within 1e-9 satisfies ≤ and ≥, but not < and >', () => {
    const limit = '42.00000000001 MPa'
    const verdicts = (['<=', '>=', '<', '>'] as const).map(
      (relation) => judged('tau', limit, relation)?.criterion?.satisfied,
    )
    expect(verdicts).toEqual([true, true, false, false])
    expect(judged('tau', '41.9999 MPa')?.criterion?.satisfied).toBe(false)
  })

  test('within: both bounds, and the worse side counts', () => {
    expect(judged('tau', '40 MPa', 'within', { upper: '60 MPa' })?.criterion).toMatchObject({
      satisfied: true,
      utilisation: 40 / 42,
    })
    expect(judged('tau', '50 MPa', 'within', { upper: '60 MPa' })?.criterion?.satisfied).toBe(false)
    expect(codes(judged('tau', '60 MPa', 'within', { upper: '50 MPa' }))).toEqual(['out-of-range'])
    expect(codes(judged('tau', '60 MPa', 'within'))).toEqual(['missing-input'])
  })

  test('sides look as they were written', () => {
    const result = judged('tau', 'tau_allow')?.criterion
    expect([result?.demand.shown, result?.limit.shown]).toEqual(['42 MPa', '60 MPa'])
  })

  test('no utilisation against zero', () => {
    const result = judged('tau', '0', '>=')?.criterion
    expect(result?.satisfied).toBe(true)
    expect(result?.utilisation).toBeUndefined()
  })
})

describe('what cannot be judged', () => {
  test('a reversed torque does not pass an upper limit by its sign', () => {
    const result = judged('T', '1000 N m')
    expect(result?.state).toBe('problem')
    expect(result?.criterion).toBeUndefined()
    expect(result?.problems[0]).toMatchObject({ code: 'signed-demand', severity: 'error' })
    expect(result?.problems[0]?.repairs?.map(({ fields }) => fields)).toEqual([
      { demand: 'abs(T)' },
      { signed: 'true' },
    ])
  })

  test('repaired by its magnitude, or where the sign has a meaning', () => {
    expect(judged('abs(T)', '1000 N m')?.criterion).toMatchObject({ satisfied: true, utilisation: 0.8 })
    expect(judged('T', '1000 N m', '<=', { signed: true })?.criterion?.satisfied).toBe(true)
  })

  test('sides of different dimensions, in words', () => {
    const result = judged('tau', 'F')
    expect(codes(result)).toEqual(['dimension-mismatch'])
    expect(result?.problems[0]?.message).toContain('pressure')
    expect(result?.problems[0]?.message).toContain('force')
  })

  test('an empty side', () => {
    expect(codes(judged('', 'tau_allow'))).toEqual(['missing-input'])
  })
})
