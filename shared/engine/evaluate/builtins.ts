/**
 * Functions of general mathematics. They take and give numbers in SI; what belongs to the mechanics of
 * torsion is in the library instead.
 */
import { MethodProblem, type LibraryFunction } from '../contracts'
import {
  dimension,
  dimensionless,
  isDimensionless,
  power,
  product,
  quotient,
  sameDimension,
  turns,
  type Dimension,
} from '../dimensions/dimension'
import { inWords } from '../dimensions/words'

type DimensionRule = LibraryFunction['dimension']

const turn = dimension({ turn: 1 })
const perTime = dimension({ time: -1 })

const first = (args: (Dimension | null)[]): Dimension => args[0] ?? dimensionless

const bare =
  (name: string): DimensionRule =>
  (args) => {
    const place = args.findIndex((given) => given !== null && !isDimensionless(given))
    if (place < 0) return dimensionless
    return {
      argument: place,
      message: `${name} takes a bare number, not ${inWords(args[place] ?? dimensionless)}.`,
    }
  }

const angle =
  (name: string): DimensionRule =>
  (args) => {
    const given = first(args)
    if (isDimensionless(given)) return dimensionless
    const counts = turns(given) === 1 && isDimensionless(quotient(given, turn))
    return {
      argument: 0,
      message: counts
        ? `${name} takes an angle in rad or deg; this counts turns. 2*pi times the turns is the angle.`
        : `${name} takes an angle, not ${inWords(given)}.`,
    }
  }

const alike =
  (name: string): DimensionRule =>
  (args) => {
    const wanted = first(args)
    const place = args.findIndex((given) => given !== null && !sameDimension(given, wanted))
    if (place < 0) return wanted
    return {
      argument: place,
      message: `${name} takes quantities of one kind: the first is ${inWords(wanted)}, this one ${inWords(args[place] ?? wanted)}.`,
    }
  }

const outside = (message: string, parameter: string): never => {
  throw new MethodProblem('domain', message, parameter)
}

interface Builtin {
  name: string
  title: string
  parameters?: readonly [name: string, meaning: string][]
  variadic?: boolean
  dimension: DimensionRule
  formula?: string
  range?: string
  /** Arguments in SI. */
  number: (...args: number[]) => number
}

const checked =
  (holds: (x: number) => boolean, message: string, number: (x: number) => number) =>
  (x: number): number =>
    holds(x) ? number(x) : outside(message, 'x')

/** 0.3/0.1 is 3, not 2.9999999999999996: what rounding left must not count as a step. */
const whole =
  (round: (x: number) => number) =>
  (x: number): number =>
    Math.abs(x - Math.round(x)) <= 1e-12 * Math.abs(x) ? Math.round(x) : round(x)

const withinOne = (x: number): boolean => x >= -1 && x <= 1

