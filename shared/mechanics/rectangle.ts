/**
 * Saint-Venant torsion of a rectangle, by his series. Terms fall at least as 1/n⁵ (stiffness) or as
 * e^(−nπ/2)/n² (stress), so a few dozen give full double precision at every ratio.
 * Source: Timoshenko & Goodier, Theory of Elasticity, 3rd ed., section 109, equations (160) to (163).
 */
const LAST_TERM = 401

const long = (a: number, b: number): number => Math.max(a, b)
const short = (a: number, b: number): number => Math.min(a, b)

/**
 * Stiffness coefficient k₁ of J = k₁·a·b³ (a the long side).
 * @param a m, > 0
 * @param b m, > 0; either order
 */
export const rectangleStiffnessCoefficient = (a: number, b: number): number => {
  const slenderness = long(a, b) / short(a, b)
  let sum = 0
  // tanh is 1 in double precision where its argument passes 20; the sum is then that of 1/n⁵ alone.
  for (let n = LAST_TERM; n >= 1; n -= 2) sum += Math.tanh((n * Math.PI * slenderness) / 2) / n ** 5
  return (1 - (192 / Math.PI ** 5 / slenderness) * sum) / 3
}

/** Torsion constant of a rectangle, in m⁴. @param a m, > 0 @param b m, > 0; either order */
export const rectangleTorsionConstant = (a: number, b: number): number =>
  rectangleStiffnessCoefficient(a, b) * long(a, b) * short(a, b) ** 3

/**
 * Strength coefficient k₂ of W_t = k₂·a·b² (a the long side): torque over the greatest shear stress,
 * which stands at the middle of the long sides.
 * @param a m, > 0
 * @param b m, > 0; either order
 */
export const rectangleStrengthCoefficient = (a: number, b: number): number => {
  const slenderness = long(a, b) / short(a, b)
  let sum = 0
  for (let n = LAST_TERM; n >= 1; n -= 2) sum += 1 / (n * n * Math.cosh((n * Math.PI * slenderness) / 2))
  return rectangleStiffnessCoefficient(a, b) / (1 - (8 / Math.PI ** 2) * sum)
}

/** Elastic torsion modulus of a rectangle, in m³. @param a m, > 0 @param b m, > 0; either order */
export const rectangleTorsionModulus = (a: number, b: number): number =>
  rectangleStrengthCoefficient(a, b) * long(a, b) * short(a, b) ** 2
