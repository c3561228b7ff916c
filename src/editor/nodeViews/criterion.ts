import type { CriterionResult } from '@shared/engine/contracts'
import type { LineOf } from '@shared/sheet/kinds'
import { drawMark } from '../mark'
import { element } from '../element'
import { formulaParts, type DrawLine } from './parts'

const relationShown = { '<=': '≤', '<': '<', '>=': '≥', '>': '>', within: 'within' } as const

const svgName = 'http://www.w3.org/2000/svg'
const scaleLength = 120
const scaleEnd = 1.25

const svg = (tag: string, attributes: Record<string, string | number>): SVGElement => {
  const made = document.createElementNS(svgName, tag)
  for (const [name, value] of Object.entries(attributes)) made.setAttribute(name, String(value))
  return made
}

const hairline = (strokes: number[], pointer: number, beyond: boolean): SVGElement => {
  const scale = svg('svg', {
    viewBox: '0 0 132 16',
    width: 132,
    height: 16,
    class: 'utilisation',
    'aria-hidden': 'true',
  })
  scale.append(svg('path', { d: `M0 11H${scaleLength}`, class: 'utilisation__line' }))
  for (let tick = 0; tick <= 5; tick += 1) {
    const x = (tick * 0.25 * scaleLength) / scaleEnd
    scale.append(svg('path', { d: `M${x} 8.5V11`, class: 'utilisation__line' }))
  }
  for (const at of strokes) scale.append(svg('path', { d: `M${at} 1V15`, class: 'utilisation__limit' }))
  if (beyond) scale.append(svg('path', { d: 'M116 14 119 8 122 14 125 8', class: 'utilisation__limit' }))
  scale.append(
    svg('path', { d: `M${pointer} 10 ${pointer - 4} 3 ${pointer + 4} 3Z`, class: 'utilisation__pointer' }),
  )
  return scale
}

/** Demand against limit on a scale of 0 to 1.25; beyond it, the pointer at a notched end. */
const utilisationScale = (utilisation: number): SVGElement => {
  const beyond = utilisation > scaleEnd
  const pointer = Math.min(utilisation, scaleEnd) * (scaleLength / scaleEnd)
  return hairline([scaleLength / scaleEnd], Math.max(0, pointer), beyond)
}

/** Two strokes at the bounds, the demand between or outside them. */
const withinScale = ({ demand, limit, upper }: CriterionResult): SVGElement | undefined => {
  if (!upper) return undefined
  const span = upper.si - limit.si
  if (!(span > 0)) return undefined
  const [low, high] = [scaleLength * 0.2, scaleLength * 0.8]
  const pointer = low + ((demand.si - limit.si) / span) * (high - low)
  return hairline(
    [low, high],
    Math.min(scaleLength, Math.max(0, pointer)),
    pointer > scaleLength || pointer < 0,
  )
}

const verdict = (line: LineOf<'criterion'>, result: CriterionResult): HTMLElement => {
  const word = result.satisfied ? 'satisfied' : 'not satisfied'
  const number = result.utilisation === undefined ? '' : `utilisation ${result.utilisation.toFixed(2)}`
  const scale =
    line.relation === 'within'
      ? withinScale(result)
      : result.utilisation === undefined
        ? undefined
        : utilisationScale(result.utilisation)
  return element(
    'div',
    { class: `line__verdict line__verdict--${result.satisfied ? 'satisfied' : 'not-satisfied'}` },
    drawMark(result.satisfied ? 'satisfied' : 'not-satisfied'),
    element('strong', {}, word),
    scale,
    number && element('span', { class: 'line__utilisation' }, number),
  )
}

/** demand ≤ limit, with its verdict and utilisation. */
export const drawCriterion: DrawLine<LineOf<'criterion'>> = (line, desk) => {
  const plain =
    line.relation === 'within'
      ? `${line.demand} within ${line.limit} … ${line.upper ?? ''}`
      : `${line.demand} ${relationShown[line.relation]} ${line.limit}`
  const body = [formulaParts(desk.presentation(line.id)?.screen, plain, desk.isStale(line.id))]
  const result = desk.result(line.id)?.criterion
  if (result) {
    const shown = verdict(line, result)
    if (desk.isStale(line.id)) shown.classList.add('line__result--stale')
    body.push(shown)
  }
  const said = result ? (result.satisfied ? ', satisfied' : ', not satisfied') : ''
  return { body, speech: `${line.symbol} ${line.title}: ${plain}${said}` }
}
