/** One row of the table: what is measured against what, and what is to be reached. */
export interface Row {
  what: string
  baseline: string
  /** As it is stated: `≤ 1/2`. */
  target: string
  measure(): Measurement | Promise<Measurement>
}

export interface Measurement {
  /** As it is read: `0.31`, `1/480`, `±6 %`. */
  ratio: string
  isReached: boolean
  /** The times behind it. */
  detail: string
}

export const shownMs = (ms: number): string =>
  ms < 1 ? `${(ms * 1000).toPrecision(3)} µs` : `${ms.toPrecision(3)} ms`

/** A ratio below one as a fraction of one, since targets are stated so. */
export const asFraction = (ratio: number): string =>
  ratio < 0.5 ? `1/${(1 / ratio).toPrecision(3)}` : ratio.toPrecision(3)
