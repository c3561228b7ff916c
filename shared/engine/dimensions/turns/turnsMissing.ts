/** Turns are asked for and none are there: `sqrt(k/I) to Hz`, `1/t_p to Hz`. */
import type { LooseProblem, Repair } from '../../../errors/problem'
import { mismatch } from '../../problems'
import { dimension, sameDimension, turns, type Dimension } from '../dimension'
import { appended, replacing, spanOf, typed, type TurnCase } from './turnCase'

const perTime = dimension({ time: -1 })

/** Offers both meanings, none first by right: only the author knows which one it is. */
export const turnsMissing = (at: TurnCase, own: Dimension): LooseProblem => {
  const text = typed(at, at.node)
  const repairs: Repair[] = []
  if (sameDimension(own, perTime)) {
    const call = `frequency(${at.node.type === 'group' ? typed(at, at.node.inner) : text})`
    repairs.push(replacing(at, `${text} is an angular speed: ${call}`, call))
  }
  if (at.target !== undefined && turns(at.target) === 1) {
    const counted = appended(at, '*1 rev')
    repairs.push(replacing(at, `${text} counts turns: ${counted}`, counted))
  }
  return mismatch(
    `${at.unit?.text ?? 'the unit'} counts turns, and ${text} has none. Say whether it is an angular speed or a count of turns.`,
    spanOf(at, at.node),
    repairs,
  )
}
