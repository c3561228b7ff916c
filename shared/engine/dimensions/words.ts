/** Dimensions in words, as one would say them in a drawing office. */
import { defaultUnit } from '../units/defaults'
import { dimension, type Dimension } from './dimension'

const named: readonly [Parameters<typeof dimension>[0], string][] = [
  [{}, 'a bare number'],
  [{ length: 1 }, 'a length'],
  [{ length: 2 }, 'an area'],
  [{ length: 3 }, 'a volume or section modulus'],
  [{ length: 4 }, 'a second moment of area'],
  [{ length: 6 }, 'a warping constant'],
  [{ length: -1 }, 'a curvature or rate of twist'],
  [{ mass: 1 }, 'a mass'],
  [{ time: 1 }, 'a time'],
  [{ time: -1 }, 'an angular speed or rate'],
  [{ time: -2 }, 'an angular acceleration'],
  [{ turn: 1 }, 'a number of turns'],
  [{ turn: 1, time: -1 }, 'a rotational frequency'],
  [{ current: 1 }, 'an electric current'],
  [{ temperature: 1 }, 'a temperature'],
  [{ temperature: -1 }, 'a coefficient of expansion'],
  [{ amount: 1 }, 'an amount of substance'],
  [{ 'luminous intensity': 1 }, 'a luminous intensity'],
  [{ length: 1, time: -1 }, 'a speed'],
  [{ length: 1, time: -2 }, 'an acceleration'],
  [{ mass: 1, length: 1, time: -2 }, 'a force'],
  [{ mass: 1, length: 2, time: -2 }, 'a torque or energy'],
  [{ mass: 1, length: 3, time: -2 }, 'a bending stiffness'],
  [{ mass: 1, length: -1, time: -2 }, 'a pressure or stress'],
  [{ mass: 1, length: -0.5, time: -2 }, 'a fracture toughness'],
  [{ mass: 1, time: -2 }, 'a stiffness or line load'],
  [{ mass: 1, length: 2, time: -3 }, 'a power'],
  [{ mass: 1, length: 2 }, 'a moment of inertia'],
  [{ mass: 1, length: -1 }, 'a mass per length'],
  [{ mass: 1, length: -3 }, 'a density'],
  [{ mass: 1, time: -1 }, 'a damping or mass flow'],
  [{ mass: 1, length: 2, time: -1 }, 'a torsional damping'],
  [{ mass: 1, length: -1, time: -1 }, 'a viscosity'],
  [{ length: 2, time: -1 }, 'a kinematic viscosity'],
  [{ length: 3, time: -1 }, 'a volume flow'],
]

const words = new Map(named.map(([exponents, name]) => [dimension(exponents).join(), name]))

/** A dimension in words, with its article: `a pressure or stress`; where it has no name, `a quantity in kg m^2/K`. */
export const inWords = (exponents: Dimension): string =>
  words.get(exponents.join()) ?? `a quantity in ${defaultUnit(exponents, 'SI').text}`
