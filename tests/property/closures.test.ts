/** Both compiled forms give the bits that mathjs' own evaluation gives, wherever that is a finite real number. */
import fc from 'fast-check'
import { all, create } from 'mathjs'
import { expect, test } from 'vitest'
import { BLOCK, compileBlock } from '@shared/engine/evaluate/block'
import { builtins } from '@shared/engine/evaluate/builtins'
import { Fault } from '@shared/engine/evaluate/fault'
import { compileScalar } from '@shared/engine/evaluate/scalar'
import { parseExpression } from '@shared/engine/parse/parse'

// Comparisons have no absolute tolerance here: see `evaluate/numbers.ts`.
const { compile } = create(all ?? {}, { absTol: 0 })

const names = ['x', 'y', 'z']
const leaf = fc.oneof(
  fc.constantFrom(...names, 'pi'),
  fc.integer({ min: 0, max: 9 }).map(String),
  fc.double({ min: 0.001, max: 999, noNaN: true }).map((value) => value.toFixed(3)),
)
const { expression } = fc.letrec<{ expression: string }>((tie) => ({
  expression: fc.oneof(
    { depthSize: 'small' },
    leaf,
    fc
      .tuple(tie('expression'), fc.constantFrom('+', '-', '*', '/'), tie('expression'))
      .map(([a, operator, b]) => `(${a}) ${operator} (${b})`),
    fc
      .tuple(tie('expression'), fc.constantFrom('2', '3', '4', '0.5', '(1/3)', '(-1)', '(-2)'))
      .map(([a, power]) => `(${a})^${power}`),
    fc
      .tuple(
        fc.constantFrom('sqrt', 'abs', 'exp', 'sin', 'cos', 'tan', 'sinh', 'tanh', 'cbrt'),
        tie('expression'),
      )
      .map(([name, a]) => `${name}(${a})`),
    tie('expression').map((a) => `-(${a})`),
    fc
      .tuple(
        tie('expression'),
        fc.constantFrom('<', '<=', '>', '>='),
        tie('expression'),
        tie('expression'),
        tie('expression'),
      )
      .map(([a, relation, b, c, d]) => `((${a}) ${relation} (${b}) ? (${c}) : (${d}))`),
  ),
}))
const number = fc.integer({ min: -1_000_000, max: 1_000_000 }).map((value) => value / 1000)
const column = fc.array(number, { minLength: 5, maxLength: 5 })

const context = (text: string) => ({
  text,
  functions: builtins,
  displayFactor: () => 1,
  along: () => () => NaN,
})

const sameBits = (a: number, b: number): boolean => Object.is(a, b) || (a === 0 && b === 0)

test('scalar and block have the bits of mathjs', () => {
  let compared = 0
  fc.assert(
    fc.property(expression, column, column, column, (text, x, y, z) => {
      const { parsed } = parseExpression(text, { isDefined: () => true, functions: builtins })
      fc.pre(parsed !== undefined)
      if (!parsed) return
      const registers = new Map(names.map((name) => [name, { si: 0 }]))
      const scalar = compileScalar(parsed.root, {
        ...context(text),
        register: (name) => registers.get(name) ?? { si: NaN },
      })
      const block = compileBlock(parsed.root, { ...context(text), columnOf: (name) => names.indexOf(name) })
      const blockValues = block(
        [x, y, z].map((values) => Float64Array.from({ length: BLOCK }, (_, i) => values[i] ?? 0)),
        5,
      )
      const theirs = compile(text)
      x.forEach((_, i) => {
        const values = { x: x[i] ?? 0, y: y[i] ?? 0, z: z[i] ?? 0 }
        for (const [name, register] of registers) register.si = Reflect.get(values, name) as number
        let ours: number
        try {
          ours = scalar()
        } catch (error) {
          expect(error).toBeInstanceOf(Fault)
          return
        }
        const expected: unknown = theirs.evaluate(values)
        if (typeof expected !== 'number' || !Number.isFinite(expected)) return
        compared += 1
        expect(
          sameBits(ours, expected),
          `${text} at ${JSON.stringify(values)}: ${ours} against ${expected}`,
        ).toBe(true)
        const inBlock = blockValues[i] ?? NaN
        // A branch that is not taken may have no value; only what was chosen counts.
        expect(sameBits(inBlock, ours), `block: ${text} at ${JSON.stringify(values)}`).toBe(true)
      })
    }),
    { numRuns: 1_500 },
  )
  expect(compared).toBeGreaterThan(2_000)
}, 120_000)

test('the least and the greatest are exact, also where two values almost agree', () => {
  fc.assert(
    fc.property(fc.double({ noNaN: true }), fc.double({ noNaN: true }), (a, b) => {
      expect(builtins.get('min')?.evaluate([a, b])).toBe(Math.min(a, b))
      expect(builtins.get('max')?.evaluate([a, b])).toBe(Math.max(a, b))
    }),
  )
})
