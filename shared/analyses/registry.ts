/** All analyses by kind. Adding one is adding its folder and its name here. */
import type { Analysis } from '../engine/contracts'
import { section } from './section'
import { shaftLine } from './shaft-line'

const all: readonly Analysis[] = [section, shaftLine]

export const analyses: ReadonlyMap<string, Analysis> = new Map(
  all.map((analysis) => [analysis.spec.kind, analysis]),
)
