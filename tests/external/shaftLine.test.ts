/** Shaft lines against published closed forms and factors. */
import { describe, expect, test } from 'vitest'
import { shaftLine } from '@shared/analyses/shaft-line'
import type { SolvedInput } from '@shared/engine/contracts'
import { filletFactor } from '@shared/mechanics/fillet'
import { libraryFunctions } from '@shared/mechanics/library'
import { expectRelative } from '../support/relative'

const mm = 1e-3
const GPa = 1e9
const J = (d: number, bore = 0) => (Math.PI / 32) * (d ** 4 - bore ** 4)

const line = (inputs: Record<string, SolvedInput>) => shaftLine.solve({ G: 80 * GPa, ...inputs })
const rows = (list: Record<string, number>[]) => list.map((cells, i) => ({ name: String(i + 1), ...cells }))

// Source: Gere & Timoshenko, Mechanics of Materials, 4th ed., section 3.8: a bar held at both ends, torque T_0 at the
// junction of two parts: T_A = T_0·L_B·I_pA/(L_B·I_pA + L_A·I_pB), and φ = T_0·L_A·L_B/(G·(L_B·I_pA + L_A·I_pB)).
describe('bar of two parts held at both ends, torque at the junction', () => {
  test.each([
    [300, 60, 500, 40, 1200],
    [450, 35, 450, 35, -260],
    [120, 90, 1000, 25, 4000],
  ])('%d mm of Ø%d and %d mm of Ø%d under %d N m', (L_A, d_A, L_B, d_B, T) => {
    const { outputs } = line({
      start: 'fixed',
      end: 'fixed',
      segments: rows([
        { length: L_A * mm, d: d_A * mm },
        { length: L_B * mm, d: d_B * mm },
      ]),
      torques: rows([{ x: L_A * mm, T }]),
    })
    const [I_A, I_B] = [J(d_A * mm), J(d_B * mm)]
    const denominator = L_B * I_A + L_A * I_B
    expectRelative(outputs['T_start'], (-T * L_B * I_A) / denominator, 1e-12)
    expectRelative(outputs['T_end'], (-T * L_A * I_B) / denominator, 1e-12)
    expectRelative(outputs['phi_1'], (T * L_A * mm * L_B) / (80 * GPa * denominator), 1e-12)
    expect(Math.abs(outputs['phi_end'] ?? NaN)).toBeLessThan(1e-15)
  })
})

// Source: Young & Budynas, Roark's Formulas, 7th ed., table 10.3 manner; Gere & Timoshenko, section 3.4: φ = Σ T·L/(G·J).
test('stepped cantilever under two torques: sum of T L / G J', () => {
  const { outputs } = line({
    start: 'fixed',
    end: 'free',
    segments: rows([
      { length: 400 * mm, d: 60 * mm },
      { length: 300 * mm, d: 40 * mm },
    ]),
    torques: rows([
      { x: 400 * mm, T: 800 },
      { x: 700 * mm, T: 400 },
    ]),
  })
  const twist = (1200 * 0.4) / (80 * GPa * J(60 * mm)) + (400 * 0.3) / (80 * GPa * J(40 * mm))
  expectRelative(outputs['phi_end'], twist, 1e-12)
  expectRelative(outputs['tau_1'], (16 * 1200) / (Math.PI * (60 * mm) ** 3), 1e-12)
  expectRelative(outputs['tau_2'], (16 * 400) / (Math.PI * (40 * mm) ** 3), 1e-12)
  expectRelative(outputs['T_start'], -1200, 1e-12)
})

// Source: Norton, Machine Design, 3rd ed., figure C-3: K_ts = A·(r/d)^b, printed coefficients for D/d = 2, 1.33, 1.2, 1.09.
// Values from memory. The fit used where both apply (Pilkey, chart 3.12) is another: they differ by up to
// a tenth at small steps, where the one used is the greater.
test.each([
  [2, 0.15, 0.86331, -0.23865],
  [1.33, 0.05, 0.84897, -0.23161],
  [1.2, 0.05, 0.83425, -0.21649],
  [1.09, 0.05, 0.90337, -0.12692],
])('fillet D/d = %d, r/d = %d: the two published fits agree within a tenth', (ratio, sharpness, A, b) => {
  const d = 40 * mm
  expectRelative(filletFactor(ratio * d, d, sharpness * d).factor, A * sharpness ** b, 0.1)
})

// Source: Budynas & Nisbett, Shigley's Mechanical Engineering Design, figure A-15-8 read off: D/d = 1.33, r/d = 0.1:
// K_ts ≈ 1.45 (value from memory, read from a curve to about 3 %; the other published fit is lower by some 4 %).
test('fillet D/d = 1.33, r/d = 0.1: about 1.45 from the chart', () => {
  expectRelative(filletFactor(53.2 * mm, 40 * mm, 4 * mm).factor, 1.45, 5e-2)
})

test('a fillet beyond every published fit is a problem, not a number', () => {
  expect(() => filletFactor(60 * mm, 40 * mm, 0.2 * mm)).toThrow(/No published fit covers this fillet/)
})

// Source: ISO 3:1973, table 1.
describe('preferred numbers', () => {
  const preferred = libraryFunctions.find(({ name }) => name === 'preferred')
  const below = libraryFunctions.find(({ name }) => name === 'preferred_below')
  test.each([
    [32.4, 'R40', 33.5, 31.5],
    [32.4, 'R20', 35.5, 31.5],
    [32.4, 'R10', 40, 31.5],
    [32.4, 'R5', 40, 25],
    [40, 'R40', 40, 40],
    [9.6, 'R40', 10, 9.5],
    [0.0101, 'R10', 0.0125, 0.01],
  ])('%d by %s: next above %d, next below %d', (x, series, above, next) => {
    expectRelative(preferred?.evaluate([x * mm, series, mm]), above * mm, 1e-12)
    expectRelative(below?.evaluate([x * mm, series, mm]), next * mm, 1e-12)
  })
})
