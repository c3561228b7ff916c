import { createSheetEngine, insertions } from '@shared/pipeline'
import { medians } from '../measure'
import { compiledGroup, evaluateGroup, scopeOf, setDiameter } from '../mathjsUnits'
import { asFraction, shownMs, type Row } from '../row'
import { diameter, shaftGroups } from '../shaftGroups'

/** Changes the diameter of one group to and fro, each time to another value. */
export const changingDiameter = (groups: number): (() => unknown) => {
  const engine = createSheetEngine()
  engine.apply({ changes: insertions(shaftGroups(groups)) })
  const group = Math.floor(groups / 2)
  const after = group === 0 ? 'phi_s' : `u_${group - 1}`
  let turn = 0
  return () => {
    turn += 1
    const line = diameter(group, String(41 + (turn % 7)))
    return engine.apply({ changes: [{ id: line.id, after, line }] })
  }
}

const mathjsTenLines = (): (() => unknown) => {
  const scope = scopeOf(100)
  const group = compiledGroup(50)
  let turn = 0
  return () => {
    turn += 1
    setDiameter(scope, 50, 41 + (turn % 7))
    return evaluateGroup(group, scope, false)
  }
}

export const oneGivenAgainstTenLines: Row = {
  what: 'one given of 1 000 formulas changes, 10 lines depend on it',
  baseline: 'the same 10 lines by mathjs with units, compiled before',
  target: '≤ 1/2',
  measure: () => {
    const [ours = NaN, theirs = NaN] = medians(
      [
        { run: changingDiameter(100), repeat: 50 },
        { run: mathjsTenLines(), repeat: 50 },
      ],
      60,
    )
    return {
      ratio: asFraction(ours / theirs),
      isReached: ours / theirs <= 1 / 2,
      detail: `${shownMs(ours)} against ${shownMs(theirs)}`,
    }
  },
}

export const oneGivenAgainstWholeSheet: Row = {
  what: 'the same',
  baseline: 'the whole sheet by mathjs with units, compiled before, results normalised',
  target: '≤ 1/300',
  measure: () => {
    const scope = scopeOf(100)
    const groups = Array.from({ length: 100 }, (_, k) => compiledGroup(k))
    const wholeSheet = () => groups.map((group) => evaluateGroup(group, scope, true))
    const [ours = NaN, theirs = NaN] = medians(
      [{ run: changingDiameter(100), repeat: 50 }, { run: wholeSheet }],
      60,
    )
    return {
      ratio: asFraction(ours / theirs),
      isReached: ours / theirs <= 1 / 300,
      detail: `${shownMs(ours)} against ${shownMs(theirs)}`,
    }
  },
}
