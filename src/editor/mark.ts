import { marks, type Mark, type MarkName } from '@/components/base/marks'

const svgName = 'http://www.w3.org/2000/svg'

/** One of the sheet's 16 px marks as static DOM; hidden from screen readers, since its word stands beside it. */
export const drawMark = (name: MarkName): SVGSVGElement => {
  const mark: Mark = marks[name]
  const svg = document.createElementNS(svgName, 'svg')
  for (const [key, value] of Object.entries({
    viewBox: '0 0 16 16',
    width: '16',
    height: '16',
    'aria-hidden': 'true',
  })) {
    svg.setAttribute(key, value)
  }
  svg.setAttribute('class', `state-mark state-mark--${mark.ink}`)
  const add = (data: string, className: string) => {
    const path = document.createElementNS(svgName, 'path')
    path.setAttribute('d', data)
    path.setAttribute('class', className)
    if (mark.dashes && className === 'state-mark__stroked') path.setAttribute('stroke-dasharray', mark.dashes)
    svg.append(path)
  }
  if (mark.filled) add(mark.filled, 'state-mark__filled')
  if (mark.stroked) add(mark.stroked, 'state-mark__stroked')
  return svg
}
