import type { Figure, FigureElement, FigureFrame } from '../../engine/contracts'
import * as q from '../../mechanics/quantities'
import { dimensionLine } from '../drawing/dimensionLine'
import type { SectionShape } from './shape'

type Point = [number, number]

const MARGIN = { left: 28, right: 96, top: 24, bottom: 48 }

/** The section to scale, with its axes, numbered dimensions, and where the shear stress is greatest. */
export const figure = (solution: { figure: unknown }, frame: FigureFrame): Figure =>
  drawShape(solution.figure as SectionShape, frame, true)

/** The same while inputs are missing: usual proportions and no values. */
export const sketch = (inputs: Record<string, unknown>, frame: FigureFrame): Figure => {
  switch (inputs['shape']) {
    case 'rectangle':
      return drawShape({ shape: 'rectangle', a: 1, b: 0.6 }, frame, false)
    case 'closed-cell':
      return drawShape(SKETCHED_CELL, frame, false)
    case 'hollow-round':
      return drawShape({ shape: 'round', outer: 1, bore: 0.6 }, frame, false)
    default:
      return drawShape({ shape: 'round', outer: 1, bore: 0 }, frame, false)
  }
}

const SKETCHED_CELL: SectionShape = {
  shape: 'closed-cell',
  wall: -1,
  points: [
    { y: 0, z: 0, t: 0.04 },
    { y: 1, z: 0, t: 0.04 },
    { y: 1, z: 0.6, t: 0.04 },
    { y: 0, z: 0.6, t: 0.04 },
  ],
}

const drawShape = (shape: SectionShape, frame: FigureFrame, isSolved: boolean): Figure => {
  const height = Math.round(Math.min(260, Math.max(180, frame.width * 0.5)))
  const room = {
    width: frame.width - MARGIN.left - MARGIN.right,
    height: height - MARGIN.top - MARGIN.bottom,
  }
  const extent = extentOf(shape)
  const scale = Math.min(room.width / extent.width, room.height / extent.height)
  const centre: Point = [MARGIN.left + room.width / 2, MARGIN.top + room.height / 2]
  const value = (si: number) => (isSolved ? frame.show(si, q.length.dimension, q.length.unit) : undefined)
  const drawn = DRAW[shape.shape](shape as never, { scale, centre, value })
  return {
    width: frame.width,
    height,
    elements: [...axes(centre, extent, scale), ...drawn],
    description: describe(shape, value),
  }
}

interface Drawing {
  scale: number
  centre: Point
  value(si: number): string | undefined
}

const extentOf = (shape: SectionShape): { width: number; height: number } => {
  if (shape.shape === 'round') return { width: shape.outer, height: shape.outer }
  if (shape.shape === 'rectangle') return { width: shape.a, height: shape.b }
  const { left, right, low, high } = bounds(shape.points)
  return { width: right - left, height: high - low }
}

const bounds = (points: readonly { y: number; z: number; t: number }[]) => {
  const half = Math.max(...points.map(({ t }) => t)) / 2
  const y = points.map((point) => point.y)
  const z = points.map((point) => point.z)
  return {
    left: Math.min(...y) - half,
    right: Math.max(...y) + half,
    low: Math.min(...z) - half,
    high: Math.max(...z) + half,
  }
}

const axes = ([x, y]: Point, extent: { width: number; height: number }, scale: number): FigureElement[] => {
  const right = x + (extent.width * scale) / 2 + 14
  const top = y - (extent.height * scale) / 2 - 10
  return [
    { draw: 'arrow', ink: 'axis', from: [x - (extent.width * scale) / 2 - 8, y], to: [right, y] },
    { draw: 'arrow', ink: 'axis', from: [x, y + (extent.height * scale) / 2 + 8], to: [x, top] },
    { draw: 'symbol', ink: 'axis', at: [right + 3, y - 4], symbol: 'y', anchor: 'start' },
    { draw: 'symbol', ink: 'axis', at: [x + 5, top + 4], symbol: 'z', anchor: 'start' },
  ]
}

const peak = (at: Point, label: Point, anchor: 'start' | 'middle'): FigureElement[] => [
  { draw: 'circle', ink: 'extreme', centre: at, radius: 3.5, fill: 'extreme' },
  { draw: 'symbol', ink: 'extreme', at: label, symbol: 'tau_max', anchor },
]

