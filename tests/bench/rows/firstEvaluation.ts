import { parse } from 'mathjs'
import { createSheetEngine, insertions } from '@shared/pipeline'
import { medians } from '../measure'
import { shownMs, type Row } from '../row'
import { formulasOf, shaftGroups } from '../shaftGroups'

export const firstEvaluation: Row = {
  what: 'first evaluation of 1 000 formulas, text to values',
  baseline: 'mathjs parsing the same texts, nothing else',
  target: '≤ 1.6×',
  measure: () => {
    const lines = shaftGroups(100)
    const texts = Array.from({ length: 100 }, (_, k) => formulasOf(k).map(({ text }) => text)).flat()
    const [ours = NaN, theirs = NaN] = medians(
      [
        { run: () => createSheetEngine().apply({ changes: insertions(lines) }) },
        { run: () => texts.map((text) => parse(text)) },
      ],
      60,
    )
    return {
      ratio: `${(ours / theirs).toPrecision(3)}×`,
      isReached: ours / theirs <= 1.6,
      detail: `${shownMs(ours)} against ${shownMs(theirs)}`,
    }
  },
}
