import type { Figure, FigureElement, FigureFrame } from '../../engine/contracts'
import * as q from '../../mechanics/quantities'
import type { QuantityKind } from '../../mechanics/working'
import { diagram } from '../drawing/diagram'
import { fixedEnd, torqueArrow } from '../drawing/support'

/** What the figure needs; SI. `stations` are one more than the pieces that T and tau belong to. */
export interface LineDrawing {
  length: number
  isFixed: { start: boolean; end: boolean }
  segments: { name: string; from: number; to: number; round?: { outer: number; bore: number } }[]
  torques: { x: number; torque: number }[]
  stations: number[]
  T: number[]
  phi: number[]
  tau: number[]
}

const MARGIN = { left: 44, right: 44 }
const MEMBER_HEIGHT = 132
const DIAGRAM_HEIGHT = 84

const shown = (frame: FigureFrame, kind: QuantityKind) => (si: number) =>
  frame.show(si, kind.dimension, kind.unit)

/** The member to scale with its loads; torque, rotation and stress below, over the same x axis. */
export const figure = (solution: { figure: unknown }, frame: FigureFrame): Figure => {
  const line = solution.figure as LineDrawing
  const x = (station: number) =>
    MARGIN.left + (station / line.length) * (frame.width - MARGIN.left - MARGIN.right)
  const right = frame.width - MARGIN.right
  const box = (index: number) => ({
    top: MEMBER_HEIGHT + index * DIAGRAM_HEIGHT,
    height: DIAGRAM_HEIGHT,
    left: MARGIN.left,
    right,
  })
  /** Values that are constant between stations, as points with jumps. */
  const stepped = (values: readonly number[]) =>
    values.flatMap((value, i) => [
      { x: x(line.stations[i] ?? 0), value },
      { x: x(line.stations[i + 1] ?? 0), value },
    ])
  const linear = line.phi.map((value, i) => ({ x: x(line.stations[i] ?? 0), value }))
  const curves = [
    { symbol: 'T', points: stepped(line.T), ink: 'curve-1', isFilled: true, show: shown(frame, q.torque) },
    { symbol: 'phi', points: linear, ink: 'curve-2', isFilled: false, show: shown(frame, q.angle) },
    {
      symbol: 'tau',
      points: stepped(line.tau),
      ink: 'curve-3',
      isFilled: true,
      show: shown(frame, q.stress),
    },
  ] as const
  return {
    width: frame.width,
    height: MEMBER_HEIGHT + curves.length * DIAGRAM_HEIGHT + 8,
    elements: [
      ...verticals(line, x),
      ...member(line, x, shown(frame, q.length), shown(frame, q.torque)),
      ...curves.flatMap((curve, i) => diagram({ ...curve, points: [...curve.points] }, box(i))),
    ],
    description: describe(line, frame),
    reading: readingOf(line, frame),
    table: tableOf(line, frame),
  }
}

/** A usual line while its inputs are missing. */
export const sketch = (inputs: Record<string, unknown>, frame: FigureFrame): Figure => {
  const line: LineDrawing = {
    length: 1,
    isFixed: { start: inputs['start'] === 'fixed', end: inputs['end'] === 'fixed' },
    segments: [
      { name: '1', from: 0, to: 0.55, round: { outer: 0.12, bore: 0 } },
      { name: '2', from: 0.55, to: 1, round: { outer: 0.08, bore: 0 } },
    ],
    torques: [{ x: 1, torque: 1 }],
    stations: [0, 0.55, 1],
    T: [],
    phi: [],
    tau: [],
  }
  const x = (station: number) => MARGIN.left + station * (frame.width - MARGIN.left - MARGIN.right)
  const nothing = () => ''
  return {
    width: frame.width,
    height: MEMBER_HEIGHT,
    elements: member(line, x, nothing, nothing),
    description:
      'A line of two segments with a torque at its end; values follow once the inputs are complete.',
  }
}

const verticals = (line: LineDrawing, x: (station: number) => number): FigureElement[] =>
  line.stations.map((station) => ({
    draw: 'path',
    ink: 'hairline',
    points: [
      [x(station), MEMBER_HEIGHT - 34],
      [x(station), MEMBER_HEIGHT + 3 * DIAGRAM_HEIGHT],
    ],
  }))

