/**
 * The marks of a line's states, drawn in a square of 16. Pencil is people's judgement; verdigris and
 * madder are the engine's.
 */
export type MarkName =
  | 'not-ticked'
  | 'ticked'
  | 'lapsed'
  | 'carried'
  | 'satisfied'
  | 'not-satisfied'
  | 'problem'
  | 'advisory'
  | 'waits'
  | 'remark-open'
  | 'remark-answered'
  | 'remark-closed'
  | 'from-memory'
  | 'register-moved'
  | 'recalled'
  | 'contested'

export interface Mark {
  ink: 'pencil' | 'verdigris' | 'madder' | 'ochre' | 'ink-3'
  stroked?: string
  filled?: string
  dashes?: string
}

const ring = 'M8 2.5a5.5 5.5 0 1 0 0 11a5.5 5.5 0 1 0 0-11'
const square = 'M3 3h10v10h-10z'
const diamond = 'M8 1.8l6.2 6.2l-6.2 6.2l-6.2-6.2z'
const stroke = 'M3 8.5l3.4 3.8l6.6-8.6'
const flag = 'M4 2.5h8.5l-2 3.2l2 3.3h-8.5'
const pole = 'M4 2v12'

export const marks: Record<MarkName, Mark> = {
  'not-ticked': { ink: 'pencil', stroked: ring },
  ticked: { ink: 'pencil', stroked: stroke },
  lapsed: { ink: 'ochre', stroked: 'M3 8.5l2 2.2M8.2 9.9l1.6-2.1M11.3 5.9l1.7-2.2' },
  carried: { ink: 'pencil', stroked: 'M3.5 6.5l2.9 3.3l6.1-7.3M3 14h10' },
  satisfied: { ink: 'verdigris', stroked: square },
  'not-satisfied': { ink: 'madder', stroked: `${square}M3 3l10 10M13 3l-10 10` },
  problem: { ink: 'madder', filled: diamond },
  advisory: { ink: 'ochre', stroked: diamond },
  waits: {
    ink: 'ink-3',
    filled:
      'M3 6.7a1.3 1.3 0 1 0 0 2.6a1.3 1.3 0 1 0 0-2.6M8 6.7a1.3 1.3 0 1 0 0 2.6a1.3 1.3 0 1 0 0-2.6M13 6.7a1.3 1.3 0 1 0 0 2.6a1.3 1.3 0 1 0 0-2.6',
  },
  'remark-open': { ink: 'pencil', stroked: `${pole}${flag}`, filled: `${flag}z` },
  'remark-answered': { ink: 'pencil', stroked: `${pole}${flag}`, filled: 'M4 2.5h4.2v6.5h-4.2z' },
  'remark-closed': { ink: 'pencil', stroked: `${pole}${flag}` },
  'from-memory': { ink: 'ochre', stroked: ring, dashes: '0.1 2.78' },
  'register-moved': { ink: 'ochre', stroked: `${ring}M8 0.8v3.4M8 11.8v3.4` },
  recalled: { ink: 'madder', stroked: 'M13 12.5v-4a4 4 0 0 0-4-4h-6M6 1.5l-3 3l3 3' },
  contested: { ink: 'madder', stroked: 'M5.5 2.5v11M10.5 2.5v11' },
}
