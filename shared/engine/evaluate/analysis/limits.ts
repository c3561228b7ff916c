/** Bounds of an input, with a message made from its label, in the sheet's units. */
import type { Limits, LooseProblem } from '../../contracts'
import { outsideLimits } from './problems'

/** Rounding of a unit must not put a value on the wrong side of a bound that it stands on. */
const tolerance = (bound: number): number => 1e-12 * Math.abs(bound)

/** @param show the bound and the value as they are shown to people */
export const limitProblem = (
  path: string,
  label: string,
  si: number,
  limits: Limits | undefined,
  show: (si: number) => string,
): LooseProblem | undefined => {
  const { above, atLeast, below, atMost } = limits ?? {}
  const refuse = (rule: string, bound: number) =>
    outsideLimits(path, label, `${rule} ${show(bound)}`, show(si))
  if (above !== undefined && !(si > above)) return refuse('greater than', above)
  if (atLeast !== undefined && !(si >= atLeast - tolerance(atLeast))) return refuse('at least', atLeast)
  if (below !== undefined && !(si < below)) return refuse('less than', below)
  if (atMost !== undefined && !(si <= atMost + tolerance(atMost))) return refuse('at most', atMost)
  return undefined
}
