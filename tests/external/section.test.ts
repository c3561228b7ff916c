/** Sections against published values; the tolerance of each check is the rounding of its source. */
import { describe, expect, test } from 'vitest'
import { section } from '@shared/analyses/section'
import { closedCell } from '@shared/mechanics/closedCell'
import { expectRelative } from '../support/relative'

const mm = 1e-3
const outputs = (inputs: Parameters<typeof section.solve>[0]) => section.solve(inputs).outputs

// Source: Timoshenko & Goodier, Theory of Elasticity, 3rd ed., section 109, table of k (greatest stress
// T = k2·(2a)²(2b)) and k1 (stiffness), for the ratio b/a of long to short side. Three decimals printed,
// not always rounded to the nearest.
describe('rectangle: coefficients of stiffness and strength', () => {
  test.each([
    [1.0, 0.1406, 0.208],
    [1.2, 0.166, 0.219],
    [1.5, 0.196, 0.231],
    [2.0, 0.229, 0.246],
    [2.5, 0.249, 0.258],
    [3.0, 0.263, 0.267],
    [4.0, 0.281, 0.282],
    [5.0, 0.291, 0.291],
    [10.0, 0.312, 0.312],
  ])('ratio %d: k1 = %d, k2 = %d', (ratio, k1, k2) => {
    const b = 10 * mm
    const a = ratio * b
    const { J, W_t } = outputs({ shape: 'rectangle', a, b })
    expect(Math.abs((J ?? NaN) / (a * b ** 3) - k1)).toBeLessThan(6e-4)
    expect(Math.abs((W_t ?? NaN) / (a * b ** 2) - k2)).toBeLessThan(6e-4)
  })

  // Source: the limit of a narrow strip, 1/3, same table, last column.
  test('a narrow strip comes to a third', () => {
    const { J, W_t } = outputs({ shape: 'rectangle', a: 1, b: 1 * mm })
    expectRelative(J, 1e-9 / 3, 1e-3)
    expectRelative(W_t, 1e-6 / 3, 1e-3)
  })
})

// Source: Young & Budynas, Roark's Formulas for Stress and Strain, 7th ed., table 10.1, case 4 (square of side 2a:
// K = 2.25·a⁴, greatest stress 0.601·T/a³). Values from memory; K is given to three digits (exact series: 2.2492).
test('square bar: K = 2.25 a⁴ and stress 0.601 T/a³', () => {
  const a = 12 * mm
  const { J, tau_per_T } = outputs({ shape: 'rectangle', a: 2 * a, b: 2 * a })
  expectRelative(J, 2.25 * a ** 4, 1e-3)
  expectRelative(tau_per_T, 0.601 / a ** 3, 1e-3)
})

// Source: Young & Budynas, Roark's Formulas, 7th ed., table 10.1, case 5: rectangle 2a by 2b,
// K = a·b³·[16/3 − 3.36·(b/a)·(1 − b⁴/(12·a⁴))], good to within 4 % of the exact value, mostly far better.
test.each([1, 1.5, 2, 4])('rectangle of ratio %d: Roark’s closed form', (ratio) => {
  const b = 8 * mm
  const a = ratio * b
  const published = a * b ** 3 * (16 / 3 - 3.36 * (b / a) * (1 - b ** 4 / (12 * a ** 4)))
  expectRelative(outputs({ shape: 'rectangle', a: 2 * a, b: 2 * b }).J, published, 5e-3)
})

/** A rounded box: the middle line of a hot-finished hollow section, corners as short chords. */
const box = (height: number, width: number, t: number) => {
  // EN 10210-2, Annex A: outside corner radius 1.5 t and inside radius 1.0 t for the calculation.
  const radius = ((1.5 + 1.0) / 2) * t
  const [h, b] = [(height - t) / 2, (width - t) / 2]
  const corners = [
    [1, 1, 0],
    [-1, 1, 90],
    [-1, -1, 180],
    [1, -1, 270],
  ] as const
  return corners.flatMap(([sy, sz, start]) =>
    Array.from({ length: 25 }, (_, i) => {
      const angle = ((start + (90 * i) / 24) * Math.PI) / 180
      return {
        y: sy * (b - radius) + radius * Math.cos(angle),
        z: sz * (h - radius) + radius * Math.sin(angle),
        t,
      }
    }),
  )
}

