/** Laws that every shaft line obeys, on random lines. */
import fc from 'fast-check'
import { expect, test } from 'vitest'
import { shaftLine } from '@shared/analyses/shaft-line'
import { section } from '@shared/analyses/section'
import type { SolvedInput } from '@shared/engine/contracts'

const segment = fc.record({
  length: fc.double({ min: 0.05, max: 2, noNaN: true }),
  d: fc.double({ min: 0.02, max: 0.3, noNaN: true }),
})
const torque = fc.record({
  share: fc.double({ min: 0, max: 1, noNaN: true }),
  T: fc.integer({ min: -5000, max: 5000 }).map((value) => value + 0.5),
})
const line = fc.record({
  segments: fc.array(segment, { minLength: 1, maxLength: 8 }),
  torques: fc.array(torque, { minLength: 1, maxLength: 6 }),
})
type Line = typeof line extends fc.Arbitrary<infer Value> ? Value : never

const inputsOf = ({ segments, torques }: Line, ends: { start: string; end: string }, factor = 1) => {
  const length = segments.reduce((sum, { length }) => sum + length, 0)
  return {
    G: 80e9,
    ...ends,
    segments: segments.map((cells, i) => ({ name: String(i + 1), ...cells })),
    torques: torques.map(({ share, T }, i) => ({ name: String(i + 1), x: share * length, T: factor * T })),
  } satisfies Record<string, SolvedInput>
}

const held = { start: 'fixed', end: 'fixed' }
const scaleOf = ({ torques }: Line) => torques.reduce((sum, { T }) => sum + Math.abs(T), 0)

test('reactions and torques balance', () => {
  fc.assert(
    fc.property(line, (any) => {
      for (const ends of [held, { start: 'fixed', end: 'free' }, { start: 'free', end: 'fixed' }]) {
        const { outputs } = shaftLine.solve(inputsOf(any, ends))
        const applied = any.torques.reduce((sum, { T }) => sum + T, 0)
        const sum = (outputs['T_start'] ?? 0) + (outputs['T_end'] ?? 0) + applied
        expect(Math.abs(sum)).toBeLessThan(1e-10 * scaleOf(any))
      }
    }),
  )
})

test('held at both ends: neither end turns, and the end reaction is that of the flexibilities', () => {
  fc.assert(
    fc.property(line, (any) => {
      const inputs = inputsOf(any, held)
      const { outputs, working } = shaftLine.solve(inputs)
      expect(outputs['phi_end']).toBe(0)
      const c = (x: number) => {
        let from = 0
        return any.segments.reduce((sum, { length, d }) => {
          const share = Math.min(Math.max(x - from, 0), length)
          from += length
          return sum + share / (80e9 * (Math.PI / 32) * d ** 4)
        }, 0)
      }
      const length = any.segments.reduce((sum, segment) => sum + segment.length, 0)
      const expected = -any.torques.reduce((sum, { share, T }) => sum + T * c(share * length), 0) / c(length)
      expect(Math.abs((outputs['T_end'] ?? NaN) - expected)).toBeLessThan(1e-8 * scaleOf(any))
      expect(working.length).toBeGreaterThan(any.segments.length)
    }),
  )
})

test('superposition: torques doubled and reversed double and reverse every signed output', () => {
  fc.assert(
    fc.property(line, (any) => {
      const once = shaftLine.solve(inputsOf(any, held)).outputs
      const twice = shaftLine.solve(inputsOf(any, held, -2)).outputs
      const slack = (name: string) => 1e-9 * Math.abs(once[name] ?? 0) + 1e-12
      for (const name of ['T_start', 'T_end']) {
        expect(Math.abs((twice[name] ?? NaN) + 2 * (once[name] ?? NaN))).toBeLessThan(
          slack(name) + 1e-8 * scaleOf(any),
        )
      }
      for (const name of ['T_max', 'tau_max', 'phi_max']) {
        expect(Math.abs((twice[name] ?? NaN) - 2 * (once[name] ?? NaN))).toBeLessThanOrEqual(
          1e-7 * (once[name] ?? 0) + 1e-12,
        )
      }
    }),
  )
})

test('energy is half the work: Σ T φ / 2 = Σ T² L / (2 G J) for a cantilever under one torque', () => {
  fc.assert(
    fc.property(
      fc.array(segment, { minLength: 1, maxLength: 8 }),
      fc.integer({ min: 1, max: 9000 }),
      (segments, T) => {
        const inputs = inputsOf({ segments, torques: [{ share: 1, T }] }, { start: 'fixed', end: 'free' })
        const { outputs } = shaftLine.solve(inputs)
        const energy = segments.reduce(
          (sum, { length, d }) => sum + (T ** 2 * length) / (2 * 80e9 * (Math.PI / 32) * d ** 4),
          0,
        )
        expect(Math.abs((T * (outputs['phi_end'] ?? NaN)) / 2 - energy)).toBeLessThan(1e-10 * energy)
      },
    ),
  )
})

test('every length doubled: J is 16 times, W_t 8 times', () => {
  const size = fc.double({ min: 0.005, max: 0.5, noNaN: true })
  fc.assert(
    fc.property(size, size, (a, b) => {
      for (const [small, large] of [
        [
          { shape: 'rectangle', a, b },
          { shape: 'rectangle', a: 2 * a, b: 2 * b },
        ],
        [
          { shape: 'hollow-round', d_o: a + b, d_i: b },
          { shape: 'hollow-round', d_o: 2 * (a + b), d_i: 2 * b },
        ],
      ] as const) {
        const [one, two] = [section.solve(small).outputs, section.solve(large).outputs]
        expect((two['J'] ?? NaN) / (one['J'] ?? NaN)).toBeCloseTo(16, 9)
        expect((two['W_t'] ?? NaN) / (one['W_t'] ?? NaN)).toBeCloseTo(8, 9)
      }
    }),
  )
})

test('a bore that closes leaves the solid bar', () => {
  const solid = section.solve({ shape: 'solid-round', d_o: 0.05 }).outputs
  const nearly = section.solve({ shape: 'hollow-round', d_o: 0.05, d_i: 1e-6 }).outputs
  expect((nearly['J'] ?? NaN) / (solid['J'] ?? NaN)).toBeCloseTo(1, 12)
})
