/** Steps between neighbouring segments: where the stress peaks, and where nothing says by how much. */
import { MethodProblem } from '../../engine/contracts'
import { filletFactor } from '../../mechanics/fillet'
import type { Line, Piece, Segment } from './line'

export interface Step {
  /** The segment before the step; it names the step. */
  before: Segment
  thinner: Segment
  larger: number
  smaller: number
  radius: number
  factor: number
  source: string
  /** Torque through the thinner segment beside the step. */
  torque: number
  nominal: number
  peak: number
}

interface Steps {
  steps: Step[]
  advisories: { message: string; input?: string }[]
}

export const stepsOf = (line: Line, pieces: readonly Piece[], torques: readonly number[]): Steps => {
  const found: Steps = { steps: [], advisories: [] }
  line.segments.forEach((before, i) => {
    const after = line.segments[i + 1]
    const input = `segments.${before.name}.r`
    const isStep = after !== undefined && before.round?.outer !== after.round?.outer
    if (!isStep) {
      if (before.fillet !== undefined) {
        found.advisories.push({
          message: `There is no step after segment ${before.name}: its fillet radius is not used.`,
          input,
        })
      }
      return
    }
    if (before.fillet === undefined) {
      found.advisories.push({
        message: `The step after segment ${before.name} has no fillet radius: the stress there is nominal, without its peak.`,
        input,
      })
      return
    }
    if (!before.round || !after.round) {
      throw new MethodProblem(
        'invalid-field',
        `The fillet after segment ${before.name} lies beside a section that is not round: no factor is known. Leave the radius empty.`,
        input,
      )
    }
    const thinner = before.round.outer < after.round.outer ? before : after
    const larger = Math.max(before.round.outer, after.round.outer)
    const smaller = Math.min(before.round.outer, after.round.outer)
    const { factor, source } = factorAt(larger, smaller, before.fillet, before, input)
    const beside = pieces.findIndex(
      (piece) =>
        piece.segment === thinner &&
        (thinner === before ? piece.to === before.to : piece.from === after.from),
    )
    const torque = torques[beside] ?? NaN
    const nominal = Math.abs(torque) / thinner.W_t
    if (before.round.bore > 0 || after.round.bore > 0) {
      found.advisories.push({
        message: `The factor at the step after segment ${before.name} is that of a solid shaft; with a bore it is approximate.`,
        input,
      })
    }
    found.steps.push({
      ...{ before, thinner, larger, smaller, radius: before.fillet },
      ...{ factor, source, torque, nominal, peak: factor * nominal },
    })
  })
  return found
}

const factorAt = (D: number, d: number, r: number, before: Segment, input: string) => {
  try {
    return filletFactor(D, d, r)
  } catch (problem) {
    if (!(problem instanceof MethodProblem)) throw problem
    throw new MethodProblem(
      problem.code,
      `Step after segment ${before.name}: ${problem.message} Without a radius, the stress there is nominal.`,
      input,
    )
  }
}