const DRAW = {
  round: (
    shape: Extract<SectionShape, { shape: 'round' }>,
    { scale, centre, value }: Drawing,
  ): FigureElement[] => {
    const [x, y] = centre
    const outer = (shape.outer * scale) / 2
    const bore = (shape.bore * scale) / 2
    const corner = Math.SQRT1_2
    return [
      { draw: 'circle', ink: 'outline', centre, radius: outer, fill: 'material', mark: 1 },
      ...(bore > 0
        ? [{ draw: 'circle', ink: 'outline', centre, radius: bore, fill: 'void', mark: 2 } as const]
        : []),
      // The stress along a radius: nothing on the axis, greatest outside.
      {
        draw: 'path',
        ink: 'curve-1',
        closed: true,
        points: [
          [x - bore * corner, y - bore * corner],
          [x - outer * corner, y - outer * corner],
          [x - outer * corner + 0.24 * outer, y - outer * corner - 0.24 * outer],
          [x - bore * corner + 0.24 * bore, y - bore * corner - 0.24 * bore],
        ],
      },
      ...peak(
        [x - outer * corner, y - outer * corner],
        [x - outer * corner - 40, y - outer * corner - 8],
        'start',
      ),
      ...dimensionLine({
        from: [x + outer, y - outer],
        to: [x + outer, y + outer],
        offset: 30,
        symbol: 'd_o',
        ...withValue(value(shape.outer)),
        mark: 1,
      }),
      ...(bore > 0
        ? dimensionLine({
            from: [x - bore, y + outer],
            to: [x + bore, y + outer],
            offset: 30,
            symbol: 'd_i',
            ...withValue(value(shape.bore)),
            mark: 2,
          })
        : []),
    ]
  },
  rectangle: (
    shape: Extract<SectionShape, { shape: 'rectangle' }>,
    { scale, centre, value }: Drawing,
  ): FigureElement[] => {
    const [x, y] = centre
    const halfWidth = (shape.a * scale) / 2
    const halfHeight = (shape.b * scale) / 2
    const isFlat = shape.a >= shape.b
    const at: Point = isFlat ? [x, y - halfHeight] : [x - halfWidth, y]
    return [
      {
        draw: 'path',
        ink: 'outline',
        closed: true,
        fill: 'material',
        points: [
          [x - halfWidth, y - halfHeight],
          [x + halfWidth, y - halfHeight],
          [x + halfWidth, y + halfHeight],
          [x - halfWidth, y + halfHeight],
        ],
      },
      ...peak(at, isFlat ? [x - 44, at[1] - 8] : [at[0] - 26, y - 8], 'start'),
      ...dimensionLine({
        from: [x - halfWidth, y + halfHeight],
        to: [x + halfWidth, y + halfHeight],
        offset: 32,
        symbol: 'a',
        ...withValue(value(shape.a)),
        mark: 1,
      }),
      ...dimensionLine({
        from: [x + halfWidth, y - halfHeight],
        to: [x + halfWidth, y + halfHeight],
        offset: 30,
        symbol: 'b',
        ...withValue(value(shape.b)),
        mark: 2,
      }),
    ]
  },
  'closed-cell': (
    shape: Extract<SectionShape, { shape: 'closed-cell' }>,
    { scale, centre, value }: Drawing,
  ): FigureElement[] => {
    const { left, right, low, high } = bounds(shape.points)
    const place = ({ y, z }: { y: number; z: number }): Point => [
      centre[0] + (y - (left + right) / 2) * scale,
      centre[1] - (z - (low + high) / 2) * scale,
    ]
    const elements: FigureElement[] = []
    shape.points.forEach((from, i) => {
      const to = shape.points[(i + 1) % shape.points.length] ?? from
      const [a, b] = [place(from), place(to)]
      const length = Math.hypot(b[0] - a[0], b[1] - a[1]) || 1
      const half = Math.max((from.t * scale) / 2, 1)
      const across: Point = [(-(b[1] - a[1]) / length) * half, ((b[0] - a[0]) / length) * half]
      elements.push({
        draw: 'path',
        ink: i === shape.wall ? 'extreme' : 'outline',
        closed: true,
        fill: 'material',
        points: [
          [a[0] + across[0], a[1] + across[1]],
          [b[0] + across[0], b[1] + across[1]],
          [b[0] - across[0], b[1] - across[1]],
          [a[0] - across[0], a[1] - across[1]],
        ],
      })
    })
    elements.push({ draw: 'path', ink: 'hairline', closed: true, points: shape.points.map(place) })
    const [xLeft, xRight] = [
      centre[0] - ((right - left) * scale) / 2,
      centre[0] + ((right - left) * scale) / 2,
    ]
    const [yTop, yBottom] = [centre[1] - ((high - low) * scale) / 2, centre[1] + ((high - low) * scale) / 2]
    elements.push(
      ...dimensionLine({
        from: [xLeft, yBottom],
        to: [xRight, yBottom],
        offset: 32,
        ...withValue(value(right - left)),
      }),
      ...dimensionLine({
        from: [xRight, yTop],
        to: [xRight, yBottom],
        offset: 30,
        ...withValue(value(high - low)),
      }),
    )
    return elements
  },
}

/** Optional properties are left out, not undefined. */
const withValue = (value: string | undefined) => (value === undefined ? {} : { value })

const describe = (shape: SectionShape, value: (si: number) => string | undefined): string => {
  const said = (si: number) => value(si) ?? 'a diameter to be given'
  if (shape.shape === 'round') {
    return shape.bore > 0
      ? `Hollow round section, outside diameter ${said(shape.outer)}, bore ${said(shape.bore)}.`
      : `Solid round section, diameter ${said(shape.outer)}.`
  }
  if (shape.shape === 'rectangle') return `Rectangle, ${value(shape.a) ?? 'a'} by ${value(shape.b) ?? 'b'}.`
  return `Thin-walled closed cell of ${shape.points.length} straight walls.`
}
