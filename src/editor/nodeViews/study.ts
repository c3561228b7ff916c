import type { Line, LineOf } from '@shared/sheet/kinds'
import { element } from '../element'
import { kindWords } from '../desk'
import type { DrawLine } from './parts'

const row = (label: string, value: string): [HTMLElement, HTMLElement] => [
  element('dt', {}, label),
  element('dd', {}, value || '–'),
]

const facts = (line: Line): [HTMLElement, HTMLElement][] => {
  switch (line.kind) {
    case 'cases':
      return [
        row('cases', line.rows.map(({ name, title }) => title || name).join(', ')),
        row('outputs', line.outputs.join(', ')),
        row('criteria', line.criteria.join(', ')),
      ]
    case 'sizing':
      return [
        row('vary', line.vary),
        row('until', line.criterion),
        row('between', line.between.join(' and ')),
      ]
    case 'parametric':
      return [
        row('vary', `${line.vary} from ${line.from} to ${line.to}`),
        row('outputs', line.outputs.join(', ')),
      ]
    case 'tolerance':
      return [row('outputs', line.outputs.join(', ')), row('method', line.method.replaceAll('-', ' '))]
    default:
      return []
  }
}

type Study = LineOf<'cases'> | LineOf<'sizing'> | LineOf<'parametric'> | LineOf<'tolerance'>

/** Load cases, sizing, parametric study and tolerance analysis: what they ask, as authored. */
export const drawStudy: DrawLine<Study> = (line) => ({
  body: [element('dl', { class: 'line__facts' }, ...facts(line).flat())],
  speech: `${line.symbol}, ${kindWords[line.kind]}`,
})
