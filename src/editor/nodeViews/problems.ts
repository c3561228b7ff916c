import type { Problem } from '@shared/errors/problem'
import type { Line } from '@shared/sheet/kinds'
import { drawMark } from '../mark'
import { button, element } from '../element'
import type { Desk } from '../desk'

/** The authored text that a path of a span names: `expression`, `inputs.segments.2.length`. */
export const authoredText = (line: Line, field: string): string | undefined => {
  let at: unknown = line
  for (const step of field.split('.')) {
    if (Array.isArray(at)) {
      const row: unknown = at[Number(step)]
      at = row
    } else if (at !== null && typeof at === 'object') {
      const record = at as Record<string, unknown>
      const cells = record.cells as Record<string, unknown> | undefined
      at = record[step] ?? cells?.[step]
    } else return undefined
  }
  return typeof at === 'string' ? at : undefined
}

/** The text of a field with the part that is meant underlined. */
export const underlined = (text: string, from = 0, to = text.length): HTMLElement =>
  element(
    'code',
    { class: 'line__expression' },
    text.slice(0, from),
    element('span', { class: 'line__span' }, text.slice(from, to)),
    text.slice(to),
  )

const drawProblem = (line: Line, problem: Problem, desk: Desk): HTMLElement => {
  const { span } = problem
  const text = span?.from === undefined ? undefined : authoredText(line, span.field)
  const repairs = desk.mayEdit()
    ? (problem.repairs ?? []).map((repair) =>
        button(repair.label, 'text-button', () => desk.repair(problem, repair)),
      )
    : []
  return element(
    'li',
    { class: `line__problem line__problem--${problem.severity}` },
    drawMark(problem.severity === 'error' ? 'problem' : 'advisory'),
    element(
      'div',
      {},
      text ? underlined(text, span?.from, span?.to) : undefined,
      element('span', { class: 'line__message' }, problem.message),
      repairs.length > 0 && element('span', { class: 'line__repairs' }, ...repairs),
    ),
  )
}

/** What is wrong with a line: where, what, and the acts that mend it. */
export const drawProblems = (line: Line, problems: readonly Problem[], desk: Desk): HTMLElement =>
  element(
    'ul',
    { class: 'line__problem-list' },
    ...problems.map((problem) => drawProblem(line, problem, desk)),
  )
