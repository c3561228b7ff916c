/** All kinds of line. Adding one is adding a file and its name here. */
import { z } from 'zod'
import { analysis } from './analysis'
import { cases } from './cases'
import { criterion } from './criterion'
import { figure } from './figure'
import { formula } from './formula'
import { given } from './given'
import { parametric } from './parametric'
import { sizing } from './sizing'
import { table } from './table'
import { tolerance } from './tolerance'

export const lineKinds = {
  given,
  formula,
  criterion,
  analysis,
  cases,
  sizing,
  parametric,
  tolerance,
  table,
  figure,
} as const

export const lineSchema = z.discriminatedUnion('kind', [
  given,
  formula,
  criterion,
  analysis,
  cases,
  sizing,
  parametric,
  tolerance,
  table,
  figure,
])

export type Line = z.infer<typeof lineSchema>
export type LineKind = Line['kind']
export type LineOf<K extends LineKind> = Extract<Line, { kind: K }>
export type Given = LineOf<'given'>
export type Formula = LineOf<'formula'>
export type Criterion = LineOf<'criterion'>
export type AnalysisLine = LineOf<'analysis'>
