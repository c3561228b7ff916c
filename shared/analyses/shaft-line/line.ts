/** The line as the solution sees it: segments, torques, and the pieces of constant torque between stations. */
import { MethodProblem } from '../../engine/contracts'
import type { SolvedInput, SolvedReference } from '../../engine/contracts'
import { roundTorsionConstant, roundTorsionModulus } from '../../mechanics/round'

export interface Segment {
  name: string
  /** m from the start. */
  from: number
  to: number
  length: number
  G: number
  hasOwnModulus: boolean
  J: number
  W_t: number
  /** Diameters of a round segment, m; absent where a section line gives J and W_t. */
  round?: { outer: number; bore: number }
  section?: string
  /** Fillet radius at the step to the next segment, m. */
  fillet?: number
}

export interface AppliedTorque {
  name: string
  x: number
  torque: number
}

export interface Line {
  segments: Segment[]
  torques: AppliedTorque[]
  length: number
  isFixed: { start: boolean; end: boolean }
}

type Row = Exclude<Extract<SolvedInput, unknown[]>, undefined>[number]

const rows = (input: SolvedInput): Row[] => (Array.isArray(input) ? input : [])
const optional = (cell: Row[string]): number | undefined => (typeof cell === 'number' ? cell : undefined)
const isReference = (cell: Row[string]): cell is SolvedReference => typeof cell === 'object'

const sectionOf = (row: Row, at: string): Pick<Segment, 'J' | 'W_t' | 'round' | 'section'> => {
  const reference = row['section']
  const outer = optional(row['d'])
  if (isReference(reference)) {
    if (outer !== undefined) {
      throw new MethodProblem(
        'invalid-field',
        `Segment ${row.name} has both a diameter and a section line: keep one of them.`,
        `${at}.section`,
      )
    }
    const { J, W_t } = reference.outputs
    return { J: J ?? NaN, W_t: W_t ?? NaN, section: reference.symbol }
  }
  if (outer === undefined) {
    throw new MethodProblem(
      'missing-input',
      `Segment ${row.name} needs an outside diameter or a section line.`,
      `${at}.d`,
    )
  }
  const bore = optional(row['d_i']) ?? 0
  if (bore >= outer) {
    throw new MethodProblem(
      'out-of-range',
      `The bore of segment ${row.name} must be smaller than its outside diameter.`,
      `${at}.d_i`,
    )
  }
  return {
    J: roundTorsionConstant(outer, bore),
    W_t: roundTorsionModulus(outer, bore),
    round: { outer, bore },
  }
}

/** Where the bore of one segment is as wide as the next is outside, no metal joins them. */
const refuseGap = (before: Segment | undefined, after: Segment): void => {
  if (!before?.round || !after.round) return
  const [wider, thinner] = before.round.bore >= after.round.outer ? [before, after] : [after, before]
  if ((wider.round?.bore ?? 0) < (thinner.round?.outer ?? Infinity)) return
  throw new MethodProblem(
    'out-of-range',
    `Segments ${before.name} and ${after.name} do not meet: the bore of segment ${wider.name} is not smaller than the outside diameter of segment ${thinner.name}.`,
    `segments.${wider.name}.d_i`,
  )
}

/** Reads the solved inputs; throws a MethodProblem where they describe no line. */
export const readLine = (inputs: Record<string, SolvedInput>): Line => {
  const common = typeof inputs['G'] === 'number' ? inputs['G'] : undefined
  let reached = 0
  const segments = rows(inputs['segments']).map((row): Segment => {
    const at = `segments.${row.name}`
    const own = optional(row['G'])
    const G = own ?? common
    if (G === undefined) {
      throw new MethodProblem(
        'missing-input',
        `Give the shear modulus: segment ${row.name} has none of its own.`,
        'G',
      )
    }
    const from = reached
    const length = optional(row['length']) ?? NaN
    reached += length
    const fillet = optional(row['r'])
    return {
      name: row.name,
      from,
      to: reached,
      length,
      G,
      hasOwnModulus: own !== undefined,
      ...sectionOf(row, at),
      ...(fillet === undefined ? {} : { fillet }),
    }
  })
  segments.slice(1).forEach((segment, index) => refuseGap(segments[index], segment))
  const torques = rows(inputs['torques']).map((row) => {
    const x = optional(row['x']) ?? NaN
    if (x > reached * (1 + 1e-9)) {
      throw new MethodProblem(
        'out-of-range',
        `Torque ${row.name} lies beyond the end of the line.`,
        `torques.${row.name}.x`,
      )
    }
    return { name: row.name, x: Math.min(x, reached), torque: optional(row['T']) ?? NaN }
  })
  return {
    segments,
    torques,
    length: reached,
    isFixed: { start: inputs['start'] === 'fixed', end: inputs['end'] === 'fixed' },
  }
}

/** A stretch within one segment between neighbouring stations: constant torque, constant section. */
export interface Piece {
  segment: Segment
  from: number
  to: number
  /** T·m per radian. */
  stiffness: number
}

/** Stations closer than this share of the length are one. */
const SAME_PLACE = 1e-9

export const isSamePlace = (line: Line, a: number, b: number): boolean =>
  Math.abs(a - b) <= SAME_PLACE * line.length

export const piecesOf = (line: Line): Piece[] =>
  line.segments.flatMap((segment) => {
    const inside = line.torques
      .map(({ x }) => x)
      .filter((x) => x > segment.from && x < segment.to)
      .filter((x) => !isSamePlace(line, x, segment.from) && !isSamePlace(line, x, segment.to))
      .sort((a, b) => a - b)
      .filter((x, i, all) => i === 0 || !isSamePlace(line, x, all[i - 1] ?? NaN))
    const stations = [segment.from, ...inside, segment.to]
    return stations.slice(1).map((to, i) => {
      const from = stations[i] ?? segment.from
      return { segment, from, to, stiffness: (segment.G * segment.J) / (to - from) }
    })
  })
