import type { FigureElement } from '../../engine/contracts'

/** A numbered dimension: two witness lines, a line with heads at both ends, and its symbol with the value. */
export interface DimensionLine {
  from: [number, number]
  to: [number, number]
  /** Pixels from the measured points to the line; to the right of, or below them where positive. */
  offset: number
  symbol?: string
  /** `60 mm`; where absent, the symbol stands alone. */
  value?: string
  mark?: number
}

const GAP = 3

/** Horizontal or vertical dimension lines; text stands above a horizontal one and right of a vertical one. */
export const dimensionLine = ({ from, to, offset, symbol, value, mark }: DimensionLine): FigureElement[] => {
  const isVertical = Math.abs(to[0] - from[0]) < Math.abs(to[1] - from[1])
  const moved = ([x, y]: [number, number]): [number, number] =>
    isVertical ? [x + offset, y] : [x, y + offset]
  const start = moved(from)
  const end = moved(to)
  const marked = mark === undefined ? {} : { mark }
  const witness = (point: [number, number], foot: [number, number]): FigureElement => {
    const beyond = Math.sign(offset) * GAP
    return {
      draw: 'path',
      ink: 'hairline',
      points: [point, isVertical ? [foot[0] + beyond, foot[1]] : [foot[0], foot[1] + beyond]],
    }
  }
  const middle: [number, number] = [(start[0] + end[0]) / 2, (start[1] + end[1]) / 2]
  const at: [number, number] = isVertical ? [middle[0] + 6, middle[1] + 4] : [middle[0], middle[1] - 5]
  const label = [symbol && !value ? symbol : undefined, value].filter((part) => part !== undefined)
  const anchor = isVertical ? 'start' : 'middle'
  const text: FigureElement[] =
    symbol && !value
      ? [{ draw: 'symbol', ink: 'dimension', at, symbol, anchor, ...marked }]
      : label.length > 0
        ? [{ draw: 'text', ink: 'dimension', at, text: label.join(' '), anchor, small: true, ...marked }]
        : []
  return [
    witness(from, start),
    witness(to, end),
    { draw: 'arrow', ink: 'dimension', from: start, to: end, heads: 2, ...marked },
    ...text,
  ]
}
