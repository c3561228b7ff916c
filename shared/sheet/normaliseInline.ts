import { isSafeLink } from './page/safeLink'
import { wellFormed } from './normaliseFields'
import type { Inline, Mark } from './sheet'

const order = ['bold', 'italic', 'code', 'link']

/** Each mark once, in a fixed order, links only where they are safe. */
const normaliseMarks = (marks: readonly Mark[] = []): Mark[] => {
  const byType = new Map<string, Mark>()
  for (const mark of marks) {
    if (mark.type === 'link' ? !isSafeLink(mark.href) : false) continue
    if (!byType.has(mark.type)) {
      byType.set(
        mark.type,
        mark.type === 'link' ? { type: 'link', href: wellFormed(mark.href) } : { type: mark.type },
      )
    }
  }
  return [...byType.values()].sort((a, b) => order.indexOf(a.type) - order.indexOf(b.type))
}

const sameMarks = (a: readonly Mark[] = [], b: readonly Mark[] = []): boolean =>
  JSON.stringify(a) === JSON.stringify(b)

const oneLine = (text: string): string => wellFormed(text).replace(/[\r\n\u2028\u2029]+/g, ' ')

/** Runs of one kind of text joined, no empty ones; a line end within text is a space, as Markdown has it. */
export const normaliseInline = (content: readonly Inline[]): Inline[] => {
  const normal: Inline[] = []
  for (const part of content) {
    if (part.type === 'break') normal.push({ type: 'break' })
    else if (part.type === 'reference') {
      if (part.line !== '') normal.push({ type: 'reference', line: oneLine(part.line) })
    } else if (part.type === 'quote') {
      if (part.symbol === '') continue
      normal.push({
        type: 'quote',
        symbol: oneLine(part.symbol),
        ...(part.unit ? { unit: oneLine(part.unit) } : {}),
        ...(part.digits === undefined ? {} : { digits: part.digits }),
      })
    } else {
      const text = oneLine(part.text)
      if (text === '') continue
      const marks = normaliseMarks(part.marks)
      const last = normal.at(-1)
      if (last?.type === 'text' && sameMarks(last.marks, marks)) last.text += text
      else normal.push(marks.length > 0 ? { type: 'text', text, marks } : { type: 'text', text })
    }
  }
  return normal
}
