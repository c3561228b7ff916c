import { describe, expect, test } from 'vitest'
import type { EngineLine, LineResult, SheetEngine } from '@shared/engine/contracts'
import { ReadingOrder, compare, type Place } from '@shared/engine/graph/readingOrder'
import { recomputation } from '@shared/engine/graph/topology'
import { criterion, engineWith, formula, given } from '../../support/engineLines'

const codes = (result: LineResult | undefined) => result?.problems.map(({ code }) => code) ?? []
const change = (line: EngineLine, after: string | null) => ({ id: line.id, after, line })
const changed = (answer: ReturnType<SheetEngine['apply']>) => answer.lines.map(({ id }) => id)

const shaft = () => [
  given('T', '800', 'N m'),
  given('d_o', '60.0', 'mm'),
  formula('W', 'pi*d_o^3/16'),
  formula('tau', 'T/W', 'MPa'),
  given('L', '1.5', 'm'),
]

describe('one given changes', () => {
  test('only what depends on it is answered, in reading order', () => {
    const engine = engineWith(shaft())
    const answer = engine.apply({ changes: [change(given('d_o', '40', 'mm'), 'T')] })
    expect(changed(answer)).toEqual(['d_o', 'W', 'tau'])
    expect(engine.result('tau')?.value?.shown).toBe('63.7 MPa')
  })

  test('a value that stays the same stops there', () => {
    const engine = engineWith([given('a', '2'), formula('b', 'abs(a)'), formula('c', 'b + 1')])
    expect(changed(engine.apply({ changes: [change(given('a', '-2'), null)] }))).toEqual(['a'])
  })

  test('another unit of the same size reaches those that show it, and no further', () => {
    const engine = engineWith([given('a', '1', 'm'), formula('b', '2*a'), formula('c', 'b*1 m to m^2')])
    expect(changed(engine.apply({ changes: [change(given('a', '1000', 'mm'), null)] }))).toEqual(['a', 'b'])
    expect(engine.result('b')?.value?.unit).toBe('mm')
  })

  test('another dimension upstream is found before numbers', () => {
    const engine = engineWith(shaft())
    engine.apply({ changes: [change(given('T', '800', 'N'), null)] })
    expect(engine.result('tau')?.state).toBe('problem')
    expect(engine.result('W')?.state).toBe('value')
  })
})

describe('definitions', () => {
  test('a symbol is defined once: the second line has the problem and a free name', () => {
    const engine = engineWith([...shaft(), given('d_o', '50', 'mm', 'second')])
    const second = engine.result('second')
    expect(codes(second)).toEqual(['duplicate-symbol'])
    expect(second?.problems[0]?.repairs?.[0]?.fields).toEqual({ symbol: 'd_o_2' })
    expect(engine.result('W')?.value?.si).toBeCloseTo((Math.PI * 0.06 ** 3) / 16, 12)
  })

  test('when the first definition goes, the second one counts', () => {
    const engine = engineWith([...shaft(), given('d_o', '50', 'mm', 'second')])
    engine.apply({ changes: [{ id: 'd_o', after: null, line: null }] })
    expect(engine.result('second')?.state).toBe('value')
    expect(engine.result('W')?.value?.si).toBeCloseTo((Math.PI * 0.05 ** 3) / 16, 12)
  })

  test('moving the second definition above the first makes it the one that counts', () => {
    const engine = engineWith([...shaft(), given('d_o', '50', 'mm', 'second')])
    engine.apply({ changes: [change(given('d_o', '50', 'mm', 'second'), null)] })
    expect(codes(engine.result('d_o'))).toEqual(['duplicate-symbol'])
    expect(engine.result('W')?.value?.si).toBeCloseTo((Math.PI * 0.05 ** 3) / 16, 12)
  })

  test('Greek typed or spelled is one symbol', () => {
    const engine = engineWith([given('τ_a', '60', 'MPa'), formula('x', '2*tau_a')])
    expect(engine.result('x')?.value?.shown).toBe('120 MPa')
  })

  test('an unknown symbol names the nearest ones, with a repair in its place', () => {
    const engine = engineWith([...shaft(), formula('r', 'd_i/2 + d_0')])
    const [first, second] = engine.result('r')?.problems ?? []
    expect(first?.code).toBe('unknown-symbol')
    expect(second?.message).toContain('d_o')
    expect(second?.span).toEqual({ field: 'expression', from: 8, to: 11 })
    expect(second?.repairs?.[0]?.fields).toEqual({ expression: 'd_i/2 + d_o' })
  })

  test('a name that is defined later mends the line and its suggestions', () => {
    const engine = engineWith([formula('r', 'd_i/2')])
    expect(codes(engine.result('r'))).toEqual(['unknown-symbol'])
    expect(engine.result('r')?.problems[0]?.repairs).toEqual([])
    engine.apply({ changes: [change(given('d_o', '60', 'mm'), null)] })
    expect(engine.result('r')?.problems[0]?.message).toContain('d_o')
    engine.apply({ changes: [change(given('d_i', '20', 'mm'), null)] })
    expect(engine.result('r')?.value?.shown).toBe('10.0 mm')
  })

  test('a use above its definition is an advisory, and the value stands', () => {
    const engine = engineWith([formula('r', 'd/2'), given('d', '40', 'mm')])
    expect(engine.result('r')?.value?.shown).toBe('20.0 mm')
    expect(engine.result('r')?.problems.map(({ code, severity }) => [code, severity])).toEqual([
      ['used-before-defined', 'advisory'],
    ])
    engine.apply({ changes: [change(given('d', '40', 'mm'), null)] })
    expect(codes(engine.result('r'))).toEqual([])
  })

  test('a quantity that takes the name of a unit makes a line ask', () => {
    const engine = engineWith([formula('x', '800 N m')])
    expect(engine.result('x')?.state).toBe('value')
    engine.apply({ changes: [change(given('m', '3', 'kg'), null)] })
    expect(codes(engine.result('x'))).toEqual(['ambiguous-unit'])
    engine.apply({ changes: [{ id: 'm', after: null, line: null }] })
    expect(engine.result('x')?.state).toBe('value')
  })

  test('a line that stands twice is a problem at its second place', () => {
    const engine = engineWith([given('a', '1'), { ...given('a', '1', '', 'a~2'), repeats: 'a' }])
    expect(engine.result('a')?.state).toBe('value')
    expect(codes(engine.result('a~2'))).toEqual(['repeated-line'])
  })
})

