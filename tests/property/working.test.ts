/**
 * What the checker reads is what was computed: the expression of every step of `working`, read by the sheet's
 * own parser and evaluated with the step's own values, has the step's dimension and its value.
 */
import fc from 'fast-check'
import { expect, test } from 'vitest'
import { analyses } from '@shared/analyses/registry'
import type { SolvedInput, WorkingStep } from '@shared/engine/contracts'
import { checkDimensions } from '@shared/engine/dimensions/check'
import { builtins } from '@shared/engine/evaluate/builtins'
import { compileScalar } from '@shared/engine/evaluate/scalar'
import { parseExpression } from '@shared/engine/parse/parse'

/** Sums that cancel are as exact as the greatest of their kind: torques against the greatest torque. */
const provesItself = (step: WorkingStep, _place: number, all: readonly WorkingStep[]): void => {
  if (step.expression === undefined) return
  const vocabulary = { isDefined: (name: string) => Object.hasOwn(step.values, name), functions: builtins }
  const { parsed, problems } = parseExpression(step.expression, vocabulary)
  if (!parsed) throw new Error(`${step.symbol} = ${step.expression}: ${problems[0]?.message ?? ''}`)
  for (const name of parsed.reads) expect(Object.keys(step.values), step.expression).toContain(name)
  const found = checkDimensions(parsed, {
    functions: builtins,
    dimensionOfSymbol: (name) => step.values[name]?.dimension,
    unitOfSymbol: () => undefined,
  })
  expect(found.dimension, `${step.symbol} = ${step.expression}`).toEqual(step.dimension)
  const value = compileScalar(parsed.root, {
    text: step.expression,
    functions: builtins,
    displayFactor: () => 1,
    along: () => () => NaN,
    register: (name) => ({ si: step.values[name]?.si ?? NaN }) as never,
  })()
  const isAlike = (symbol: string) => symbol.split('_')[0] === step.symbol.split('_')[0]
  const sizes = [
    ...all.filter(({ symbol }) => isAlike(symbol)).map(({ value }) => value),
    ...Object.entries(step.values).flatMap(([symbol, { si }]) => (isAlike(symbol) ? [si] : [])),
  ]
  // A held end leaves sums of twists that cancel to nothing; these lines twist by up to a radian.
  const scale = Math.max(...sizes.map(Math.abs), step.symbol.startsWith('phi') ? 1e-6 : 0)
  expect(Math.abs(value - step.value), `${step.symbol} = ${step.expression}`).toBeLessThanOrEqual(
    1e-9 * scale,
  )
}

const stepsOf = (kind: string, inputs: Record<string, SolvedInput>): WorkingStep[] =>
  analyses.get(kind)?.solve(inputs).working ?? []

const size = fc.double({ min: 0.01, max: 0.4, noNaN: true })

test('sections of every shape', () => {
  fc.assert(
    fc.property(size, size, fc.double({ min: -9e4, max: 9e4, noNaN: true }), (a, b, T) => {
      const t = Math.min(a, b) / 20
      const points = [
        { name: '1', y: 0, z: 0, t },
        { name: '2', y: a, z: 0, t: t / 2 },
        { name: '3', y: a, z: b, t },
        { name: '4', y: 0, z: b, t: t / 3 },
      ]
      for (const inputs of [
        { shape: 'solid-round', d_o: a, T },
        { shape: 'hollow-round', d_o: a + b, d_i: b, T },
        { shape: 'rectangle', a, b, T },
        { shape: 'closed-cell', points, T },
      ]) {
        const steps = stepsOf('section', inputs)
        expect(steps.length).toBeGreaterThan(2)
        steps.forEach(provesItself)
      }
    }),
    { numRuns: 50 },
  )
})

test('shaft lines with every pair of ends', () => {
  const segment = fc.record({ length: size, d: size, bore: fc.double({ min: 0, max: 0.9, noNaN: true }) })
  const torque = fc.record({
    // Places nearer than 10⁻⁹ of the length are one to the solver.
    share: fc.integer({ min: 0, max: 1000 }).map((thousandth) => thousandth / 1000),
    T: fc.integer({ min: -900, max: 900 }),
  })
  fc.assert(
    fc.property(
      fc.array(segment, { minLength: 1, maxLength: 5 }),
      fc.array(torque, { minLength: 1, maxLength: 4 }),
      fc.constantFrom(['fixed', 'fixed'], ['fixed', 'free'], ['free', 'fixed']),
      (segments, torques, [start, end]) => {
        const length = segments.reduce((sum, segment) => sum + segment.length, 0)
        // A bore as wide as a neighbour's outside would leave no metal between them.
        const thinnest = Math.min(...segments.map(({ d }) => d))
        const steps = stepsOf('shaft-line', {
          ...{ G: 80e9, start, end },
          segments: segments.map(({ length, d, bore }, i) => ({
            ...{ name: String(i + 1), length, d, d_i: bore * thinnest },
            ...(i % 2 === 1 ? { G: 27e9 } : {}),
          })),
          torques: torques.map(({ share, T }, i) => ({ name: String(i + 1), x: share * length, T })),
        })
        steps.forEach(provesItself)
        expect(steps.filter(({ expression }) => expression !== undefined).length).toBeGreaterThan(
          segments.length * 4,
        )
      },
    ),
    { numRuns: 100 },
  )
})
