import { describe, expect, test } from 'vitest'
import { presentCriterion, presentGiven, type CriterionView } from '@shared/engine/display'
import type { CriterionResult } from '@shared/engine/contracts'
import { number, over, quantity, symbol, times, value } from './build'

describe('a given', () => {
  test('keeps number and unit as typed', () => {
    const line = presentGiven({ id: 'a', symbol: 'd_o', value: '60.0', unit: 'mm' })
    expect(line.screen).toEqual({ symbol: 'd_{\\mathrm{o}}', result: '{=}\\;60.0\\,\\mathrm{mm}' })
    expect(line.speech).toBe('d o equals 60.0 millimetre')
  })

  test('shows equal deviations with one sign, unequal ones above each other', () => {
    const line = (plus: string, minus: string) =>
      presentGiven({ id: 'a', symbol: 'd', value: '60', unit: 'mm', tolerance: { plus, minus } })
    expect(line('0.1', '0.1').screen.result).toBe('{=}\\;60\\,\\mathrm{mm}\\pm 0.1\\,\\mathrm{mm}')
    expect(line('+0.1', '-0.2').screen.result).toBe('{=}\\;60\\,\\mathrm{mm}\\,{}^{+0.1}_{-0.2}')
    expect(line('0.1', '0.2').speech).toBe('d equals 60 millimetre plus 0.1 minus 0.2')
  })

  test('shows its fit', () => {
    const line = presentGiven({ id: 'a', symbol: 'd', value: '40', unit: 'mm', tolerance: { fit: 'k6' } })
    expect(line.screen.result).toBe('{=}\\;40\\,\\mathrm{mm}\\ \\mathrm{k6}')
    expect(line.speech).toBe('d equals 40 millimetre, fit k6')
  })

  test('without a number shows its symbol alone', () => {
    expect(presentGiven({ id: 'a', symbol: 'G', value: '', unit: 'GPa' }).screen).toEqual({ symbol: 'G' })
  })

  test('whose number cannot be read shows what was typed, harmlessly', () => {
    const line = presentGiven({ id: 'a', symbol: 'd', value: '\\href{x}', unit: '}%' })
    expect(line.screen.result).toBe(
      '{=}\\;\\mathrm{\\square href\\square x\\square }\\,\\mathrm{\\square \\%}',
    )
  })
})

describe('a criterion', () => {
  const result = (demand: number, limit: number, upper?: number): CriterionResult => ({
    demand: value(`${demand} MPa`, 'MPa', demand),
    limit: value(`${limit} MPa`, 'MPa', limit),
    ...(upper !== undefined && { upper: value(`${upper} MPa`, 'MPa', upper) }),
    satisfied: upper === undefined ? demand <= limit : demand >= limit && demand <= upper,
  })
  const view = (given: Partial<CriterionView>): CriterionView => ({
    id: 'C1',
    symbol: 'C1',
    relation: '<=',
    demand: symbol('tau'),
    limit: symbol('tau_allow'),
    substitute: () => undefined,
    ...given,
  })

  test('shows the requirement and the comparison of the values', () => {
    const line = presentCriterion(view({ result: result(42.1, 60) }))
    expect(line.screen).toEqual({
      symbol: '\\mathrm{C1}',
      symbolic: '\\tau\\le \\tau_{\\mathrm{allow}}',
      result: '\\tau=42.1\\,\\mathrm{MPa}\\le 60\\,\\mathrm{MPa}',
    })
    expect(line.speech).toBe(
      'C1: tau is at most tau allow, tau equals 42.1 megapascal is at most 60 megapascal',
    )
  })

  test('that is not met states nothing false', () => {
    const line = presentCriterion(view({ result: result(84.2, 60), limit: quantity('60', 'MPa') }))
    expect(line.screen.result).toBe('\\tau=84.2\\,\\mathrm{MPa}\\nleq 60\\,\\mathrm{MPa}')
    expect(line.print.result).toMatchObject({
      items: expect.arrayContaining([{ math: 'operator', text: '≰' }]),
    })
    expect(line.speech).toContain('is not at most 60 megapascal')
  })

  test('shows both bounds of within, and which one fails', () => {
    const within = view({ relation: 'within', limit: quantity('10', 'MPa'), upper: quantity('60', 'MPa') })
    expect(presentCriterion({ ...within, result: result(42, 10, 60) }).screen).toMatchObject({
      symbolic: '10\\,\\mathrm{MPa}\\le \\tau\\le 60\\,\\mathrm{MPa}',
      result: '10\\,\\mathrm{MPa}\\le \\tau=42\\,\\mathrm{MPa}\\le 60\\,\\mathrm{MPa}',
    })
    expect(presentCriterion({ ...within, result: result(84, 10, 60) }).screen.result).toBe(
      '10\\,\\mathrm{MPa}\\le \\tau=84\\,\\mathrm{MPa}\\nleq 60\\,\\mathrm{MPa}',
    )
    expect(presentCriterion({ ...within, result: result(5, 10, 60) }).screen.result).toBe(
      '10\\,\\mathrm{MPa}\\nleq \\tau=5\\,\\mathrm{MPa}\\le 60\\,\\mathrm{MPa}',
    )
  })

  test('with a compound demand shows its values, then the comparison', () => {
    const line = presentCriterion(
      view({
        demand: over(times(number('2'), symbol('T')), symbol('W')),
        substitute: (name) => (name === 'T' ? value('8 kN m', 'kN m') : undefined),
        result: result(42, 60),
      }),
    )
    expect(line.screen.substituted).toBe(
      '\\dfrac{2\\cdot 8\\,\\mathrm{kN}{\\cdot}\\mathrm{m}}{W}\\le \\tau_{\\mathrm{allow}}',
    )
    expect(line.screen.result).toBe('42\\,\\mathrm{MPa}\\le 60\\,\\mathrm{MPa}')
  })

  test('with a side missing shows a gap', () => {
    const { limit: _, ...unfinished } = view({})
    expect(presentCriterion(unfinished).screen.symbolic).toBe('\\tau\\le \\mathrm{\\ldots }')
  })
})
