import type { Line } from '@shared/sheet/kinds'
import type { Desk } from '../desk'
import { drawAnalysis } from './analysis'
import { drawCriterion } from './criterion'
import { drawFigure } from './figure'
import { drawFormula } from './formula'
import { drawGiven } from './given'
import type { LineDrawing } from './parts'
import { drawStudy } from './study'
import { drawTable } from './table'

/** What stands right of the equals axis, by the kind of line. */
export const drawKind = (line: Line, desk: Desk): LineDrawing => {
  switch (line.kind) {
    case 'given':
      return drawGiven(line, desk)
    case 'formula':
      return drawFormula(line, desk)
    case 'criterion':
      return drawCriterion(line, desk)
    case 'analysis':
      return drawAnalysis(line, desk)
    case 'table':
      return drawTable(line, desk)
    case 'figure':
      return drawFigure(line, desk)
    case 'cases':
    case 'sizing':
    case 'parametric':
    case 'tolerance':
      return drawStudy(line, desk)
  }
}
