/** Solid and hollow round sections: they do not warp, so these formulas are exact. */

/**
 * Torsion constant of a round section, in m⁴.
 * @param outer outside diameter, m, > 0
 * @param bore m, 0 ≤ bore < outer (0: solid)
 * Source: Timoshenko & Goodier, Theory of Elasticity, 3rd ed., section 104.
 */
export const roundTorsionConstant = (outer: number, bore: number): number =>
  (Math.PI / 32) * (outer ** 4 - bore ** 4)

/**
 * Elastic torsion modulus of a round section, in m³: torque over surface shear stress.
 * @param outer outside diameter, m, > 0
 * @param bore m, 0 ≤ bore < outer
 */
export const roundTorsionModulus = (outer: number, bore: number): number =>
  (2 * roundTorsionConstant(outer, bore)) / outer

/** Area of a round section, in m². @param outer m @param bore m */
export const roundArea = (outer: number, bore: number): number => (Math.PI / 4) * (outer ** 2 - bore ** 2)
