import type { LineOf } from '@shared/sheet/kinds'
import { element } from '../element'
import type { DrawLine } from './parts'

/** Rows that are shown; a table of a hundred thousand is read by its functions, not by eye. */
const shownRows = 200

/** A data table with heads and horizontal rules; a wide one scrolls with its first column fixed. */
export const drawTable: DrawLine<LineOf<'table'>> = ({ symbol, columns, rows }) => {
  const heads = columns.map(({ name, unit }) =>
    element('th', { scope: 'col' }, unit ? `${name}, ${unit}` : name),
  )
  const body = rows
    .slice(0, shownRows)
    .map((row) =>
      element(
        'tr',
        {},
        element('th', { scope: 'row' }, row.name),
        ...columns.map(({ name }) => element('td', {}, row.cells[name] ?? '')),
      ),
    )
  const table = element(
    'table',
    { class: 'line__table' },
    element('thead', {}, element('tr', {}, element('th', { scope: 'col' }, 'row'), ...heads)),
    element('tbody', {}, ...body),
  )
  const more =
    rows.length > shownRows &&
    element('p', { class: 'line__basis' }, `${rows.length} rows, ${shownRows} shown.`)
  return {
    body: [element('div', { class: 'line__scroller', tabindex: '-1' }, table, more)],
    speech: `Table ${symbol}, ${columns.length} columns, ${rows.length} rows`,
  }
}
