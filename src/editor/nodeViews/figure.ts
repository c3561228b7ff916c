import type { LineOf } from '@shared/sheet/kinds'
import { element } from '../element'
import type { DrawLine } from './parts'

/** A picture with its caption. */
export const drawFigure: DrawLine<LineOf<'figure'>> = (line) => ({
  body: [
    line.attachment
      ? element('img', { class: 'line__picture', src: line.attachment, alt: line.caption })
      : element('p', { class: 'line__basis' }, 'No picture yet.'),
    element('p', { class: 'line__basis' }, line.caption),
  ],
  speech: `Figure ${line.caption}`,
})
