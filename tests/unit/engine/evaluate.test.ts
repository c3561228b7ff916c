import { describe, expect, test } from 'vitest'
import type { EngineLine, LineResult } from '@shared/engine/contracts'
import { createSheetEngine, insertions } from '@shared/pipeline'
import { engineWith, formula, given } from '../../support/engineLines'

const shaft = [
  given('d_o', '60', 'mm'),
  given('d_i', '60.0', 'mm'),
  given('T', '800', 'N m'),
  given('n', '1450', 'rpm'),
]

const resultOf = (line: EngineLine, others: EngineLine[] = shaft): LineResult => {
  const result = engineWith([...others, line]).result(line.id)
  if (!result) throw new Error('The engine lost a line')
  return result
}
const codes = (result: LineResult) => result.problems.map(({ code }) => code)

describe('givens', () => {
  test('stay as typed', () => {
    expect(resultOf(given('d', '60.0', 'mm')).value).toMatchObject({
      si: 0.06,
      number: 60,
      unit: 'mm',
      shown: '60.0 mm',
    })
  })

  test('temperatures are absolute', () => {
    expect(resultOf(given('theta', '20', 'degC')).value?.si).toBeCloseTo(293.15, 9)
  })

  test('percent is a fraction', () => {
    expect(resultOf(given('eta', '96', '%')).value).toMatchObject({ si: 0.96, shown: '96 %' })
  })

  test('a rate in 1/s asks what it counts, until its author has said that it is a plain rate', () => {
    expect(codes(resultOf(given('f', '25', '1/s')))).toEqual(['ambiguous-rate'])
    expect(resultOf({ ...given('f', '25', '1/s'), plainRate: true } as EngineLine).value?.si).toBe(25)
  })

  test('outside the range of validity: a problem, not a number', () => {
    const result = resultOf({ ...given('d', '65', 'mm'), range: { from: '10', to: '60' } } as EngineLine)
    expect(codes(result)).toEqual(['out-of-range'])
    expect(result.problems[0]?.message).toContain('from 10 mm up to 60 mm')
    expect(result.value).toBeUndefined()
  })

  test('a tolerance that cannot be read', () => {
    expect(codes(resultOf({ ...given('d', '60', 'mm'), tolerance: { fit: 'k' } } as EngineLine))).toEqual([
      'invalid-field',
    ])
    expect(codes(resultOf({ ...given('d', '60', 'mm'), tolerance: { fit: 'k6' } } as EngineLine))).toEqual([])
    const plus = { ...given('d', '60', 'mm'), tolerance: { plus: 'x', minus: '0.1' } } as EngineLine
    expect(resultOf(plus).problems[0]?.span?.field).toBe('tolerance.plus')
  })

  test('an unknown unit, an empty value, a decimal comma', () => {
    expect(codes(resultOf(given('d', '60', 'furlong')))).toEqual(['unknown-unit'])
    expect(codes(resultOf(given('d', '', 'mm')))).toEqual(['missing-input'])
    expect(codes(resultOf(given('d', '60,5', 'mm')))).toEqual(['decimal-comma'])
  })
})

describe('bad input gets a clear problem and loses nothing else', () => {
  const cases: [what: string, line: EngineLine, code: string, words: RegExp][] = [
    ['a unit that does not fit', formula('W', 'pi*d_o^3/16', 'MPa'), 'dimension-mismatch', /MPa|pressure/],
    ['an unknown symbol', formula('x', '2*dd_o'), 'unknown-symbol', /dd_o is not defined/],
    ['1/2 m', formula('x', '1/2 m'), 'ambiguous-division', /./],
    ['a speed in turns as an angular speed', formula('P', 'n*T', 'kW'), 'dimension-mismatch', /turns/],
    ['division by zero', formula('x', 'T/(d_o - d_i)'), 'domain', /Division by zero: .*d_o - d_i.* is zero/],
    [
      'division by zero that a second one would hide',
      formula('x', '1/(1/(d_o - d_i)*1 mm)'),
      'domain',
      /is zero/,
    ],
    ['a root of a negative', formula('x', 'sqrt(d_i - 2*d_o)'), 'domain', /negative/],
    ['a broken power of a negative', formula('x', '(d_i/d_o - 2)^0.5'), 'domain', /negative/],
    ['too large a number', formula('x', '(1e200)^2'), 'not-finite', /too large/],
    ['10 000 characters', formula('x', '1+'.repeat(5_000) + '1'), 'limit-exceeded', /./],
    ['deeply nested brackets', formula('x', '('.repeat(500) + '1' + ')'.repeat(500)), 'limit-exceeded', /./],
    ['an emoji as a symbol', given('🙂', '1'), 'invalid-field', /🙂 cannot stand in a symbol/],
    ['an emoji in an expression', formula('x', '2*🙂'), 'syntax', /./],
    ['a novel', formula('x', 'It was a dark and stormy night. '.repeat(400)), 'limit-exceeded', /./],
    ['a line that reads itself', formula('x', 'x + 1'), 'circular', /from itself/],
    ['no right side', formula('x', '  '), 'missing-input', /no right side/],
    ['no symbol', given('', '1'), 'missing-input', /symbol is missing/],
  ]
  test.each(cases)('%s', (_, line, code, words) => {
    const engine = engineWith([...shaft, line, formula('half', 'd_o/2', '', 'independent')])
    const problems = engine.result(line.id)?.problems ?? []
    expect(problems.map((problem) => problem.code)).toContain(code)
    expect(problems.find((problem) => problem.code === code)?.message).toMatch(words)
    expect(problems.every(({ lineId }) => lineId === line.id)).toBe(true)
    expect(engine.result(line.id)?.value).toBeUndefined()
    expect(engine.result('independent')?.value?.shown).toBe('30.0 mm')
  })

  test('a product that goes through zero shows zero, and never minus zero', () => {
    expect(resultOf(formula('x', '-(d_o - d_i)')).value?.shown).toBe('0 mm')
  })
})

