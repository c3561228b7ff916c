/** All analyses by kind. Adding one is adding its folder and its name here. */
import type { Analysis } from '../engine/contracts'

const all: readonly Analysis[] = []

export const analyses: ReadonlyMap<string, Analysis> = new Map(
  all.map((analysis) => [analysis.spec.kind, analysis]),
)
