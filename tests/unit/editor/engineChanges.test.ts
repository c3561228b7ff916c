import fc from 'fast-check'
import { describe, expect, test } from 'vitest'
import { lineSchema, type Line } from '@shared/sheet/kinds'
import { changesSince, type Told } from '@/composables/engineChanges'

const given = (id: string, value = '1'): Line => lineSchema.parse({ kind: 'given', id, symbol: id, value })
const linesOf = (...lines: Line[]) => new Map(lines.map((line) => [line.id, line]))
const nothing = (): Told => ({ order: [], lines: new Map() })

/** The order that an engine has which was told these changes. */
const carriedOut = (order: string[], changes: ReturnType<typeof changesSince>): string[] =>
  changes.reduce((before, { id, after, line }) => {
    const without = before.filter((other) => other !== id)
    if (!line) return without
    const at = after === null ? 0 : without.indexOf(after) + 1
    return [...without.slice(0, at), id, ...without.slice(at)]
  }, order)

describe('what the engine is told', () => {
  test('a sheet that is opened is told line by line, each after the one above', () => {
    const changes = changesSince(nothing(), ['a', 'b'], linesOf(given('a'), given('b')))
    expect(changes.map(({ id, after }) => [id, after])).toEqual([
      ['a', null],
      ['b', 'a'],
    ])
  })

  test('a changed value is one change, and nothing else is sent', () => {
    const told = nothing()
    const [a, b, c] = [given('a'), given('b'), given('c')]
    changesSince(told, ['a', 'b', 'c'], linesOf(a, b, c))
    const changes = changesSince(told, ['a', 'b', 'c'], linesOf(a, given('b', '2'), c))
    expect(changes.map(({ id }) => id)).toEqual(['b'])
  })

  test('a line put between two others does not send its neighbours again', () => {
    const told = nothing()
    const lines = linesOf(given('a'), given('b'), given('c'))
    changesSince(told, ['a', 'c'], lines)
    expect(changesSince(told, ['a', 'b', 'c'], lines).map(({ id, after }) => [id, after])).toEqual([
      ['b', 'a'],
    ])
  })

  test('a removed line is told as gone', () => {
    const told = nothing()
    const lines = linesOf(given('a'), given('b'))
    changesSince(told, ['a', 'b'], lines)
    expect(changesSince(told, ['b'], lines)).toEqual([{ id: 'a', after: null, line: null }])
  })

  test('whatever is moved, added and removed, the engine ends with the order of the sheet', () => {
    const ids = ['a', 'b', 'c', 'd', 'e', 'f']
    const order = fc.shuffledSubarray(ids)
    fc.assert(
      fc.property(order, order, (before, after) => {
        const told = nothing()
        const lines = linesOf(...ids.map((id) => given(id)))
        const first = carriedOut([], changesSince(told, before, lines))
        expect(first).toEqual(before)
        expect(carriedOut(first, changesSince(told, after, lines))).toEqual(after)
      }),
    )
  })
})
