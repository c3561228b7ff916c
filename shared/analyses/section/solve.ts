import { MethodProblem } from '../../engine/contracts'
import type { Solution, SolvedInput, WorkingStep } from '../../engine/contracts'
import { closedCell, crossesItself } from '../../mechanics/closedCell'
import type { WallPoint } from '../../mechanics/closedCell'
import * as q from '../../mechanics/quantities'
import {
  rectangleStiffnessCoefficient,
  rectangleStrengthCoefficient,
  rectangleTorsionConstant,
  rectangleTorsionModulus,
} from '../../mechanics/rectangle'
import { roundArea, roundTorsionConstant, roundTorsionModulus } from '../../mechanics/round'
import { of, step } from '../../mechanics/working'
import type { SectionShape } from './shape'

/** Above this share of the mean width, walls are no longer thin: no number is given. */
const THICKEST = 0.2
/** Above this one the numbers are given with an advisory. Both are common practice, no source. */
const THIN = 0.1

interface Properties {
  shape: SectionShape
  outputs: Record<string, number>
  working: WorkingStep[]
  place: string
  advisories?: Solution['advisories']
}

const ELASTICITY = 'Timoshenko & Goodier, Theory of Elasticity, 3rd ed.'

const round = (outer: number, bore: number): Properties => {
  if (bore >= outer) {
    throw new MethodProblem('out-of-range', 'The bore must be smaller than the outside diameter.', 'd_i')
  }
  const J = roundTorsionConstant(outer, bore)
  const W_t = roundTorsionModulus(outer, bore)
  const values = { d_o: of(q.length, outer), ...(bore > 0 ? { d_i: of(q.length, bore) } : {}) }
  return {
    shape: { shape: 'round', outer, bore },
    outputs: { J, W_t, A: roundArea(outer, bore), ...centred(J / 2, J / 2, outer / 2, outer / 2) },
    working: [
      step('J', q.secondMoment, J, {
        expression: bore > 0 ? 'pi/32*(d_o^4 - d_i^4)' : 'pi/32*d_o^4',
        values,
        source: ELASTICITY,
        clause: 'section 104',
      }),
      step('W_t', q.sectionModulus, W_t, {
        expression: '2*J/d_o',
        values: { J: of(q.secondMoment, J), d_o: of(q.length, outer) },
      }),
    ],
    place: 'outside surface',
  }
}

const rectangle = (a: number, b: number): Properties => {
  const long = Math.max(a, b)
  const short = Math.min(a, b)
  const k_1 = rectangleStiffnessCoefficient(a, b)
  const k_2 = rectangleStrengthCoefficient(a, b)
  const J = rectangleTorsionConstant(a, b)
  const W_t = rectangleTorsionModulus(a, b)
  const sides = { h: of(q.length, long), b: of(q.length, short) }
  return {
    shape: { shape: 'rectangle', a, b },
    outputs: { J, W_t, A: a * b, ...centred((a * b ** 3) / 12, (b * a ** 3) / 12, a / 2, b / 2) },
    working: [
      step('k_1', q.ratio, k_1, {
        note: 'Saint-Venant’s series for the sides h (long) and b (short), summed to double precision',
        source: ELASTICITY,
        clause: 'section 109, equation (163)',
      }),
      step('J', q.secondMoment, J, { expression: 'k_1*h*b^3', values: { k_1: of(q.ratio, k_1), ...sides } }),
      step('k_2', q.ratio, k_2, {
        note: 'The same series for the stress at the middle of the long sides',
        source: ELASTICITY,
        clause: 'section 109, equation (161)',
      }),
      step('W_t', q.sectionModulus, W_t, {
        expression: 'k_2*h*b^2',
        values: { k_2: of(q.ratio, k_2), ...sides },
      }),
    ],
    place: 'middle of the long sides',
  }
}

/** Bending properties of a section that is symmetric about y and z, with its centroid at the origin. */
const centred = (I_y: number, I_z: number, reachY: number, reachZ: number) => ({
  y_c: 0,
  z_c: 0,
  I_y,
  I_z,
  I_yz: 0,
  alpha: I_y >= I_z ? 0 : Math.PI / 2,
  W_y: I_y / reachZ,
  W_z: I_z / reachY,
})

