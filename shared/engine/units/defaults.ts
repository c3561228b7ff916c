/** Units in which results are shown where nobody asked for one: customary in the trade, never found by simplification. */
import { dimension, type Dimension } from '../dimensions/dimension'
import type { UnitPhrase } from '../parse/expression'
import { readUnit, noUnit } from './unit'

export type UnitSystem = 'SI' | 'US'

type Exponents = Parameters<typeof dimension>[0]

const customary: readonly [Exponents, string, string][] = [
  [{ length: 1 }, 'mm', 'in'],
  [{ length: 2 }, 'mm^2', 'in^2'],
  [{ length: 3 }, 'mm^3', 'in^3'],
  [{ length: 4 }, 'mm^4', 'in^4'],
  [{ length: 6 }, 'mm^6', 'in^6'],
  [{ length: -1 }, '1/m', '1/in'],
  [{ mass: 1 }, 'kg', 'lb'],
  [{ time: 1 }, 's', 's'],
  [{ time: -1 }, '1/s', '1/s'],
  [{ turn: 1 }, 'rev', 'rev'],
  [{ turn: 1, time: -1 }, 'rpm', 'rpm'],
  [{ temperature: 1 }, 'K', 'degR'],
  [{ temperature: -1 }, '1/K', '1/degR'],
  [{ length: 1, time: -1 }, 'm/s', 'ft/s'],
  [{ length: 1, time: -2 }, 'm/s^2', 'ft/s^2'],
  [{ mass: 1, length: 1, time: -2 }, 'N', 'lbf'],
  // Torque, not energy: a joule is shown only where its author asks for it.
  [{ mass: 1, length: 2, time: -2 }, 'N m', 'lbf in'],
  [{ mass: 1, length: 3, time: -2 }, 'N m^2', 'lbf in^2'],
  [{ mass: 1, length: -1, time: -2 }, 'MPa', 'ksi'],
  [{ mass: -1, length: 1, time: 2 }, '1/MPa', '1/ksi'],
  [{ mass: 1, length: -0.5, time: -2 }, 'MPa m^0.5', 'ksi in^0.5'],
  [{ mass: 1, time: -2 }, 'N/mm', 'lbf/in'],
  [{ mass: -1, time: 2 }, 'mm/N', 'in/lbf'],
  [{ mass: -1, length: -2, time: 2 }, '1/N/m', '1/lbf/in'],
  [{ mass: 1, length: 2, time: -3 }, 'kW', 'hp'],
  [{ mass: 1, length: 2 }, 'kg m^2', 'lb in^2'],
  [{ mass: 1, length: -1 }, 'kg/m', 'lb/ft'],
  [{ mass: 1, length: -2 }, 'kg/m^2', 'lb/ft^2'],
  [{ mass: 1, length: -3 }, 'kg/m^3', 'lb/in^3'],
  [{ mass: 1, time: -1 }, 'N s/m', 'lbf s/in'],
  [{ mass: 1, length: 2, time: -1 }, 'N m s', 'lbf in s'],
  [{ mass: 1, length: -1, time: -1 }, 'Pa s', 'lbf s/in^2'],
  [{ length: 2, time: -1 }, 'm^2/s', 'in^2/s'],
  [{ length: 3, time: -1 }, 'm^3/s', 'in^3/s'],
]

const phrase = (text: string): UnitPhrase => readUnit(text).phrase ?? noUnit

const customaryUnits = new Map<string, Record<UnitSystem, UnitPhrase>>([
  [dimension({}).join(), { SI: noUnit, US: noUnit }],
  ...customary.map(([exponents, si, us]): [string, Record<UnitSystem, UnitPhrase>] => [
    dimension(exponents).join(),
    { SI: phrase(si), US: phrase(us) },
  ]),
])

const bases = {
  SI: ['kg', 'm', 's', 'A', 'K', 'mol', 'cd', 'rev'],
  US: ['lb', 'in', 's', 'A', 'degR', 'mol', 'cd', 'rev'],
} as const

/** Base units written as a phrase: `kg m^2/s^3/K`. */
const composed = (exponents: Dimension, system: UnitSystem): UnitPhrase => {
  const written = (sign: 1 | -1): string[] =>
    bases[system].flatMap((unit, place) => {
      // Mass before length: kg m^2, not m^2 kg.
      const base = place === 0 ? 1 : place === 1 ? 0 : place
      const exponent = (exponents[base] ?? 0) * sign
      return exponent <= 0 ? [] : [exponent === 1 ? unit : `${unit}^${exponent}`]
    })
  const over = written(1)
  const under = written(-1)
  return phrase([over.length === 0 ? '1' : over.join(' '), ...under].join('/'))
}

/** The unit in which a result of this dimension is shown where its author asked for none. */
export const defaultUnit = (exponents: Dimension, system: UnitSystem): UnitPhrase => {
  const key = exponents.join()
  const known = customaryUnits.get(key)
  if (known !== undefined) return known[system]
  const units = { SI: composed(exponents, 'SI'), US: composed(exponents, 'US') }
  customaryUnits.set(key, units)
  return units[system]
}
