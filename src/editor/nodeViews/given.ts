import type { LineOf } from '@shared/sheet/kinds'
import { symbolText } from '@/editor/symbolText'
import { element } from '../element'
import { drawMark } from '../mark'
import { formulaParts, type DrawLine } from './parts'

const toleranceShown = ({ tolerance }: LineOf<'given'>): string => {
  if (!tolerance) return ''
  if ('fit' in tolerance) return ` ${tolerance.fit}`
  return tolerance.plus === tolerance.minus
    ? ` ± ${tolerance.plus}`
    : ` +${tolerance.plus} −${tolerance.minus}`
}

/** An input: symbol = value, with what it rests on where it is assumed. */
export const drawGiven: DrawLine<LineOf<'given'>> = (line, desk) => {
  const plain = `= ${line.value} ${line.unit}${toleranceShown(line)}`.trim()
  const body = [formulaParts(desk.presentation(line.id)?.screen, plain, false)]
  const remarks: HTMLElement[] = []
  if (line.nature === 'assumption') {
    remarks.push(
      element(
        'p',
        { class: 'line__basis' },
        `Assumed: ${line.basis ? line.basis : 'its basis is not written yet'}`,
      ),
    )
  }
  if (line.nature === 'constant') remarks.push(element('p', { class: 'line__basis' }, 'A constant.'))
  if (line.toConfirm) {
    const until = line.toConfirm.due ? ` by ${line.toConfirm.due}` : ''
    const owner = line.toConfirm.owner ? ` with ${line.toConfirm.owner}` : ''
    remarks.push(
      element(
        'p',
        { class: 'line__basis line__basis--open' },
        drawMark('advisory'),
        `To confirm${owner}${until}`,
      ),
    )
  }
  return { body, remarks, speech: `${symbolText(line.symbol)} ${plain.replace('=', 'equals')}` }
}
