/** A diagram along a member: a curve over a shared x axis, its zero line, and its extremes labelled. */
import type { FigureElement, FigureInk } from '../../engine/contracts'

export interface Curve {
  symbol: string
  /** Pixels along x and values; two points at one place make a jump. */
  points: { x: number; value: number }[]
  ink: FigureInk
  /** True for what is drawn as an area down to the zero line. */
  isFilled: boolean
  show(value: number): string
}

const LABEL_HEIGHT = 12

/** @param top @param height pixels of the diagram @param left @param right pixels of its zero line */
export const diagram = (
  curve: Curve,
  box: { top: number; height: number; left: number; right: number },
): FigureElement[] => {
  const values = curve.points.map(({ value }) => value)
  const highest = Math.max(0, ...values)
  const lowest = Math.min(0, ...values)
  const room = box.height - 2 * LABEL_HEIGHT
  const scale = highest === lowest ? 0 : room / (highest - lowest)
  const y = (value: number) =>
    box.top + LABEL_HEIGHT + (highest - value) * scale + (scale === 0 ? room / 2 : 0)
  const zero = y(0)
  const first = curve.points[0]
  const last = curve.points.at(-1)
  const line: [number, number][] = curve.points.map(({ x, value }) => [x, y(value)])
  const outline: [number, number][] = curve.isFilled
    ? [[first?.x ?? box.left, zero], ...line, [last?.x ?? box.right, zero]]
    : line
  return [
    { draw: 'symbol', ink: 'axis', at: [box.left - 10, zero + 4], symbol: curve.symbol, anchor: 'end' },
    {
      draw: 'path',
      ink: curve.ink,
      points: outline,
      ...(curve.isFilled ? { closed: true, fill: 'material' as const } : {}),
    },
    {
      draw: 'path',
      ink: 'axis',
      points: [
        [box.left, zero],
        [box.right, zero],
      ],
    },
    ...extremes(curve, y, box),
  ]
}

/** The greatest and the least value, each once, at the middle of where it stands. */
const extremes = (
  curve: Curve,
  y: (value: number) => number,
  box: { left: number; right: number },
): FigureElement[] => {
  const values = curve.points.map(({ value }) => value)
  const wanted = [...new Set([Math.max(...values), Math.min(...values)])].filter((value) => value !== 0)
  return wanted.map((value): FigureElement => {
    const at = curve.points.filter((point) => point.value === value).map(({ x }) => x)
    const x = Math.min(Math.max(((at[0] ?? 0) + (at.at(-1) ?? 0)) / 2, box.left + 28), box.right - 28)
    return {
      draw: 'text',
      ink: 'dimension',
      at: [x, value > 0 ? y(value) - 4 : y(value) + LABEL_HEIGHT],
      text: curve.show(value),
      anchor: 'middle',
      small: true,
    }
  })
}
