import type { FigureElement } from '../../engine/contracts'

/** A wall that holds an end: a line with hatching on the side away from the member. */
export const fixedEnd = (
  x: number,
  y: number,
  halfHeight: number,
  side: 'start' | 'end',
): FigureElement[] => {
  const outward = side === 'start' ? -1 : 1
  const strokes = Math.max(3, Math.floor((2 * halfHeight) / 8))
  const hatching = Array.from({ length: strokes }, (_, i): FigureElement => {
    const top = y - halfHeight + (i * 2 * halfHeight) / strokes
    return {
      draw: 'path',
      ink: 'support',
      points: [
        [x, top],
        [x + 7 * outward, top + 7],
      ],
    }
  })
  return [
    {
      draw: 'path',
      ink: 'support',
      points: [
        [x, y - halfHeight],
        [x, y + halfHeight],
      ],
    },
    ...hatching,
  ]
}

/** A torque about x in a side view: an arrow with two heads along its direction, by the right-hand rule. */
export const torqueArrow = (x: number, y: number, isPositive: boolean, label: string): FigureElement[] => {
  const direction = isPositive ? 1 : -1
  const tail = x - 15 * direction
  const head = x + 15 * direction
  return [
    { draw: 'arrow', ink: 'load', from: [tail, y], to: [head, y], mark: 2 },
    { draw: 'arrow', ink: 'load', from: [tail, y], to: [head - 6 * direction, y], mark: 2 },
    { draw: 'text', ink: 'load', at: [x, y - 8], text: label, anchor: 'middle', small: true, mark: 2 },
  ]
}
