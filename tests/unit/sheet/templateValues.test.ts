import { readFileSync } from 'node:fs'
import { describe, expect, test } from 'vitest'
import { evaluateSheet } from '@shared/pipeline'
import { importText } from '@shared/sheet/text'

/** Values of a template as shipped, by symbol, in SI; its problems of severity error; its criteria's verdicts. */
const evaluated = (name: string) => {
  const { sheet } = importText(
    readFileSync(new URL(`../../../templates/${name}.md`, import.meta.url), 'utf8'),
  )
  if (!sheet) throw new Error('the template has no sheet')
  const { lines } = evaluateSheet(sheet)
  const errors = lines.flatMap((line) => line.problems).filter((problem) => problem.severity === 'error')
  const verdicts = lines.flatMap((line) => (line.criterion ? [line.criterion.satisfied] : []))
  const value = (symbol: string) => lines.find((line) => line.symbol === symbol)?.value?.si
  return { errors, verdicts, value }
}

const near = (value: number | undefined, expected: number, share: number) => {
  expect(value).toBeDefined()
  expect(Math.abs((value ?? 0) / expected - 1)).toBeLessThan(share)
}

test.each([
  'solid-shaft',
  'hollow-against-solid',
  'power-and-speed-rating',
  'stepped-shaft-line',
  'shaft-fixed-at-both-ends',
  'closed-box-section',
])('the template %s computes without an error, and its example satisfies its criteria', (name) => {
  const { errors, verdicts } = evaluated(name)
  expect(errors).toEqual([])
  expect(verdicts.length).toBeGreaterThan(1)
  expect(verdicts.every(Boolean)).toBe(true)
})

describe('what the templates say for their examples', () => {
  // By hand: T = 625 N m, d = 56 mm: 16·625 000/(π·56³) = 10⁷/551 717 = 18.13 N/mm²;
  // d for 0.5°/m: (32·625/(π·80·10⁹·8.7266·10⁻³))^¼ = (9.1189·10⁻⁶)^¼ = 0.05495 m
  test('solid shaft: 18.1 MPa at the surface, 54.95 mm for stiffness, 56 mm as the next size', () => {
    const { value } = evaluated('solid-shaft')
    near(value('tau_max'), 18.13e6, 1e-3)
    near(value('d_stiffness'), 54.95e-3, 1e-3)
    near(value('d_pref'), 56e-3, 1e-9)
  })

  // By hand: for equal stress the mass ratio is (1 − c²)/(1 − c⁴)^⅔; c = 0.6: 0.64/0.8704^⅔ = 0.64/0.91159 = 0.7021
  test('hollow shaft with a bore of 0.6: 29.8 % of the mass saved', () => {
    near(evaluated('hollow-against-solid').value('saving'), 1 - 0.7021, 1e-3)
  })

  // Handbook rule T = 9550·P/n (N m, kW, 1/min), any machine design text: 9550·45/1450 = 296.4 N m
  test('45 kW at 1450 rpm: 296.4 N m', () => {
    near(evaluated('power-and-speed-rating').value('T_nom'), 296.4, 1e-3)
  })

  // By hand, in units of π·G/32: (800·250/50⁴ + 500·300/40⁴ + 500·200/35⁴) N/mm² = 0.032 + 0.058594 + 0.066639 = 0.157233;
  // times 32/(π·80) per m, with N m/mm⁴·mm = 10⁻³·…: 0.157233·10³·32/(π·80 000) = 0.02002 rad = 1.147°
  test('stepped shaft: the free end turns by 1.147°', () => {
    near(evaluated('stepped-shaft-line').value('phi_end'), (1.147 * Math.PI) / 180, 1e-3)
  })

  // By hand: k ∝ d⁴/L: 50⁴/400 = 15 625, 45⁴/600 = 6 834.4; share of the start 15 625/22 459.4 = 0.69570; 1200·0.69570 = 834.8
  test('shaft fixed at both ends: the start takes 834.8 N m, against the applied torque', () => {
    near(evaluated('shaft-fixed-at-both-ends').value('T_start'), -834.8, 1e-3)
  })

  // By hand (Bredt): A_m = 292·190 = 55 480 mm²; q = 40·10⁶/(2·55 480) = 360.5 N/mm; 360.5/8 = 45.06 N/mm²
  test('closed box: 45.1 MPa in the webs by Bredt', () => {
    near(evaluated('closed-box-section').value('tau_hand'), 45.06e6, 1e-3)
  })
})
