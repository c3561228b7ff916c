import type { EngineLine } from '../../contracts'
import type { ReadScope, Reading } from '../stages'
import { readAnalysis } from './analysis'
import { readCriterion } from './criterion'
import { readFormula } from './formula'
import { readGiven } from './given'
import { readInert } from './inert'

/** What the texts of a line say, by its kind. */
export const readLine = (line: EngineLine, scope: ReadScope): Reading => {
  switch (line.kind) {
    case 'given':
      return readGiven(line)
    case 'formula':
      return readFormula(line, scope)
    case 'criterion':
      return readCriterion(line, scope)
    case 'analysis':
      return readAnalysis(line, scope)
    case 'inert':
      return readInert(line)
  }
}
