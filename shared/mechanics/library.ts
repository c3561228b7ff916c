/** Functions of mechanics for expressions, each with its source and range. */
import { MethodProblem } from '../engine/contracts'
import type { Dimension, LibraryFunction } from '../engine/contracts'
import { dimensionless, sameDimension } from '../engine/dimensions/dimension'
import { FILLET_RANGE, filletFactor } from './fillet'
import { isSeries, preferredAbove, preferredBelow } from './preferredNumbers'
import * as q from './quantities'
import { rectangleTorsionConstant, rectangleTorsionModulus } from './rectangle'
import { roundTorsionConstant, roundTorsionModulus } from './round'

const ELASTICITY = 'Timoshenko & Goodier, Theory of Elasticity, 3rd ed.'

const number = (argument: number | string | undefined): number =>
  typeof argument === 'number' ? argument : 0

/** Result dimension of a function all of whose arguments are lengths. */
const ofLengths =
  (result: Dimension): LibraryFunction['dimension'] =>
  (args) => {
    const wrong = args.findIndex(
      (argument) => argument !== null && !sameDimension(argument, q.length.dimension),
    )
    return wrong < 0 ? result : { argument: wrong, message: 'A length is needed here.' }
  }

const positive = (value: number, input: string, label: string): number => {
  if (value > 0) return value
  throw new MethodProblem('out-of-range', `${label} must be greater than zero.`, input)
}

const bore = (outer: number, inner: number): number => {
  if (inner >= 0 && inner < outer) return inner
  throw new MethodProblem(
    'out-of-range',
    'The bore must be at least zero and smaller than the outside diameter.',
    'd_i',
  )
}

const outside = { name: 'd', meaning: 'outside diameter' }
const inside = { name: 'd_i', meaning: 'bore; left out: solid', optional: true }
const sides = [
  { name: 'a', meaning: 'one side' },
  { name: 'b', meaning: 'the other side' },
]

const round = (name: 'J_round' | 'W_round', of: (d: number, d_i: number) => number): LibraryFunction => ({
  name,
  parameters: [outside, inside],
  dimension: ofLengths(name === 'J_round' ? q.secondMoment.dimension : q.sectionModulus.dimension),
  evaluate: ([d, d_i]) => {
    const outer = positive(number(d), 'd', 'The outside diameter')
    return of(outer, bore(outer, number(d_i)))
  },
  help: {
    title:
      name === 'J_round'
        ? 'Torsion constant of a round section'
        : 'Elastic torsion modulus of a round section',
    formula: name === 'J_round' ? 'pi/32*(d^4 - d_i^4)' : 'pi/16*(d^4 - d_i^4)/d',
    source: `${ELASTICITY}, section 104`,
    range: 'exact for 0 ≤ d_i < d',
  },
})

const rectangle = (name: 'J_rect' | 'W_rect', of: (a: number, b: number) => number): LibraryFunction => ({
  name,
  parameters: sides,
  dimension: ofLengths(name === 'J_rect' ? q.secondMoment.dimension : q.sectionModulus.dimension),
  evaluate: ([a, b]) => of(positive(number(a), 'a', 'The side a'), positive(number(b), 'b', 'The side b')),
  help: {
    title: name === 'J_rect' ? 'Torsion constant of a rectangle' : 'Elastic torsion modulus of a rectangle',
    source: `${ELASTICITY}, section 109: Saint-Venant’s series, summed to double precision`,
    range: 'any sides, in either order; ends free to warp',
  },
})

const preferred = (name: string, of: typeof preferredAbove, title: string): LibraryFunction => ({
  name,
  parameters: [
    { name: 'x', meaning: 'value to round' },
    { name: 'series', meaning: 'R5, R10, R20 or R40', kind: 'series' },
    {
      name: 'unit',
      meaning: 'unit in which the number is taken; left out: the display unit of x',
      kind: 'unit',
      optional: true,
    },
  ],
  dimension: ([x]) => x ?? dimensionless,
  evaluate: ([x, word, unit]) => {
    const name = typeof word === 'string' ? word : ''
    if (!isSeries(name))
      throw new MethodProblem(
        'invalid-field',
        `${name || 'This'} is no series: R5, R10, R20 or R40.`,
        'series',
      )
    const one = typeof unit === 'number' ? unit : 1
    return of(positive(number(x), 'x', 'A value to round to a preferred number') / one, name) * one
  },
  help: { title, source: 'ISO 3:1973, table 1, rounded values', range: 'x > 0' },
})

export const libraryFunctions: readonly LibraryFunction[] = [
  round('J_round', roundTorsionConstant),
  round('W_round', roundTorsionModulus),
  rectangle('J_rect', rectangleTorsionConstant),
  rectangle('W_rect', rectangleTorsionModulus),
  {
    name: 'K_ts_fillet',
    parameters: [
      { name: 'D', meaning: 'larger diameter' },
      { name: 'd', meaning: 'smaller diameter' },
      { name: 'r', meaning: 'fillet radius' },
    ],
    dimension: ofLengths(dimensionless),
    evaluate: ([D, d, r]) => {
      const smaller = positive(number(d), 'd', 'The smaller diameter')
      if (!(number(D) > smaller)) {
        throw new MethodProblem(
          'out-of-range',
          'The larger diameter D must stand first and be greater than d.',
          'D',
        )
      }
      return filletFactor(number(D), smaller, positive(number(r), 'r', 'The fillet radius')).factor
    },
    help: {
      title: 'Stress concentration at a shoulder fillet in torsion',
      source:
        "Pilkey & Pilkey, Peterson's Stress Concentration Factors, 3rd ed., chart 3.12; beyond it Norton, Machine Design, 3rd ed., figure C-3 (coefficients from memory)",
      range: FILLET_RANGE,
      section: 'nominal stress of the smaller diameter, 16·T/(π·d³)',
    },
  },
  preferred('preferred', preferredAbove, 'Preferred number next above'),
  preferred('preferred_below', preferredBelow, 'Preferred number next below'),
]