// Source: EN 10210-2:2006, tables B.2 and B.3 (hot finished square and rectangular hollow sections): torsional inertia
// constant I_t in cm⁴ and torsional modulus constant C_t in cm³. Values from memory; three digits printed.
describe('hot finished hollow sections', () => {
  test.each([
    [80, 80, 5, 217, 49.8],
    [100, 100, 5, 439, 81.8],
    [120, 60, 5, 242, 56.0],
    [150, 150, 8, 2351, 291],
    [200, 100, 8, 1804, 251],
    [200, 200, 8, 5778, 545],
    [250, 250, 10, 14106, 1065],
  ])('%d × %d × %d mm: I_t = %d cm⁴, C_t = %d cm³', (height, width, t, I_t, C_t) => {
    const found = closedCell(box(height * mm, width * mm, t * mm))
    expectRelative(found.torsionConstant, I_t * 1e-8, 2.5e-3)
    expectRelative(found.torsionModulus, C_t * 1e-6, 2.5e-3)
  })
})

// Source: Bredt's closed form for a thin round tube, J = 2·π·r³·t, against the exact one of a round tube,
// Timoshenko & Goodier, section 104: the cell of many sides must come to the exact tube as its corners grow in number.
test('a many-sided cell comes to the exact round tube', () => {
  const [radius, t] = [50 * mm, 4 * mm]
  const corners = Array.from({ length: 720 }, (_, i) => ({
    y: radius * Math.cos((i * Math.PI) / 360),
    z: radius * Math.sin((i * Math.PI) / 360),
    t,
  }))
  const found = closedCell(corners)
  const tube = outputs({ shape: 'hollow-round', d_o: 2 * radius + t, d_i: 2 * radius - t })
  // The open share t³·l/3 exceeds the tube's own by a twelfth of (t/r)², here 5·10⁻⁴.
  expectRelative(found.torsionConstant, tube['J'] ?? NaN, 8e-4)
  // A straight wall bends its own stress by t, a curved one by t/2: many short walls err to the safe side by t/(2·r).
  expect(found.torsionModulus).toBeLessThan(tube['W_t'] ?? NaN)
  expectRelative(found.torsionModulus, tube['W_t'] ?? NaN, t / (2 * radius))
  // Straight walls miss the longer outside of a curved one: (t/r)²/6 of the second moment.
  expectRelative(found.I_y, (tube['J'] ?? NaN) / 2, (t / radius) ** 2 / 5)
})

// Source: common practice, no source: second moments of a rectangular box as the difference of two rectangles.
test('bending properties of a sharp-cornered box are those of the difference of two rectangles', () => {
  const [height, width, t] = [120 * mm, 80 * mm, 2 * mm]
  const [z, y] = [(height - t) / 2, (width - t) / 2]
  const found = closedCell([
    { y: -y, z: -z, t },
    { y, z: -z, t },
    { y, z, t },
    { y: -y, z, t },
  ])
  const difference = (b: number, h: number) => (b * h ** 3 - (b - 2 * t) * (h - 2 * t) ** 3) / 12
  expectRelative(found.I_y, difference(width, height), 1e-3)
  expectRelative(found.I_z, difference(height, width), 1e-3)
  expectRelative(found.area, width * height - (width - 2 * t) * (height - 2 * t), 1e-12)
})

// Source: Young & Budynas, Roark's Formulas, 7th ed., table 10.1, cases 1 and 10: K = π·r⁴/2 and π·(r_o⁴ − r_i⁴)/2,
// stress 2·T/(π·r³) and 2·T·r_o/(π·(r_o⁴ − r_i⁴)).
test('round bars: Roark’s cases 1 and 10', () => {
  const solid = outputs({ shape: 'solid-round', d_o: 50 * mm, T: 900 })
  expectRelative(solid['J'], (Math.PI * (25 * mm) ** 4) / 2, 1e-12)
  expectRelative(solid['tau_max'], (2 * 900) / (Math.PI * (25 * mm) ** 3), 1e-12)
  const tube = outputs({ shape: 'hollow-round', d_o: 60 * mm, d_i: 40 * mm, T: -900 })
  const ring = (30 * mm) ** 4 - (20 * mm) ** 4
  expectRelative(tube['J'], (Math.PI * ring) / 2, 1e-12)
  expectRelative(tube['tau_max'], (2 * 900 * 30 * mm) / (Math.PI * ring), 1e-12)
})
