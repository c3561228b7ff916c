/** Lines that are tables or settings of a study: load cases, sizing, parametric, tolerance, data tables, figures. */
import type { Line } from '@shared/sheet/kinds'
import type { PrintedTable } from '../pages'
import { cell, heads } from './shown'

/** A longer table is cut, and says so: nobody reads the thousandth row on paper. */
export const MOST_ROWS = 400
const MOST_COLUMNS = 10

const titles: Partial<Record<Line['kind'], string>> = {
  cases: 'Load cases',
  sizing: 'Sizing',
  parametric: 'Parametric study',
  tolerance: 'Tolerance analysis',
  table: 'Data table',
}

export const studyTitle = (line: Line): string => titles[line.kind] ?? ''

const settings = (rows: [string, string | undefined][]): PrintedTable => ({
  head: heads('Setting', 'Value'),
  parts: [1, 3],
  rows: rows
    .filter(([, value]) => value !== undefined && value !== '')
    .map(([name, value = '']) => [cell(name), cell(value)]),
})

interface NamedRow {
  name: string
  cells: Record<string, string>
}

const grid = (columns: { name: string; head: string }[], rows: readonly NamedRow[]): PrintedTable => {
  const shown = columns.slice(0, MOST_COLUMNS)
  const left = rows.length - MOST_ROWS
  return {
    head: heads('', ...shown.map(({ head }) => head)),
    parts: [0.8, ...shown.map(() => 1)],
    rows: [
      ...rows
        .slice(0, MOST_ROWS)
        .map(({ name, cells }) => [cell(name), ...shown.map((column) => cell(cells[column.name] ?? ''))]),
      ...(left > 0 ? [[cell(`and ${left} further rows, in the sheet itself`)]] : []),
      ...(columns.length > shown.length
        ? [[cell(`and ${columns.length - shown.length} further columns, in the sheet itself`)]]
        : []),
    ],
  }
}

/** Undefined for kinds that print by themselves. */
export const studyTable = (line: Line): PrintedTable | undefined => {
  switch (line.kind) {
    case 'table':
      return grid(
        line.columns.map(({ name, unit }) => ({ name, head: unit === '' ? name : `${name}, ${unit}` })),
        line.rows,
      )
    case 'cases': {
      const replaced = [...new Set(line.rows.flatMap(({ cells }) => Object.keys(cells)))]
      return grid(
        replaced.map((name) => ({ name, head: name })),
        line.rows,
      )
    }
    case 'sizing':
      return settings([
        ['Given', line.vary],
        ['Criterion', line.criterion],
        ['Between', line.between.join(' and ')],
        ['Series', line.series === 'list' ? (line.list ?? []).join(', ') : line.series],
      ])
    case 'parametric':
      return settings([
        ['Given', line.vary],
        ['Range', `${line.from} to ${line.to}, ${line.points} points`],
        ['Second given', line.vary2],
        ['Outputs', line.outputs.join(', ')],
      ])
    case 'tolerance':
      return settings([
        ['Outputs', line.outputs.join(', ')],
        ['Criteria', line.criteria.join(', ')],
        ['Method', line.method],
      ])
    default:
      return undefined
  }
}
