/**
 * The 16 px marks of a line's states. Each has a word beside it wherever it stands: never colour alone.
 * Paths are stroked, unless `filled`.
 */
export interface StateMark {
  word: string
  path: string
  filled?: string
  /** Name of the colour token. */
  ink: 'pencil' | 'verdigris-mark' | 'madder-mark' | 'ochre-mark' | 'ink-3' | 'blue'
  dash?: string
}

const ring = 'M8 2.5a5.5 5.5 0 1 0 0 11a5.5 5.5 0 1 0 0-11Z'
const square = 'M3 3h10v10H3Z'
const diamond = 'M8 1.5 14.5 8 8 14.5 1.5 8Z'
const stroke = 'M3 9.5 6.5 13 13 3'
const flag = 'M4 14.5V2h8.5L10 5.5 12.5 9H4'

export const stateMarks = {
  'not-ticked': { word: 'not ticked', path: ring, ink: 'pencil' },
  ticked: { word: 'ticked', path: stroke, ink: 'pencil' },
  lapsed: { word: 'lapsed', path: stroke, ink: 'ochre-mark', dash: '4 2.5' },
  carried: { word: 'carried', path: `M3 7 6.5 10.5 13 1.5M2 14.5H14`, ink: 'pencil' },
  satisfied: { word: 'satisfied', path: square, filled: square, ink: 'verdigris-mark' },
  'not-satisfied': { word: 'not satisfied', path: `${square}M3 3 13 13M13 3 3 13`, ink: 'madder-mark' },
  problem: { word: 'problem', path: diamond, filled: diamond, ink: 'madder-mark' },
  advisory: { word: 'advisory', path: diamond, ink: 'ochre-mark' },
  waits: {
    word: 'waits',
    path: '',
    filled: 'M1.5 8a1.5 1.5 0 1 0 3 0a1.5 1.5 0 1 0-3 0ZM6.5 8a1.5 1.5 0 1 0 3 0a1.5 1.5 0 1 0-3 0ZM11.5 8a1.5 1.5 0 1 0 3 0a1.5 1.5 0 1 0-3 0Z',
    ink: 'ink-3',
  },
  'remark-open': { word: 'remark open', path: flag, filled: flag, ink: 'pencil' },
  'remark-answered': { word: 'remark answered', path: flag, filled: 'M4 5.5H11L10 5.5 12.5 9H4Z', ink: 'pencil' },
  'remark-closed': { word: 'remark closed', path: flag, ink: 'pencil' },
  'from-memory': { word: 'from memory', path: ring, ink: 'ochre-mark', dash: '1.5 2' },
  'register-moved': { word: 'register moved', path: 'M7 2.6a5.5 5.5 0 0 0 0 10.8M9 2.6a5.5 5.5 0 0 1 0 10.8', ink: 'ochre-mark' },
  recalled: { word: 'recalled', path: 'M5 2 2 5 5 8M2 5H10a3.5 3.5 0 0 1 0 8.5H6', ink: 'madder-mark' },
  contested: { word: 'contested', path: 'M5 2V14M11 2V14', ink: 'madder-mark' },
} as const satisfies Record<string, StateMark>

export type StateName = keyof typeof stateMarks

const svgName = 'http://www.w3.org/2000/svg'

/** The mark alone, hidden from screen readers: its word stands beside it. */
export const drawMark = (state: StateName): SVGSVGElement => {
  const mark: StateMark = stateMarks[state]
  const svg = document.createElementNS(svgName, 'svg')
  svg.setAttribute('viewBox', '0 0 16 16')
  svg.setAttribute('width', '16')
  svg.setAttribute('height', '16')
  svg.setAttribute('aria-hidden', 'true')
  svg.setAttribute('class', 'state-mark')
  const add = (data: string, attributes: Record<string, string>) => {
    const path = document.createElementNS(svgName, 'path')
    path.setAttribute('d', data)
    for (const [name, value] of Object.entries(attributes)) path.setAttribute(name, value)
    svg.append(path)
  }
  if (mark.filled) add(mark.filled, { fill: `var(--${mark.ink})` })
  if (mark.path) {
    add(mark.path, {
      fill: 'none',
      stroke: `var(--${mark.ink})`,
      'stroke-width': '1.75',
      ...(mark.dash ? { 'stroke-dasharray': mark.dash } : {}),
    })
  }
  return svg
}
