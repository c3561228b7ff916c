/** The engine after any sequence of edits says what an engine from scratch says of the same sheet. */
import fc from 'fast-check'
import { expect, test } from 'vitest'
import type { Change, EngineLine } from '@shared/engine/contracts'
import { createSheetEngine, insertions } from '@shared/pipeline'

const symbols = ['a', 'b', 'c', 'd', 'm', 'd_o', 'd_i']
const symbol = fc.constantFrom(...symbols, '', '🙂')
const expression = fc.oneof(
  fc
    .tuple(fc.constantFrom(...symbols), fc.constantFrom('+', '*', '/', '-'), fc.constantFrom(...symbols))
    .map((parts) => parts.join(' ')),
  fc.constantFrom(
    ...symbols,
    '2*a',
    'sqrt(b)',
    '800 N m',
    '3 m',
    'd_0 + d_1',
    'S.x',
    'a.x',
    'C',
    'b = ',
    'max(a, 0)',
    'a to mm',
  ),
)
const content: fc.Arbitrary<Omit<EngineLine, 'id'>> = fc.oneof(
  fc.record({
    kind: fc.constant('given' as const),
    symbol,
    value: fc.constantFrom('1', '2', '0', '-3', 'x', '60.0'),
    unit: fc.constantFrom('', 'mm', 'm', 'kg', 'N m', 'rpm', 'zz'),
  }),
  fc.record({
    kind: fc.constant('formula' as const),
    symbol,
    expression,
    unit: fc.constantFrom('', '', '', 'mm'),
  }),
  fc.record({ kind: fc.constant('formula' as const), symbol, expression, unit: fc.constant('') }),
  fc.record({
    kind: fc.constant('criterion' as const),
    symbol: fc.constantFrom('C', 'C_2', ''),
    demand: expression,
    limit: expression,
    relation: fc.constantFrom('<=' as const, '>' as const),
  }),
  fc.record({ kind: fc.constant('inert' as const), symbol, note: fc.constant('cases') }),
)

type Edit =
  | { edit: 'insert'; at: number; content: Omit<EngineLine, 'id'> }
  | { edit: 'rewrite'; at: number; content: Omit<EngineLine, 'id'> }
  | { edit: 'move'; at: number; to: number }
  | { edit: 'delete'; at: number }
  | { edit: 'units'; system: 'SI' | 'US' }

const place = fc.nat(1000)
const edit: fc.Arbitrary<Edit> = fc.oneof(
  { weight: 4, arbitrary: fc.record({ edit: fc.constant('insert' as const), at: place, content }) },
  { weight: 4, arbitrary: fc.record({ edit: fc.constant('rewrite' as const), at: place, content }) },
  { weight: 2, arbitrary: fc.record({ edit: fc.constant('move' as const), at: place, to: place }) },
  { weight: 2, arbitrary: fc.record({ edit: fc.constant('delete' as const), at: place }) },
  {
    weight: 1,
    arbitrary: fc.record({
      edit: fc.constant('units' as const),
      system: fc.constantFrom('SI' as const, 'US' as const),
    }),
  },
)

/** A sheet as a plain list, and the changes that an editor would send for the same edit. */
class Sheet {
  lines: EngineLine[] = []
  system: 'SI' | 'US' = 'SI'
  private next = 0

  take(edit: Edit): Change[] {
    if (edit.edit === 'units') {
      this.system = edit.system
      return []
    }
    if (edit.edit === 'insert') {
      const at = edit.at % (this.lines.length + 1)
      const line = { ...edit.content, id: `l${(this.next += 1)}` } as EngineLine
      this.lines.splice(at, 0, line)
      return [this.put(line)]
    }
    const at = edit.at % Math.max(1, this.lines.length)
    const line = this.lines[at]
    if (!line) return []
    if (edit.edit === 'delete') {
      this.lines.splice(at, 1)
      return [{ id: line.id, after: null, line: null }]
    }
    if (edit.edit === 'move') {
      this.lines.splice(at, 1)
      this.lines.splice(edit.to % (this.lines.length + 1), 0, line)
      return [this.put(line)]
    }
    const rewritten = { ...edit.content, id: line.id } as EngineLine
    this.lines[at] = rewritten
    return [this.put(rewritten)]
  }

  private put(line: EngineLine): Change {
    return { id: line.id, after: this.lines[this.lines.indexOf(line) - 1]?.id ?? null, line }
  }

  get settings() {
    return { unitSystem: this.system, digits: 3 }
  }
}

test('incremental is the same as from scratch, and says of every line that differs that it does', () => {
  fc.assert(
    fc.property(
      fc.array(fc.array(edit, { minLength: 1, maxLength: 3 }), { minLength: 1, maxLength: 25 }),
      (groups) => {
        const sheet = new Sheet()
        const engine = createSheetEngine()
        const told = new Map<string, unknown>()
        for (const group of groups) {
          const changes = group.flatMap((one) => sheet.take(one))
          const settings = group.some((one) => one.edit === 'units') ? { settings: sheet.settings } : {}
          for (const result of engine.apply({ ...settings, changes }).lines) told.set(result.id, result)
        }
        const scratch = createSheetEngine()
        scratch.apply({ settings: sheet.settings, changes: insertions(sheet.lines) })
        expect(engine.results()).toEqual(scratch.results())
        expect(engine.nomenclature()).toEqual(scratch.nomenclature())
        expect(sheet.lines.map(({ id }) => told.get(id))).toEqual(engine.results())
      },
    ),
    { numRuns: 600 },
  )
}, 120_000)
