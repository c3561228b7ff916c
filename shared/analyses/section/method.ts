import type { SolvedInput } from '../../engine/contracts'

const WARPING =
  'Ends are free to warp; where they are held, normal stresses arise near them that this does not give.'

const STATEMENTS: Record<string, string[]> = {
  round: [
    'Each cross-section of a round bar turns as a rigid disc, so the shear strain grows with the radius alone, and with it the stress: $tau = T*r/J$. The torsion constant is the polar second moment of area, $J = pi/32*(d_o^4 - d_i^4)$, and the greatest stress stands at the outside surface, $tau_max = T/W_t$ with $W_t = 2*J/d_o$. This is exact for a prismatic round bar.',
  ],
  rectangle: [
    'A rectangular section warps. Saint-Venant’s solution gives $J = k_1*h*b^3$ and the greatest stress at the middle of the long sides, $tau_max = T/W_t$ with $W_t = k_2*h*b^2$; h is the long side, b the short one, and the coefficients follow from his series.',
    WARPING,
  ],
  'closed-cell': [
    'In a thin-walled cell the shear flow is the same all round (Bredt): $q = T/(2*A_m)$ with the area $A_m$ within the middle line. With $s_t$, the sum of length over thickness of all walls, and the share of the walls as open strips, $J = 4*A_m^2/s_t + J_o$. The stress at the outside of a wall is the shear flow over its thickness plus the strip’s own share; the greatest governs.',
    WARPING,
  ],
}

/** How the section was computed, for the document. */
export const method = (inputs: Record<string, SolvedInput>): string[] => {
  const shape = String(inputs['shape'] ?? '')
  return STATEMENTS[shape.endsWith('round') ? 'round' : shape] ?? []
}
