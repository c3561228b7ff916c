/** `C1: demand <= limit`, `demand within lower .. upper`. */
import { readsAsExpression } from '../prose'
import { divisionOf } from './division'
import { line, none, type CompactContext, type CompactReading } from './fields'
import type { CompactTail } from './tail'

/** @param symbol empty where the author gave none */
export const readCriterion = (
  statement: string,
  symbol: string,
  tail: CompactTail,
  context: CompactContext,
): CompactReading => {
  const division = divisionOf(statement)
  if (division === undefined || division.sign === '=') {
    return none('A criterion compares two sides: tau <= tau_allow, or phi within phi_1 .. phi_2.')
  }
  const demand = statement.slice(0, division.at).trim()
  const other = statement.slice(division.at + division.length).trim()
  const bounds = division.sign === 'within' ? other.split(/\s*(?:\.{2,3}|…)\s*/u) : [other]
  if (division.sign === 'within' && bounds.length !== 2) {
    return none('within takes two bounds: x within a .. b.')
  }
  if (division.sign !== 'within' && /[<>≤≥]/u.test(other) && !other.includes('?')) {
    return none('A criterion compares two sides. For two bounds, write x within a .. b.')
  }
  if (demand === '' || bounds.includes('')) return none('A side of the criterion is missing.')
  const isProse = (side: string): boolean => !readsAsExpression(side, context)
  if (context.block === undefined && [demand, ...bounds].some(isProse)) {
    return none('This is no comparison of two expressions.')
  }
  const [limit = '', upper] = bounds
  return line({
    ...tail,
    kind: 'criterion',
    symbol,
    demand,
    relation: division.sign,
    limit,
    ...(upper === undefined ? {} : { upper }),
  })
}
