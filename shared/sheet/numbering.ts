import type { LineId } from '../errors/problem'
import type { Sheet } from './sheet'

export interface Numbering {
  /** Line id → its number: `3.12` is the twelfth line of section 3; lines above the first heading count from `0.1`. */
  lines: Map<LineId, string>
  /** Heading id → its number: `3`, `3.1`. Ids that repeat keep their first. */
  headings: Map<string, string>
  /** The sections in reading order: the opening one (number `0`, no heading), then one for every heading of level 1. */
  sections: { number: string; headingId: string | null; lines: LineId[] }[]
}

/**
 * Numbers of headings and lines, from their order alone. Only top-level headings count; lines are
 * numbered by the section of level 1 they stand in, whatever its subsections.
 */
export const numberSheet = (sheet: Sheet): Numbering => {
  const lines = new Map<LineId, string>()
  const headings = new Map<string, string>()
  let section: Numbering['sections'][number] = { number: '0', headingId: null, lines: [] }
  const sections = [section]
  const counters = [0, 0, 0]
  for (const block of sheet.blocks) {
    if (block.type === 'heading') {
      counters[block.level - 1] = (counters[block.level - 1] ?? 0) + 1
      counters.fill(0, block.level)
      if (block.level === 1) {
        section = { number: String(counters[0]), headingId: block.id, lines: [] }
        sections.push(section)
      }
      if (!headings.has(block.id)) headings.set(block.id, counters.slice(0, block.level).join('.'))
    } else if (block.type === 'line' && !lines.has(block.line.id)) {
      section.lines.push(block.line.id)
      lines.set(block.line.id, `${section.number}.${section.lines.length}`)
    }
  }
  return { lines, headings, sections }
}

/** Headings with the prose that they open, for ticks: prose is ticked by section. */
export const proseSections = (sheet: Sheet): { headingId: string | null; blocks: number[] }[] => {
  let current: { headingId: string | null; blocks: number[] } = { headingId: null, blocks: [] }
  const all = [current]
  sheet.blocks.forEach((block, index) => {
    if (block.type === 'heading') {
      current = { headingId: block.id, blocks: [] }
      all.push(current)
    }
    if (block.type !== 'line') current.blocks.push(index)
  })
  return all
}
