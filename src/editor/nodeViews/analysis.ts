import type { LineOf } from '@shared/sheet/kinds'
import { element } from '../element'
import type { DrawLine } from './parts'

/** An analysis: its figure and results are components of their own, put beneath by the line's view. */
export const drawAnalysis: DrawLine<LineOf<'analysis'>> = (line) => {
  const title = line.analysis ? line.analysis.replaceAll('-', ' ') : 'no kind chosen yet'
  return {
    body: [element('p', { class: 'line__title' }, `Analysis: ${title}`)],
    speech: `${line.symbol}, analysis ${title}`,
  }
}