describe('circles', () => {
  const circle = () => [
    formula('a', 'b + 1'),
    formula('b', 'c*2'),
    formula('c', 'a - 1'),
    formula('x', 'a + 5'),
    formula('y', 'x*2'),
    given('free', '7'),
  ]

  test('names all its lines; what is merely behind it waits', () => {
    const engine = engineWith(circle())
    for (const id of ['a', 'b', 'c']) {
      const problem = engine.result(id)?.problems.find(({ code }) => code === 'circular')
      expect(problem?.message).toBe('a, b and c are computed from one another in a circle.')
    }
    expect(engine.result('x')).toMatchObject({ state: 'waits', waitsFor: ['a'] })
    expect(engine.result('y')).toMatchObject({ state: 'waits', waitsFor: ['a'] })
    expect(engine.result('free')?.state).toBe('value')
  })

  test('opened at one line, all of them have values again', () => {
    const engine = engineWith(circle())
    engine.apply({ changes: [change(formula('c', '3'), 'b')] })
    expect(['a', 'b', 'c', 'x', 'y'].map((id) => engine.result(id)?.value?.si)).toEqual([7, 6, 3, 12, 24])
  })

  test('closed by an edit, none keeps its old number', () => {
    const engine = engineWith([...circle().slice(0, 2), formula('c', '3'), ...circle().slice(3)])
    engine.apply({ changes: [change(formula('c', 'a - 1'), 'b')] })
    expect(['a', 'b', 'c', 'x'].map((id) => engine.result(id)?.value)).toEqual(Array(4).fill(undefined))
  })

  test('a line that reads itself', () => {
    const engine = engineWith([formula('d', 'd + 1')])
    expect(engine.result('d')?.problems[0]?.message).toBe('d is computed from itself.')
  })

  test('a chain of ten thousand lines, and the circle that closes it', () => {
    const chain = Array.from({ length: 10_000 }, (_, i) =>
      i === 0 ? given('x_0', '1') : formula(`x_${i}`, `x_${i - 1} + 1`),
    )
    const engine = engineWith(chain)
    expect(engine.result('x_9999')?.value?.si).toBe(10_000)
    engine.apply({ changes: [change(formula('x_0', 'x_9999'), null)] })
    expect(codes(engine.result('x_5000'))).toEqual(['circular'])
  })
})

describe('waiting', () => {
  test('one bad line leaves independent lines alive; dependents say what they wait for', () => {
    const engine = engineWith([
      given('d_o', 'sixty', 'mm'),
      formula('W', 'pi*d_o^3/16'),
      formula('W_2', '2*W'),
      given('L', '2', 'm'),
      formula('half', 'L/2'),
      criterion('C1', 'W_2', '1000 mm^3'),
    ])
    expect(engine.result('d_o')?.state).toBe('problem')
    expect(engine.result('W_2')).toMatchObject({ state: 'waits', waitsFor: ['d_o'] })
    expect(engine.result('C1')).toMatchObject({ state: 'waits', waitsFor: ['d_o'] })
    expect(engine.result('half')?.value?.shown).toBe('1.00 m')
  })
})

describe('reading order', () => {
  test('stays right under ten thousand insertions at the same place', () => {
    const order = new ReadingOrder<number>()
    const places: Place<number>[] = [order.insert(0, null)]
    for (let i = 1; i <= 10_000; i += 1) places.push(order.insert(i, places[0] as Place<number>))
    expect([...order].slice(0, 3)).toEqual([0, 10_000, 9_999])
    for (let i = 1; i < 10_000; i += 1) {
      expect(compare(places[i + 1] as Place<number>, places[i] as Place<number>)).toBeLessThan(0)
    }
  })

  test('stays right when lines are taken out and always put first', () => {
    const order = new ReadingOrder<number>()
    let last = order.insert(-1, null)
    for (let i = 0; i < 5_000; i += 1) {
      const place = order.insert(i, null)
      expect(compare(place, last)).toBeLessThan(0)
      if (i % 3 === 0) order.remove(last)
      last = place
    }
  })
})

describe('order of recomputation', () => {
  const graph: Record<string, string[]> = {
    a: ['b', 'c'],
    b: ['d'],
    c: ['d'],
    d: [],
    p: ['q'],
    q: ['p', 'r'],
    r: ['a'],
  }
  const dependents = (node: string) => graph[node] ?? []

  test('everything comes after what it depends on, and nothing that is not concerned', () => {
    expect(recomputation(['b'], dependents)).toEqual({ order: ['b', 'd'], circles: [] })
    const { order } = recomputation(['a'], dependents)
    expect(order[0]).toBe('a')
    expect(order.at(-1)).toBe('d')
  })

  test('what is left over is a circle, and what hangs on it comes after it', () => {
    const { order, circles } = recomputation(['p'], dependents)
    expect(circles.map((circle) => circle.sort())).toEqual([['p', 'q']])
    expect(order.indexOf('r')).toBeGreaterThan(order.indexOf('q'))
    expect(order.indexOf('d')).toBe(order.length - 1)
  })
})
