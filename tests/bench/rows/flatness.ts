import { medians } from '../measure'
import { shownMs, type Row } from '../row'
import { changingDiameter } from './oneGiven'

const sizes = [100, 1_000, 10_000]

export const flatness: Row = {
  what: 'the same in sheets of 100, 1 000 and 10 000 formulas',
  baseline: 'their middle',
  target: 'flat, ±20 %',
  measure: () => {
    const times = medians(
      sizes.map((size) => ({ run: changingDiameter(size / 10), repeat: 50 })),
      60,
    )
    const middle = (Math.max(...times) + Math.min(...times)) / 2
    const spread = (Math.max(...times) - middle) / middle
    return {
      ratio: `±${(spread * 100).toPrecision(2)} %`,
      isReached: spread <= 0.2,
      detail: times.map(shownMs).join(', '),
    }
  },
}
