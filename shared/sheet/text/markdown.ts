import MarkdownIt from 'markdown-it'
import { isSafeLink } from '../page/safeLink'

const lineBreak = /^<br ?\/?>/i

/**
 * CommonMark with tables, no HTML but `<br>`: a line break inside a table's cell has no other form.
 * Links of our own schemes are quoted values and references; addresses stay as they were typed.
 */
export const markdown = new MarkdownIt('commonmark', { html: false }).enable('table')
// Its own bound is 20, and every list counts twice.
Object.assign(markdown.options, { maxNesting: 60 })
markdown.validateLink = (url) => isSafeLink(url) || /^(?:value|line):/.test(url)
markdown.normalizeLink = (url) => url
markdown.inline.ruler.before('autolink', 'line_break', (state, silent) => {
  const found = lineBreak.exec(state.src.slice(state.pos, state.pos + 6))
  if (!found) return false
  if (!silent) state.push('hardbreak', 'br', 0)
  state.pos += found[0].length
  return true
})
