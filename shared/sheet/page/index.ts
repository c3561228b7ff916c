/**
 * The page schema: everything that may stand on a page, one file per node, free of any framework, so
 * that `getSchema(pageExtensions)` works in Node. It holds nothing that Markdown with tables cannot
 * say, and its content rules admit whatever concurrent edits can produce.
 */
import type { Extensions } from '@tiptap/core'
import { HardBreak } from '@tiptap/extension-hard-break'
import { Text } from '@tiptap/extension-text'
import { PageDocument } from './document'
import { PageHeading } from './heading'
import { PageLine } from './line'
import { PageBulletList, PageListItem, PageOrderedList } from './lists'
import { PageBold, PageCode, PageItalic, PageLink } from './marks'
import { PageParagraph } from './paragraph'
import { PageQuote } from './quote'
import { PageReference } from './reference'
import { PageTable, PageTableCell, PageTableHeader, PageTableRow } from './table'

export const pageExtensions: Extensions = [
  PageDocument,
  Text,
  PageParagraph,
  PageHeading,
  PageBulletList,
  PageOrderedList,
  PageListItem,
  PageTable,
  PageTableRow,
  PageTableCell,
  PageTableHeader,
  HardBreak,
  PageLine,
  PageQuote,
  PageReference,
  PageBold,
  PageItalic,
  PageCode,
  PageLink,
]

export { isSafeLink } from './safeLink'
export { PageLine } from './line'
export { PageQuote } from './quote'
export { PageReference } from './reference'
