/** Dimensions and usual units of the quantities of torsion, named once for specs, functions and working. */
import { dimension, dimensionless } from '../engine/dimensions/dimension'

const unit = (SI: string, US: string) => ({ SI, US })

export const length = { dimension: dimension({ length: 1 }), unit: unit('mm', 'in') }
export const area = { dimension: dimension({ length: 2 }), unit: unit('mm^2', 'in^2') }
export const sectionModulus = { dimension: dimension({ length: 3 }), unit: unit('mm^3', 'in^3') }
export const secondMoment = { dimension: dimension({ length: 4 }), unit: unit('mm^4', 'in^4') }
export const perVolume = { dimension: dimension({ length: -3 }), unit: unit('mm^-3', 'in^-3') }
export const torque = { dimension: dimension({ mass: 1, length: 2, time: -2 }), unit: unit('N m', 'lbf in') }
export const stress = { dimension: dimension({ mass: 1, length: -1, time: -2 }), unit: unit('MPa', 'ksi') }
export const modulus = { dimension: dimension({ mass: 1, length: -1, time: -2 }), unit: unit('GPa', 'ksi') }
export const angle = { dimension: dimensionless, unit: unit('deg', 'deg') }
export const ratio = { dimension: dimensionless, unit: unit('', '') }
/** Torque per angle of twist. */
export const torsionalStiffness = {
  dimension: dimension({ mass: 1, length: 2, time: -2 }),
  unit: unit('N m', 'lbf in'),
}
/** Angle of twist per torque. */
export const torsionalFlexibility = {
  dimension: dimension({ mass: -1, length: -2, time: 2 }),
  unit: unit('N^-1 m^-1', 'lbf^-1 in^-1'),
}
