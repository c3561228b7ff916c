/**
 * A criterion: the requirement in symbols (`τ ≤ τ_allow`), with values in their place, and the comparison
 * of the two values (`τ = 42.1 MPa ≤ 60 MPa`). Where it is not met, the last part shows its sign struck
 * through, so that no line states what is false.
 */
import type { CriterionResult, Presentation } from '../contracts'
import type { Expression } from '../parse/expression'
import { drawChain, type Link } from './comparison'
import type { Drawn } from './drawn'
import { drawExpression } from './expression'
import { present, withoutRepetition } from './parts'
import { drawQuantity } from './quantity'
import { drawSymbol } from './symbol'
import type { CriterionView, Substitution } from './views'
import { drawWord } from './word'

interface Sides {
  /** What the requirement is about, and after an equals sign its value where that is shown apart. */
  demand: Drawn
  value?: Drawn
  limit: Drawn
  upper?: Drawn
}

interface Holds {
  limit: boolean
  upper: boolean
}

const holdsOf = ({ satisfied, demand, limit, upper }: CriterionResult): Holds => {
  if (satisfied) return { limit: true, upper: true }
  if (upper === undefined) return { limit: false, upper: true }
  const isAbove = demand.si > upper.si
  return { limit: isAbove && demand.si >= limit.si, upper: !isAbove }
}

const statement = (relation: CriterionView['relation'], sides: Sides, holds?: Holds): Drawn => {
  const { demand, value, limit, upper } = sides
  const equal: Link[] = value ? [{ relation: '==', side: value }] : []
  if (relation !== 'within')
    return drawChain(demand, [...equal, { relation, side: limit, holds: holds?.limit ?? true }])
  return drawChain(limit, [
    { relation: '<=', side: demand, holds: holds?.limit ?? true },
    ...equal,
    ...(upper ? [{ relation: '<=' as const, side: upper, holds: holds?.upper ?? true }] : []),
  ])
}

/** The sides as written, or with values; a side that cannot be read yet is a gap. */
const sides = ({ demand, limit, upper }: CriterionView, substitute?: Substitution): Sides => {
  const draw = (side: Expression | undefined): Drawn =>
    side ? drawExpression(side, substitute) : drawWord('…')
  return { demand: draw(demand), limit: draw(limit), ...(upper && { upper: draw(upper) }) }
}

const valuesOf = (result: CriterionResult, demand: Expression): Sides => {
  const value = drawQuantity(result.demand)
  return {
    ...(demand.type === 'symbol' ? { demand: drawSymbol(demand.name), value } : { demand: value }),
    limit: drawQuantity(result.limit),
    ...(result.upper && { upper: drawQuantity(result.upper) }),
  }
}

const isBare = (side: Expression | undefined): boolean =>
  side !== undefined && ['symbol', 'number', 'quantity'].includes(side.type)

export const presentCriterion = (view: CriterionView): Presentation => {
  const { id, symbol, demand, limit, upper, relation, substitute, result, waitsFor = [] } = view
  const name = drawSymbol(symbol)
  if (!demand && !limit) return present(id, { symbol: name }, { equals: false })
  const parts = withoutRepetition({
    symbol: name,
    symbolic: statement(relation, sides(view)),
    substituted: statement(relation, sides(view, substitute)),
    ...(result && demand && { result: statement(relation, valuesOf(result, demand), holdsOf(result)) }),
  })
  // Bare symbols with their values in place say what the result says.
  const { substituted, ...others } = parts
  const isPlain = result !== undefined && [demand, limit, upper ?? limit].every(isBare)
  return present(id, isPlain || !substituted ? others : { ...others, substituted }, {
    equals: false,
    waitsFor: waitsFor.map(drawSymbol),
  })
}