const member = (
  line: LineDrawing,
  x: (station: number) => number,
  showLength: (si: number) => string,
  showTorque: (si: number) => string,
): FigureElement[] => {
  const axis = 66
  const thickest = Math.max(...line.segments.map(({ round }) => round?.outer ?? 0))
  // Diameters to one scale of their own, so that a slender line is still seen; segments that are not round as a band.
  const half = (diameter: number) => (thickest === 0 ? 14 : Math.max(4, (24 * diameter) / thickest))
  const elements: FigureElement[] = []
  for (const { name, from, to, round } of line.segments) {
    const h = half(round?.outer ?? thickest)
    const [a, b] = [x(from), x(to)]
    elements.push({
      draw: 'path',
      ink: 'outline',
      closed: true,
      fill: 'material',
      mark: 1,
      points: [
        [a, axis - h],
        [b, axis - h],
        [b, axis + h],
        [a, axis + h],
      ],
    })
    if (round && round.bore > 0) {
      const bore = half(round.bore)
      for (const side of [-bore, bore]) {
        elements.push({
          draw: 'path',
          ink: 'hairline',
          points: [
            [a, axis + side],
            [b, axis + side],
          ],
        })
      }
    }
    const label = round ? `${name}: Ø${showLength(round.outer)}` : name
    if (b - a > 24) {
      const text = b - a > 8 * label.length ? label : name
      elements.push({
        draw: 'text',
        ink: 'dimension',
        at: [(a + b) / 2, axis + 42],
        text,
        anchor: 'middle',
        small: true,
        mark: 1,
      })
    }
  }
  elements.push({
    draw: 'path',
    ink: 'axis',
    points: [
      [x(0) - 12, axis],
      [x(line.length) + 12, axis],
    ],
  })
  if (line.isFixed.start) elements.push(...fixedEnd(x(0), axis, 32, 'start'))
  if (line.isFixed.end) elements.push(...fixedEnd(x(line.length), axis, 32, 'end'))
  for (const { x: place, torque } of line.torques) {
    if (torque !== 0) elements.push(...torqueArrow(x(place), axis - 34, torque > 0, showTorque(torque)))
  }
  elements.push({
    draw: 'symbol',
    ink: 'axis',
    at: [x(line.length) + 16, axis - 4],
    symbol: 'x',
    anchor: 'start',
  })
  return elements
}

const describe = (line: LineDrawing, frame: FigureFrame): string => {
  const end = (isFixed: boolean) => (isFixed ? 'fixed' : 'free')
  const most = Math.max(...line.tau)
  return (
    `Line of ${line.segments.length} segments, ${shown(frame, q.length)(line.length)} long, ` +
    `start ${end(line.isFixed.start)}, end ${end(line.isFixed.end)}; ` +
    `greatest nominal shear stress ${shown(frame, q.stress)(most)}, ` +
    `rotation of the end ${shown(frame, q.angle)(line.phi.at(-1) ?? 0)}.`
  )
}

/** Each piece by its two ends, so that both sides of a jump can be read. */
const readingOf = (line: LineDrawing, frame: FigureFrame): NonNullable<Figure['reading']> => {
  const ends = line.T.map((_, i) => [i, i + 1] as const)
  const bySegment = (values: readonly number[]) => ends.flatMap((_, i) => [values[i] ?? 0, values[i] ?? 0])
  return {
    label: 'x',
    from: MARGIN.left,
    to: frame.width - MARGIN.right,
    stations: ends.flatMap(([a, b]) => [line.stations[a] ?? 0, line.stations[b] ?? 0]),
    stationDimension: q.length.dimension,
    stationUnit: q.length.unit,
    curves: [
      { label: 'T', values: bySegment(line.T), ...q.torque },
      { label: 'phi', values: ends.flatMap(([a, b]) => [line.phi[a] ?? 0, line.phi[b] ?? 0]), ...q.angle },
      { label: 'tau', values: bySegment(line.tau), ...q.stress },
    ],
  }
}

const tableOf = (line: LineDrawing, frame: FigureFrame): NonNullable<Figure['table']> => ({
  head: ['x', 'T', 'phi', 'tau'],
  rows: line.T.flatMap((torque, i) =>
    [i, i + 1].map((station) => [
      shown(frame, q.length)(line.stations[station] ?? 0),
      shown(frame, q.torque)(torque),
      shown(frame, q.angle)(line.phi[station] ?? 0),
      shown(frame, q.stress)(line.tau[i] ?? 0),
    ]),
  ),
})
