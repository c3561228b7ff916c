/**
 * The curated unit list. Exact by definition unless a comment says otherwise: the International
 * System (BIPM, SI Brochure, 9th ed.) and NIST Special Publication 811, appendix B.
 */
import { dimension, type Dimension } from '../dimensions/dimension'

/** A unit as listed; `value` times ten to the power `tens` is its size in coherent SI. */
export interface ListedUnit {
  name: string
  spoken: string
  dimension: Dimension
  value: number
  tens?: number
  /** Prefixes that it takes, in the order of `prefixes`. */
  prefixes?: readonly string[]
  /** Zero of an absolute temperature scale, in kelvin. */
  zero?: number
  /** Other spellings that people type. */
  spellings?: readonly string[]
}

export const prefixes: Readonly<Record<string, { tens: number; spoken: string }>> = {
  n: { tens: -9, spoken: 'nano' },
  u: { tens: -6, spoken: 'micro' },
  m: { tens: -3, spoken: 'milli' },
  c: { tens: -2, spoken: 'centi' },
  d: { tens: -1, spoken: 'deci' },
  da: { tens: 1, spoken: 'deca' },
  h: { tens: 2, spoken: 'hecto' },
  k: { tens: 3, spoken: 'kilo' },
  M: { tens: 6, spoken: 'mega' },
  G: { tens: 9, spoken: 'giga' },
}

const length = dimension({ length: 1 })
const mass = dimension({ mass: 1 })
const time = dimension({ time: 1 })
const none = dimension({})
const volume = dimension({ length: 3 })
const force = dimension({ length: 1, mass: 1, time: -2 })
const pressure = dimension({ length: -1, mass: 1, time: -2 })
const energy = dimension({ length: 2, mass: 1, time: -2 })
const power = dimension({ length: 2, mass: 1, time: -3 })
const temperature = dimension({ temperature: 1 })
const frequency = dimension({ turn: 1, time: -1 })

const pound = 0.45359237
const gravity = 9.80665
const poundForce = pound * gravity
const inch = 0.0254
const foot = 0.3048