const cell = (points: readonly (WallPoint & { name: string })[]): Properties => {
  points.forEach((point, i) => {
    const next = points[(i + 1) % points.length]
    if (next && point.y === next.y && point.z === next.z) {
      throw new MethodProblem(
        'out-of-range',
        `Corner ${point.name} and corner ${next.name} are the same point: remove one of them. The last corner joins the first by itself.`,
        `points.${point.name}.y`,
      )
    }
  })
  if (crossesItself(points)) {
    throw new MethodProblem(
      'out-of-range',
      'The middle line crosses itself: the corners must go round one cell.',
      'points',
    )
  }
  const found = closedCell(points)
  if (!(found.enclosedArea > 0)) {
    throw new MethodProblem('out-of-range', 'The corners lie on one line: they enclose no area.', 'points')
  }
  if (found.thickness > THICKEST) {
    throw new MethodProblem(
      'out-of-range',
      `The walls are too thick for thin-walled theory: the thickest is ${found.thickness.toPrecision(2)} of the mean width, and ${THICKEST} is the limit.`,
      'points',
    )
  }
  const { torsionConstant: J, torsionModulus: W_t, enclosedArea: A_m, slenderness, openConstant } = found
  const governing = points[found.governingWall]
  const t = governing?.t ?? 0
  const wall = `wall from corner ${governing?.name ?? ''}`
  return {
    shape: {
      shape: 'closed-cell',
      points: points.map(({ y, z, t }) => ({ y, z, t })),
      wall: found.governingWall,
    },
    outputs: {
      J,
      W_t,
      A: found.area,
      A_m,
      y_c: found.centroid.y,
      z_c: found.centroid.z,
      I_y: found.I_y,
      I_z: found.I_z,
      I_yz: found.I_yz,
      alpha: Math.atan2(-2 * found.I_yz, found.I_y - found.I_z) / 2,
      W_y: found.I_y / found.reach.z,
      W_z: found.I_z / found.reach.y,
    },
    working: [
      step('A_m', q.area, A_m, { note: 'area within the middle line, from its corners' }),
      step('s_t', q.ratio, slenderness, { note: 'sum of length over thickness of all walls' }),
      step('J_o', q.secondMoment, openConstant, {
        note: 'sum of length times thickness cubed over 3: the walls as open strips',
      }),
      step('J', q.secondMoment, J, {
        expression: '4*A_m^2/s_t + J_o',
        values: {
          A_m: of(q.area, A_m),
          s_t: of(q.ratio, slenderness),
          J_o: of(q.secondMoment, openConstant),
        },
        source: 'Bredt; EN 10210-2, Annex A',
      }),
      step('W_t', q.sectionModulus, W_t, {
        expression: 'J/(2*A_m/(s_t*t) + t)',
        values: {
          J: of(q.secondMoment, J),
          A_m: of(q.area, A_m),
          s_t: of(q.ratio, slenderness),
          t: of(q.length, t),
        },
        note: wall,
        source: 'Bredt; EN 10210-2, Annex A',
      }),
    ],
    place: wall,
    ...(found.thickness > THIN
      ? {
          advisories: [
            {
              message: `The thickest wall is ${found.thickness.toPrecision(2)} of the mean width: thin-walled theory is approximate here.`,
              input: 'points',
            },
          ],
        }
      : {}),
  }
}

const number = (value: SolvedInput): number => (typeof value === 'number' ? value : 0)

const corners = (rows: SolvedInput): (WallPoint & { name: string })[] =>
  (Array.isArray(rows) ? rows : []).map((row) => ({
    name: row.name,
    y: Number(row['y']),
    z: Number(row['z']),
    t: Number(row['t']),
  }))

const propertiesOf = (inputs: Record<string, SolvedInput>): Properties => {
  switch (inputs['shape']) {
    case 'rectangle':
      return rectangle(number(inputs['a']), number(inputs['b']))
    case 'closed-cell':
      return cell(corners(inputs['points']))
    case 'hollow-round':
      return round(number(inputs['d_o']), number(inputs['d_i']))
    default:
      return round(number(inputs['d_o']), 0)
  }
}

/** Properties of the section, and its greatest shear stress where a torque is given. */
export const solve = (inputs: Record<string, SolvedInput>): Solution => {
  const { shape, outputs, working, place, advisories } = propertiesOf(inputs)
  const W_t = outputs['W_t'] ?? NaN
  const T = inputs['T']
  const stressed = typeof T === 'number'
  const tau_max = stressed ? Math.abs(T) / W_t : 0
  return {
    outputs: { ...outputs, tau_per_T: 1 / W_t, ...(stressed ? { tau_max } : {}) },
    places: { tau_per_T: place, ...(stressed ? { tau_max: place } : {}) },
    working: [
      ...working,
      ...(stressed
        ? [
            step('tau_max', q.stress, tau_max, {
              expression: 'abs(T)/W_t',
              values: { T: of(q.torque, T), W_t: of(q.sectionModulus, W_t) },
              note: place,
            }),
          ]
        : []),
    ],
    figure: shape,
    ...(advisories ? { advisories } : {}),
  }
}
