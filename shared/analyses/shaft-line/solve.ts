import { MethodProblem } from '../../engine/contracts'
import type { Solution, SolvedInput } from '../../engine/contracts'
import { equilibrium } from './equilibrium'
import { piecesOf, readLine } from './line'
import type { Line, Piece } from './line'
import type { LineDrawing } from './figure'
import { stepsOf } from './steps'
import { workingOf } from './working'

const greatest = (values: readonly number[]): number =>
  values.reduce((best, value, i) => (value > (values[best] ?? 0) ? i : best), 0)

/** Torque, twist, nominal and peak stress of the line, with every step shown. */
export const solve = (inputs: Record<string, SolvedInput>): Solution => {
  const line = readLine(inputs)
  const pieces = piecesOf(line)
  const balance = equilibrium(line, pieces)
  const stresses = pieces.map((piece, i) => Math.abs(balance.torques[i] ?? 0) / piece.segment.W_t)
  const { steps, advisories } = stepsOf(line, pieces, balance.torques)

  const mostTorque = greatest(balance.torques.map(Math.abs))
  const mostStress = greatest(stresses)
  const mostRotation = greatest(balance.rotations.map(Math.abs))
  const flexibility = pieces.reduce((sum, piece) => sum + 1 / piece.stiffness, 0)
  const outputs: Record<string, number> = {
    T_max: Math.abs(balance.torques[mostTorque] ?? 0),
    tau_max: stresses[mostStress] ?? 0,
    phi_end: balance.rotations.at(-1) ?? 0,
    phi_max: Math.abs(balance.rotations[mostRotation] ?? 0),
    k_t: 1 / flexibility,
  }
  if (balance.reactions.start !== undefined) outputs['T_start'] = balance.reactions.start
  if (balance.reactions.end !== undefined) outputs['T_end'] = balance.reactions.end
  for (const segment of line.segments) {
    const own = pieces.map((piece, i) => (piece.segment === segment ? (stresses[i] ?? 0) : 0))
    outputs[`tau_${segment.name}`] = Math.max(...own)
    const last = pieces.findLastIndex((piece) => piece.segment === segment)
    outputs[`phi_${segment.name}`] = balance.rotations[last + 1] ?? 0
  }
  for (const step of steps) {
    outputs[`K_ts_${step.before.name}`] = step.factor
    outputs[`tau_peak_${step.before.name}`] = step.peak
  }

  const segmentOf = (piece: number) => `segment ${pieces[piece]?.segment.name ?? ''}`
  const drawing: LineDrawing = {
    length: line.length,
    isFixed: line.isFixed,
    segments: line.segments.map(({ name, from, to, round }) => ({
      name,
      from,
      to,
      ...(round ? { round } : {}),
    })),
    torques: line.torques.map(({ x, torque }) => ({ x, torque })),
    stations: [0, ...pieces.map(({ to }) => to)],
    ...{ T: balance.torques, phi: balance.rotations, tau: stresses },
  }
  return {
    outputs,
    places: {
      T_max: segmentOf(mostTorque),
      tau_max: segmentOf(mostStress),
      phi_max: mostRotation === 0 ? 'start' : `end of ${segmentOf(mostRotation - 1)}`,
    },
    working: workingOf(line, pieces, balance, steps, outputs),
    figure: drawing,
    along: alongOf(line, pieces, balance, stresses),
    advisories,
  }
}

/** What stands at a station; at a jump the side of greater magnitude. */
const alongOf = (
  line: Line,
  pieces: readonly Piece[],
  balance: { torques: number[]; rotations: number[] },
  stresses: readonly number[],
): Record<string, (x: number) => number> => {
  const touching = (x: number): number[] => {
    const slack = 1e-9 * line.length
    if (!(x >= -slack && x <= line.length + slack)) {
      throw new MethodProblem('out-of-range', 'The station lies outside the line.')
    }
    return pieces.flatMap((piece, i) => (x >= piece.from - slack && x <= piece.to + slack ? [i] : []))
  }
  const greater = (values: readonly number[]) => (x: number) =>
    touching(x)
      .map((i) => values[i] ?? 0)
      .reduce((best, value) => (Math.abs(value) > Math.abs(best) ? value : best), 0)
  return {
    T: greater(balance.torques),
    tau: greater(stresses),
    phi: (x) => {
      const [i = 0] = touching(x)
      const piece = pieces[i]
      return (
        (balance.rotations[i] ?? 0) +
        ((balance.torques[i] ?? 0) * (x - (piece?.from ?? 0))) /
          ((piece?.segment.G ?? NaN) * (piece?.segment.J ?? NaN))
      )
    },
  }
}