const list: readonly Builtin[] = [
  {
    name: 'sqrt',
    title: 'Square root',
    dimension: (args) => power(first(args), 0.5),
    range: 'x ≥ 0',
    number: checked((x) => x >= 0, 'The square root of a negative number is not real.', Math.sqrt),
  },
  { name: 'cbrt', title: 'Cube root', dimension: (args) => power(first(args), 1 / 3), number: Math.cbrt },
  { name: 'abs', title: 'Magnitude', dimension: first, number: Math.abs },
  { name: 'min', title: 'Smallest value', variadic: true, dimension: alike('min'), number: Math.min },
  { name: 'max', title: 'Largest value', variadic: true, dimension: alike('max'), number: Math.max },
  { name: 'exp', title: 'Exponential function', dimension: bare('exp'), number: Math.exp },
  {
    name: 'ln',
    title: 'Natural logarithm',
    dimension: bare('ln'),
    range: 'x > 0',
    number: checked((x) => x > 0, 'A logarithm needs a number above zero.', Math.log),
  },
  {
    name: 'log10',
    title: 'Decimal logarithm',
    dimension: bare('log10'),
    range: 'x > 0',
    number: checked((x) => x > 0, 'A logarithm needs a number above zero.', Math.log10),
  },
  { name: 'sin', title: 'Sine', dimension: angle('sin'), number: Math.sin },
  { name: 'cos', title: 'Cosine', dimension: angle('cos'), number: Math.cos },
  { name: 'tan', title: 'Tangent', dimension: angle('tan'), number: Math.tan },
  {
    name: 'asin',
    title: 'Angle of a sine, in rad',
    dimension: bare('asin'),
    range: '-1 ≤ x ≤ 1',
    number: checked(withinOne, 'asin needs a number from -1 to 1.', Math.asin),
  },
  {
    name: 'acos',
    title: 'Angle of a cosine, in rad',
    dimension: bare('acos'),
    range: '-1 ≤ x ≤ 1',
    number: checked(withinOne, 'acos needs a number from -1 to 1.', Math.acos),
  },
  { name: 'atan', title: 'Angle of a tangent, in rad', dimension: bare('atan'), number: Math.atan },
  {
    name: 'atan2',
    title: 'Angle of the point (x, y), in rad',
    parameters: [
      ['y', 'ordinate'],
      ['x', 'abscissa'],
    ],
    dimension: (args) => {
      const rule = alike('atan2')(args)
      return 'message' in rule ? rule : dimensionless
    },
    number: Math.atan2,
  },
  { name: 'sinh', title: 'Hyperbolic sine', dimension: bare('sinh'), number: Math.sinh },
  { name: 'cosh', title: 'Hyperbolic cosine', dimension: bare('cosh'), number: Math.cosh },
  { name: 'tanh', title: 'Hyperbolic tangent', dimension: bare('tanh'), number: Math.tanh },
  { name: 'sign', title: 'Sign: -1, 0 or 1', dimension: () => dimensionless, number: Math.sign },
  // Rounding depends on the unit, so it takes bare numbers: round(numerical_value(d, mm))*1 mm.
  { name: 'round', title: 'Nearest whole number', dimension: bare('round'), number: Math.round },
  { name: 'floor', title: 'Next whole number below', dimension: bare('floor'), number: whole(Math.floor) },
  { name: 'ceil', title: 'Next whole number above', dimension: bare('ceil'), number: whole(Math.ceil) },
  {
    name: 'angular_speed',
    title: 'Angular speed of a rotational frequency',
    parameters: [['n', 'rotational frequency, in rpm, rev/s or Hz']],
    dimension: (args) => {
      const given = first(args)
      return turns(given) === 1
        ? quotient(given, turn)
        : {
            argument: 0,
            message: `angular_speed takes a rotational frequency, in rpm, rev/s or Hz, not ${inWords(given)}.`,
          }
    },
    formula: '2*pi*n',
    number: (n) => 2 * Math.PI * n,
  },
  {
    name: 'frequency',
    title: 'Rotational frequency of an angular speed',
    parameters: [['omega', 'angular speed, in rad/s']],
    dimension: (args) => {
      const given = first(args)
      return sameDimension(given, perTime)
        ? product(given, turn)
        : { argument: 0, message: `frequency takes an angular speed, in rad/s, not ${inWords(given)}.` }
    },
    formula: 'omega/(2*pi)',
    number: (omega) => omega / (2 * Math.PI),
  },
]

const contract = ({
  name,
  title,
  parameters = [['x', 'value']],
  variadic,
  dimension: rule,
  formula,
  range,
  number,
}: Builtin): LibraryFunction => ({
  name,
  parameters: parameters.map(([parameter, meaning]) => ({ name: parameter, meaning })),
  ...(variadic === undefined ? {} : { variadic }),
  dimension: rule,
  evaluate: (args) => number(...args.map(Number)),
  help: {
    title,
    source: formula === undefined ? 'Elementary mathematics' : 'ISO 80000-3',
    ...(formula === undefined ? {} : { formula }),
    ...(range === undefined ? {} : { range }),
  },
})

export const builtins: ReadonlyMap<string, LibraryFunction> = new Map(
  list.map((entry) => [entry.name, contract(entry)]),
)
