/**
 * Stress concentration at a shoulder fillet of a round shaft in torsion. The factor refers to the nominal
 * stress of the smaller diameter, 16·T/(π·d³). Two published fits of the same photoelastic and numerical
 * results, each used in its own range; where both apply they
 * differ by some per cent, up to a tenth at small steps, and the first is used.
 */
import { MethodProblem } from '../engine/contracts'

/**
 * Pilkey & Pilkey, Peterson's Stress Concentration Factors, 3rd ed., chart 3.12; the same as Young & Budynas,
 * Roark's Formulas for Stress and Strain, 7th ed., table 17.1, case 17c. Range 0.25 ≤ t/r ≤ 4, t = (D − d)/2.
 * Coefficients from memory.
 */
const shoulderPolynomial = (D: number, d: number, r: number): number => {
  const height = (D - d) / 2
  const ratio = height / r
  const root = Math.sqrt(ratio)
  const step = (2 * height) / D
  return (
    0.905 +
    0.783 * root -
    0.075 * ratio +
    (-0.437 - 1.969 * root + 0.553 * ratio) * step +
    (1.557 + 1.073 * root - 0.578 * ratio) * step ** 2 +
    (-1.061 + 0.171 * root + 0.086 * ratio) * step ** 3
  )
}

/**
 * Norton, Machine Design: An Integrated Approach, 3rd ed., figure C-3: K = A·(r/d)^b for four ratios D/d.
 * Coefficients from memory. Between them K is interpolated linearly in D/d.
 */
const SHOULDER_POWERS = [
  { ratio: 1.09, A: 0.90337, b: -0.12692 },
  { ratio: 1.2, A: 0.83425, b: -0.21649 },
  { ratio: 1.33, A: 0.84897, b: -0.23161 },
  { ratio: 2, A: 0.86331, b: -0.23865 },
] as const

const shoulderPower = (D: number, d: number, r: number): number => {
  const ratio = D / d
  const above = SHOULDER_POWERS.findIndex((curve) => curve.ratio >= ratio)
  const upper = SHOULDER_POWERS[Math.max(above, 1)] ?? SHOULDER_POWERS[3]
  const lower = SHOULDER_POWERS[Math.max(above, 1) - 1] ?? SHOULDER_POWERS[0]
  const at = (curve: { A: number; b: number }) => curve.A * (r / d) ** curve.b
  const share = (ratio - lower.ratio) / (upper.ratio - lower.ratio)
  return at(lower) + share * (at(upper) - at(lower))
}

export interface FilletFactor {
  factor: number
  source: string
}

const PILKEY = "Pilkey & Pilkey, Peterson's Stress Concentration Factors, 3rd ed., chart 3.12 (from memory)"
const NORTON = 'Norton, Machine Design, 3rd ed., figure C-3 (from memory)'

/** What both fits together cover, in words. */
export const FILLET_RANGE =
  'r from (D − d)/8 to 2·(D − d); smaller radii down to r = 0.01·d where D/d is from 1.09 to 2'

/**
 * Stress concentration factor of a shoulder fillet in torsion, and the fit it comes from.
 * @param D larger diameter, m
 * @param d smaller diameter, m, 0 < d < D
 * @param r fillet radius, m, > 0
 * @throws MethodProblem `out-of-range` where neither fit was made for these proportions
 */
export const filletFactor = (D: number, d: number, r: number): FilletFactor => {
  const steepness = (D - d) / 2 / r
  if (steepness >= 0.25 && steepness <= 4) return { factor: shoulderPolynomial(D, d, r), source: PILKEY }
  const ratio = D / d
  if (steepness > 4 && ratio >= 1.09 && ratio <= 2 && r / d >= 0.01) {
    return { factor: shoulderPower(D, d, r), source: NORTON }
  }
  throw new MethodProblem(
    'out-of-range',
    `No published fit covers this fillet: (D − d)/(2 r) is ${steepness.toPrecision(3)}, D/d is ${ratio.toPrecision(3)}. ` +
      `The range is ${FILLET_RANGE}.`,
    'r',
  )
}
