/** The text form: a sheet as Markdown, both ways, and the same for the clipboard. */
export { exportText } from './export'
export type { Heading } from './heading'
export { importText, longestText } from './import'
export type { TextReading } from './import'
export { asNewBlocks, copyText, hasLines, pasteText } from './clipboard'
export type { Pasted } from './clipboard'
