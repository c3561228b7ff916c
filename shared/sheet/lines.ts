import type { Line } from './kinds'
import type { Sheet } from './sheet'

/** The lines of a sheet in reading order, without the prose. */
export const linesOf = (sheet: Sheet): Line[] =>
  sheet.blocks.flatMap((block) => (block.type === 'line' ? [block.line] : []))
