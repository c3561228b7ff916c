import type { LineOf } from '@shared/sheet/kinds'
import { symbolText } from '@/editor/symbolText'
import { element } from '../element'
import { formulaParts, spoken, type DrawLine } from './parts'

/** symbol = expression = substituted = result. */
export const drawFormula: DrawLine<LineOf<'formula'>> = (line, desk) => {
  const result = desk.result(line.id)
  const plain = result?.value ? `= ${line.expression} = ${result.value.shown}` : `= ${line.expression}`
  const body = [formulaParts(desk.presentation(line.id)?.screen, plain, desk.isStale(line.id))]
  const remarks: HTMLElement[] = []
  if (result?.empirical) {
    remarks.push(
      element(
        'p',
        { class: 'line__basis' },
        'Empirical: takes the bare number of a quantity in a stated unit.',
      ),
    )
  }
  if (line.reported)
    remarks.push(element('p', { class: 'line__basis' }, 'Reported in the summary of results.'))
  const speech = result?.value
    ? spoken(line.symbol, result.value)
    : `${symbolText(line.symbol)} equals ${line.expression}`
  return { body, remarks, speech }
}
