/** Reactions, torque and rotation of the line: statics where they suffice, else the stiffness method. */
import { MethodProblem } from '../../engine/contracts'
import { solveTridiagonal } from '../../numerics/tridiagonal'
import { isSamePlace } from './line'
import type { Line, Piece } from './line'

export interface Equilibrium {
  /** On the bar, about +x; absent where that end is free. */
  reactions: { start?: number; end?: number }
  /** Internal torque of each piece. */
  torques: number[]
  /** Rotation at each station, one more than pieces. */
  rotations: number[]
}

/** A sum of torques this small against the greatest counts as balanced. */
const BALANCED = 1e-9

const stationsOf = (pieces: readonly Piece[]): number[] => [0, ...pieces.map(({ to }) => to)]

/** Torque applied at each station. */
const loadsAt = (line: Line, stations: readonly number[]): number[] =>
  stations.map((station) =>
    line.torques
      .filter(({ x }) => isSamePlace(line, x, station))
      .reduce((sum, { torque }) => sum + torque, 0),
  )

const reactionsOf = (
  line: Line,
  pieces: readonly Piece[],
  loads: readonly number[],
): Equilibrium['reactions'] => {
  const applied = loads.reduce((sum, load) => sum + load, 0)
  if (line.isFixed.start && line.isFixed.end) {
    const end = endReaction(pieces, loads)
    return { start: -applied - end, end }
  }
  if (line.isFixed.start) return { start: -applied }
  if (line.isFixed.end) return { end: -applied }
  const greatest = Math.max(...line.torques.map(({ torque }) => Math.abs(torque)))
  if (Math.abs(applied) > BALANCED * greatest) {
    throw new MethodProblem(
      'out-of-range',
      'Both ends are free and the torques do not balance, so the line would spin up: fix one end, or add the torque that is missing.',
      'torques',
    )
  }
  return {}
}

/** Torque that the support at the end puts on a line held at both ends, from the rotations of the stations between. */
const endReaction = (pieces: readonly Piece[], loads: readonly number[]): number => {
  const stiffness = pieces.map((piece) => piece.stiffness)
  const last = stiffness.length - 1
  if (last === 0) return 0 - (loads[1] ?? 0)
  const inner = stiffness.slice(1).map((k, i) => k + (stiffness[i] ?? 0))
  const beside = stiffness.slice(1, -1).map((k) => -k)
  const rotations = solveTridiagonal(inner, beside, loads.slice(1, -1))
  if (!rotations)
    throw new MethodProblem(
      'not-finite',
      'The stiffnesses differ so much that the line cannot be solved.',
      'segments',
    )
  return -(stiffness[last] ?? 0) * (rotations[last - 1] ?? 0) - (loads[last + 1] ?? 0)
}

/** @param pieces of the same line, in order */
export const equilibrium = (line: Line, pieces: readonly Piece[]): Equilibrium => {
  const stations = stationsOf(pieces)
  const loads = loadsAt(line, stations)
  const reactions = reactionsOf(line, pieces, loads)
  let before = reactions.start ?? 0
  const torques = pieces.map((_piece, i) => {
    before += loads[i] ?? 0
    // What cancels in exact arithmetic leaves rounding: an unloaded piece carries no torque at all.
    const scale = Math.max(...loads.map(Math.abs), Math.abs(reactions.start ?? 0))
    return Math.abs(before) <= 1e-14 * scale ? 0 : -before
  })
  const rotations = [0]
  pieces.forEach((piece, i) => rotations.push((rotations[i] ?? 0) + (torques[i] ?? 0) / piece.stiffness))
  // The datum: a fixed start, else a fixed end, else the start.
  const datum = !line.isFixed.start && line.isFixed.end ? (rotations.at(-1) ?? 0) : 0
  const measured = rotations.map((rotation) => rotation - datum)
  // A held end stands still; summing up leaves some 1e-18 rad there, which would be shown as a rotation.
  if (line.isFixed.end) measured[measured.length - 1] = 0
  return { reactions, torques, rotations: measured }
}
