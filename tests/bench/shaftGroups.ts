/** A sheet of groups: a diameter and the ten formulas that depend on it; everything else is shared or constant. */
import type { EngineLine } from '@shared/engine/contracts'

export interface Expression {
  symbol: string
  text: string
  unit: string
}

/** The ten lines that depend on the diameter of group `k`, as mathjs reads them, too. */
export const formulasOf = (k: number): Expression[] => [
  { symbol: `A_${k}`, text: `pi*d_${k}^2/4`, unit: 'mm^2' },
  { symbol: `W_${k}`, text: `pi*d_${k}^3/16`, unit: 'mm^3' },
  { symbol: `J_${k}`, text: `pi*d_${k}^4/32`, unit: 'mm^4' },
  { symbol: `tau_${k}`, text: `T_s/W_${k}`, unit: 'MPa' },
  { symbol: `tau_b_${k}`, text: `sqrt(tau_${k}^2 + (P_s/A_${k})^2)`, unit: 'MPa' },
  { symbol: `theta_${k}`, text: `T_s/(G_s*J_${k})`, unit: 'm^-1' },
  { symbol: `phi_${k}`, text: `theta_${k}*L_s`, unit: '' },
  { symbol: `k_${k}`, text: `G_s*J_${k}/L_s`, unit: 'N m' },
  { symbol: `M_${k}`, text: `rho_s*A_${k}*L_s`, unit: 'kg' },
  { symbol: `u_${k}`, text: `(tau_b_${k}/S_s)^2 + abs(phi_${k}/phi_s)`, unit: '' },
]

export interface SharedGiven {
  symbol: string
  value: string
  unit: string
}

export const shared: SharedGiven[] = [
  { symbol: 'T_s', value: '800', unit: 'N m' },
  { symbol: 'P_s', value: '12', unit: 'kN' },
  { symbol: 'G_s', value: '80', unit: 'GPa' },
  { symbol: 'L_s', value: '1.2', unit: 'm' },
  { symbol: 'rho_s', value: '7850', unit: 'kg/m^3' },
  { symbol: 'S_s', value: '60', unit: 'MPa' },
  { symbol: 'phi_s', value: '0.02', unit: '' },
]

const given = ({ symbol, value, unit }: SharedGiven): EngineLine => ({
  id: symbol,
  kind: 'given',
  symbol,
  value,
  unit,
})

export const diameter = (k: number, value: string): EngineLine =>
  given({ symbol: `d_${k}`, value, unit: 'mm' })

/** A sheet with ten formulas in each of `groups` groups. */
export const shaftGroups = (groups: number): EngineLine[] => [
  ...shared.map(given),
  ...Array.from({ length: groups }, (_, k) => [
    diameter(k, String(40 + (k % 50))),
    ...formulasOf(k).map(({ symbol, text, unit }): EngineLine => ({
      id: symbol,
      kind: 'formula',
      symbol,
      expression: text,
      unit,
    })),
  ]).flat(),
]
