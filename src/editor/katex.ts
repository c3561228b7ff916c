/**
 * The only module that knows KaTeX. It is fetched when the first mathematics is drawn; until then the
 * element keeps the plain text it was given, so that a sheet can be read before.
 */
import type katexModule from 'katex'

type Katex = Pick<typeof katexModule, 'render'>

let katex: Katex | undefined
let loading: Promise<Katex> | undefined

const load = (): Promise<Katex> => {
  loading ??= Promise.all([import('katex'), import('katex/dist/katex.min.css')]).then(([module]) => {
    katex = module.default
    return katex
  })
  return loading
}

const draw = (renderer: Katex, element: HTMLElement, tex: string): void => {
  renderer.render(tex, element, {
    output: 'html',
    throwOnError: false,
    strict: 'ignore',
    trust: false,
    maxSize: 20,
    maxExpand: 200,
  })
}

/**
 * Draws TeX into an element. What was there stays until KaTeX has arrived; a later call for the same
 * element wins. The drawing is for the eye only: callers set `aria-hidden` and say the line elsewhere.
 */
export const typeset = (element: HTMLElement, tex: string): void => {
  if (element.dataset.tex === tex && element.dataset.typeset === 'yes') return
  element.dataset.tex = tex
  if (katex) {
    draw(katex, element, tex)
    element.dataset.typeset = 'yes'
    return
  }
  void load().then((renderer) => {
    if (element.dataset.tex !== tex) return
    draw(renderer, element, tex)
    element.dataset.typeset = 'yes'
  })
}
