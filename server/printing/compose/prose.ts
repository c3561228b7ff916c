/** Prose of a sheet as blocks of a document: quoted values with their numbers, references with the line's. */
import type { QuoteResult } from '@shared/engine/contracts'
import type { Numbering } from '@shared/sheet/numbering'
import type { Inline, Prose } from '@shared/sheet/sheet'
import type { Piece, PrintedBlock } from '../pages'
import { quantityNode } from './shown'

/** What prose needs to know of the sheet around it. */
export interface ProseScope {
  numbering: Numbering
  /** Results of the quoted values of this block, in their order. */
  quotes: (QuoteResult | undefined)[]
}

type TextInline = Extract<Inline, { type: 'text' }>

const textPiece = ({ text, marks = [] }: TextInline): Piece => {
  const has = (type: string) => marks.some((mark) => mark.type === type)
  const link = marks.find((mark) => mark.type === 'link')
  return {
    is: 'text',
    text,
    ...(has('bold') && { bold: true }),
    ...(has('italic') && { italic: true }),
    ...(has('code') && { code: true }),
    ...(link && { href: link.href }),
  }
}

const quotePiece = (symbol: string, result: QuoteResult | undefined): Piece =>
  result?.value
    ? { is: 'math', math: quantityNode(result.value) }
    : { is: 'missing', text: `no value of ${symbol}` }

export const printedPieces = (content: readonly Inline[], scope: ProseScope): Piece[] =>
  content.map((inline): Piece => {
    switch (inline.type) {
      case 'text':
        return textPiece(inline)
      case 'break':
        return { is: 'break' }
      case 'quote':
        return quotePiece(inline.symbol, scope.quotes.shift())
      case 'reference': {
        const number = scope.numbering.lines.get(inline.line)
        return number === undefined
          ? { is: 'missing', text: 'a line that is not there' }
          : { is: 'reference', number }
      }
    }
  })

/** Quoted values are taken from the scope in reading order, so that a block is to be read once. */
export const printedProse = (prose: Prose, scope: ProseScope): PrintedBlock => {
  switch (prose.type) {
    case 'paragraph':
      return { is: 'paragraph', content: printedPieces(prose.content, scope) }
    case 'heading':
      return {
        is: 'heading',
        level: prose.level,
        number: scope.numbering.headings.get(prose.id) ?? '',
        content: printedPieces(prose.content, scope),
      }
    case 'bullets':
      return { is: 'bullets', items: printedItems(prose.items, scope) }
    case 'numbers':
      return { is: 'numbers', start: prose.start, items: printedItems(prose.items, scope) }
    case 'grid':
      return {
        is: 'grid',
        columns: Math.max(1, ...prose.rows.map((row) => row.length)),
        rows: prose.rows.map((row) =>
          row.map(({ head, content }) => ({ head, content: printedPieces(content, scope) })),
        ),
      }
  }
}

const printedItems = (items: Prose[][], scope: ProseScope): PrintedBlock[][] =>
  items.map((item) => item.map((one) => printedProse(one, scope)))
