import { Document } from '@tiptap/extension-document'

/** Lines stand at the top level only; an empty page is a page. */
export const PageDocument = Document.extend({ content: '(block | sheetLine)*' })
