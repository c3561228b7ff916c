/**
 * The reading order of a sheet: which of two lines comes first, answered at once, while lines are put
 * in, moved and taken out anywhere. Each place carries a label, and labels grow along the list; where
 * two neighbours leave no label between them, the labels around are spread again (order maintenance:
 * M. Bender et al., Two Simplified Algorithms for Maintaining Order in a List, ESA 2002).
 */
export interface Place<T> {
  readonly item: T
  label: number
  before: Place<T> | null
  after: Place<T> | null
}

const WIDEST = 2 ** 52
const STEP = 2 ** 24

export class ReadingOrder<T> {
  private first: Place<T> | null = null
  private last: Place<T> | null = null

  /** Puts an item behind `before`, or first where that is null. */
  insert(item: T, before: Place<T> | null): Place<T> {
    const after = before ? before.after : this.first
    const place: Place<T> = { item, label: 0, before, after }
    if (before) before.after = place
    else this.first = place
    if (after) after.before = place
    else this.last = place
    this.label(place)
    return place
  }

  remove(place: Place<T>): void {
    if (place.before) place.before.after = place.after
    else this.first = place.after
    if (place.after) place.after.before = place.before
    else this.last = place.before
  }

  /** The place at the end; null in an empty sheet. */
  end(): Place<T> | null {
    return this.last
  }

  *[Symbol.iterator](): Generator<T> {
    for (let place = this.first; place; place = place.after) yield place.item
  }

  private label(place: Place<T>): void {
    const low = place.before?.label ?? 0
    const high = place.after?.label ?? Math.min(WIDEST, low + 2 * STEP)
    const middle = Math.floor((low + high) / 2)
    if (middle > low && middle < high) place.label = middle
    else this.spread(place)
  }

  /** Widens a window around the place until its labels are thin enough, and spreads them evenly. */
  private spread(place: Place<T>): void {
    place.label = place.before?.label ?? 0
    let left: Place<T> = place
    let right: Place<T> = place
    let count = 1
    for (let width = 2; ; width *= 2) {
      const low = Math.floor(place.label / width) * width
      const high = low + width
      while (left.before && left.before.label >= low) {
        left = left.before
        count += 1
      }
      while (right.after && right.after.label < high) {
        right = right.after
        count += 1
      }
      // The window may be the fuller, the smaller it is; this keeps the cost logarithmic on average.
      if (width >= WIDEST || count < width * 1.5 ** -Math.log2(width)) {
        this.relabel(left, right, low, width / (count + 1))
        return
      }
    }
  }

  private relabel(left: Place<T>, right: Place<T>, low: number, step: number): void {
    let label = low
    for (let place: Place<T> | null = left; place; place = place === right ? null : place.after) {
      label += step
      place.label = Math.floor(label)
    }
  }
}

/** Negative where `a` comes first. */
export const compare = <T>(a: Place<T>, b: Place<T>): number => a.label - b.label
