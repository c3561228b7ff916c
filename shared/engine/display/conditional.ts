/**
 * One value or another: rows under a brace on the screen, one line in print and speech. A conditional
 * that stands as *otherwise* adds its rows to the brace of the first.
 */
import { bracketed } from './brackets'
import { binding, row, space, upright, type Drawn } from './drawn'

/** Rows of value and test, and the value that is left. */
export interface Cases {
  rows: { value: Drawn; test: Drawn }[]
  otherwise: Drawn
}

/** A row of the brace: a conditional as value or test is told apart by brackets. */
const firm = (piece: Drawn): Drawn => (piece.binding === binding.conditional ? bracketed(piece) : piece)

export const drawConditional = (cases: Cases): Drawn => {
  const rows = cases.rows.map(({ value, test }) => ({ value: firm(value), test: firm(test) }))
  const otherwise = firm(cases.otherwise)
  const tex = rows.map(({ value, test }) => `${value.tex}&\\text{if }${test.tex}\\\\`).join('')
  const inLine = rows.flatMap(({ value, test }) => [
    value.print,
    space,
    upright('if'),
    space,
    test.print,
    upright(','),
    space,
  ])
  return {
    tex: `\\begin{cases}${tex}${otherwise.tex}&\\text{otherwise}\\end{cases}`,
    print: row(...inLine, otherwise.print, space, upright('otherwise')),
    speech: `${rows.map(({ value, test }) => `${value.speech} if ${test.speech}, `).join('')}otherwise ${otherwise.speech}`,
    binding: binding.conditional,
    height: 1.4 * (rows.length + 1),
    first: 'other',
    last: 'other',
  }
}