describe('display units', () => {
  test('what is handed on keeps its unit; a torque stays N m', () => {
    expect(resultOf(formula('d', '1.2*d_o')).value?.shown).toBe('72.0 mm')
    expect(resultOf(formula('d', 'max(d_o, 1 m)')).value?.unit).toBe('mm')
    expect(resultOf(formula('M', '2*T')).value?.shown).toBe('1600 N m')
    expect(resultOf(formula('M', 'T/d_o*d_i')).value?.unit).toBe('N m')
  })

  test('digits of a formula, and of the sheet', () => {
    expect(resultOf({ ...formula('x', 'd_o/7'), digits: 6 } as EngineLine).value?.shown).toBe('8.57143 mm')
    const engine = engineWith([...shaft, formula('x', 'd_o/7')])
    engine.apply({ settings: { unitSystem: 'SI', digits: 5 }, changes: [] })
    expect(engine.result('x')?.value?.shown).toBe('8.5714 mm')
  })

  test('numerical_value marks a line as empirical', () => {
    const result = resultOf(formula('K', 'numerical_value(d_o, mm)^2'))
    expect(result.value?.si).toBeCloseTo(3600, 9)
    expect(result.empirical).toBe(true)
  })
})

describe('quoted values', () => {
  const withQuotes = (symbol: string, unit?: string, digits?: number) => {
    const engine = createSheetEngine()
    const lines = [...shaft, formula('r', 'd_o/2')]
    const quotes = [
      { id: 'q', symbol, ...(unit !== undefined && { unit }), ...(digits !== undefined && { digits }) },
    ]
    return { engine, answer: engine.apply({ quotes, changes: insertions(lines) }).quotes[0] }
  }

  test('follow their line, in another unit and with other digits', () => {
    expect(withQuotes('r').answer?.value?.shown).toBe('30.0 mm')
    expect(withQuotes('r', 'm', 2).answer?.value?.shown).toBe('0.030 m')
    expect(withQuotes('r', 'kg').answer).toMatchObject({
      state: 'problem',
      problem: { code: 'unit-mismatch' },
    })
    expect(withQuotes('nothing').answer).toMatchObject({
      state: 'problem',
      problem: { code: 'unknown-symbol' },
    })
  })

  test('are answered again when a value upstream changes, and only then', () => {
    const { engine } = withQuotes('r')
    const other = engine.apply({ changes: [{ id: 'T', after: 'd_i', line: given('T', '900', 'N m') }] })
    expect(other.quotes).toEqual([])
    const mine = engine.apply({ changes: [{ id: 'd_o', after: null, line: given('d_o', '80', 'mm') }] })
    expect(mine.quotes[0]?.value?.shown).toBe('40.0 mm')
  })
})

test('nomenclature: every quantity in order of definition, with the lines that use it', () => {
  const rows = engineWith([...shaft, formula('r', 'd_o/2')]).nomenclature()
  expect(rows.map(({ symbol }) => symbol)).toEqual(['d_o', 'd_i', 'T', 'n', 'r'])
  expect(rows[0]).toMatchObject({ lineId: 'd_o', usedIn: ['r'], value: { shown: '60 mm' } })
})

test('a line is presented in symbols, with values, and spoken', () => {
  const presentation = engineWith([...shaft, formula('r', 'd_o/2')]).present('r')
  expect(presentation?.screen.symbolic).toContain('d')
  expect(presentation?.screen.result).toContain('30.0')
  expect(presentation?.speech).toContain('30.0')
})

test('a contested line computes with the version that stands in it, and says so', () => {
  const result = resultOf({ ...given('d', '60', 'mm'), contested: true })
  expect(result).toMatchObject({ state: 'value', value: { shown: '60 mm' } })
  expect(codes(result)).toEqual(['contested'])
})