export const catalogue: readonly ListedUnit[] = [
  { name: 'm', spoken: 'metre', dimension: length, value: 1, prefixes: ['n', 'u', 'm', 'c', 'd', 'k'] },
  { name: 'in', spoken: 'inch', dimension: length, value: inch, spellings: ['inch'] },
  { name: 'ft', spoken: 'foot', dimension: length, value: foot, spellings: ['foot', 'feet'] },
  { name: 'yd', spoken: 'yard', dimension: length, value: 0.9144 },
  { name: 'mil', spoken: 'mil', dimension: length, value: 2.54, tens: -5 },
  { name: 'thou', spoken: 'thou', dimension: length, value: 2.54, tens: -5 },

  { name: 'g', spoken: 'gram', dimension: mass, value: 1, tens: -3, prefixes: ['u', 'm', 'k', 'M'] },
  { name: 'tonne', spoken: 'tonne', dimension: mass, value: 1, tens: 3 },
  { name: 'lb', spoken: 'pound', dimension: mass, value: pound, spellings: ['lbm', 'lbs'] },
  // One pound-force accelerates one slug by one foot per second squared.
  { name: 'slug', spoken: 'slug', dimension: mass, value: poundForce / foot },

  { name: 's', spoken: 'second', dimension: time, value: 1, prefixes: ['n', 'u', 'm'], spellings: ['sec'] },
  { name: 'min', spoken: 'minute', dimension: time, value: 60 },
  { name: 'h', spoken: 'hour', dimension: time, value: 3600, spellings: ['hr', 'hour', 'hours'] },
  { name: 'day', spoken: 'day', dimension: time, value: 86_400, spellings: ['days'] },

  { name: 'A', spoken: 'ampere', dimension: dimension({ current: 1 }), value: 1, prefixes: ['u', 'm', 'k'] },
  {
    name: 'V',
    spoken: 'volt',
    dimension: dimension({ length: 2, mass: 1, time: -3, current: -1 }),
    value: 1,
    prefixes: ['u', 'm', 'k'],
  },
  {
    name: 'ohm',
    spoken: 'ohm',
    dimension: dimension({ length: 2, mass: 1, time: -3, current: -2 }),
    value: 1,
    prefixes: ['m', 'k', 'M'],
  },
  { name: 'mol', spoken: 'mole', dimension: dimension({ amount: 1 }), value: 1, prefixes: ['m', 'k'] },
  { name: 'cd', spoken: 'candela', dimension: dimension({ 'luminous intensity': 1 }), value: 1 },

  { name: 'K', spoken: 'kelvin', dimension: temperature, value: 1, prefixes: ['m'] },
  { name: 'degR', spoken: 'degree Rankine', dimension: temperature, value: 5 / 9, spellings: ['°R'] },
  {
    name: 'degC',
    spoken: 'degree Celsius',
    dimension: temperature,
    value: 1,
    zero: 273.15,
    spellings: ['°C'],
  },
  {
    name: 'degF',
    spoken: 'degree Fahrenheit',
    dimension: temperature,
    value: 5 / 9,
    zero: 273.15 - (32 * 5) / 9,
    spellings: ['°F'],
  },

  { name: 'N', spoken: 'newton', dimension: force, value: 1, prefixes: ['u', 'm', 'c', 'da', 'k', 'M', 'G'] },
  { name: 'kgf', spoken: 'kilogram-force', dimension: force, value: gravity },
  { name: 'lbf', spoken: 'pound-force', dimension: force, value: poundForce },
  { name: 'kip', spoken: 'kip', dimension: force, value: poundForce, tens: 3, spellings: ['kips'] },

  { name: 'Pa', spoken: 'pascal', dimension: pressure, value: 1, prefixes: ['m', 'h', 'k', 'M', 'G'] },
  { name: 'bar', spoken: 'bar', dimension: pressure, value: 1, tens: 5, prefixes: ['m'] },
  { name: 'psi', spoken: 'pound per square inch', dimension: pressure, value: poundForce / inch ** 2 },
  { name: 'ksi', spoken: 'kip per square inch', dimension: pressure, value: poundForce / inch ** 2, tens: 3 },
  {
    name: 'Msi',
    spoken: 'million pounds per square inch',
    dimension: pressure,
    value: poundForce / inch ** 2,
    tens: 6,
  },
  { name: 'psf', spoken: 'pound per square foot', dimension: pressure, value: poundForce / foot ** 2 },

  { name: 'J', spoken: 'joule', dimension: energy, value: 1, prefixes: ['u', 'm', 'k', 'M', 'G'] },
  // The thermochemical calorie; the International Table one is 4.1868 J.
  { name: 'cal', spoken: 'calorie', dimension: energy, value: 4.184, prefixes: ['k'] },
  // The International Table British thermal unit.
  {
    name: 'BTU',
    spoken: 'British thermal unit',
    dimension: energy,
    value: 1055.05585262,
    spellings: ['Btu'],
  },

  { name: 'W', spoken: 'watt', dimension: power, value: 1, prefixes: ['u', 'm', 'k', 'M', 'G'] },
  { name: 'hp', spoken: 'horsepower', dimension: power, value: 550 * foot * poundForce },
  { name: 'hp_metric', spoken: 'metric horsepower', dimension: power, value: 75 * gravity },

  { name: 'litre', spoken: 'litre', dimension: volume, value: 1, tens: -3, spellings: ['liter', 'l'] },
  { name: 'ml', spoken: 'millilitre', dimension: volume, value: 1, tens: -6, spellings: ['mL'] },

  { name: 'rad', spoken: 'radian', dimension: none, value: 1, prefixes: ['u', 'm'] },
  { name: 'deg', spoken: 'degree', dimension: none, value: Math.PI / 180, spellings: ['°'] },
  { name: '%', spoken: 'percent', dimension: none, value: 1, tens: -2, spellings: ['percent'] },

  { name: 'rev', spoken: 'revolution', dimension: dimension({ turn: 1 }), value: 1, spellings: ['revs'] },
  { name: 'rpm', spoken: 'revolution per minute', dimension: frequency, value: 1 / 60 },
  { name: 'Hz', spoken: 'hertz', dimension: frequency, value: 1, prefixes: ['m', 'k', 'M'] },
]

/** Written together as people do; read as the product. */
export const compounds: Readonly<Record<string, readonly string[]>> = {
  Nm: ['N', 'm'],
  Nmm: ['N', 'mm'],
  Ncm: ['N', 'cm'],
  mNm: ['mN', 'm'],
  daNm: ['daN', 'm'],
  kNm: ['kN', 'm'],
  kNmm: ['kN', 'mm'],
  kNcm: ['kN', 'cm'],
  MNm: ['MN', 'm'],
  'lbf-in': ['lbf', 'in'],
  'lbf-ft': ['lbf', 'ft'],
  'in-lbf': ['in', 'lbf'],
  'ft-lbf': ['ft', 'lbf'],
  'kip-in': ['kip', 'in'],
  'kip-ft': ['kip', 'ft'],
  'in-kip': ['in', 'kip'],
  'ft-kip': ['ft', 'kip'],
  kWh: ['kW', 'h'],
}
