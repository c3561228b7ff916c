/**
 * The normal form of a sheet: what means the same on paper becomes the same JSON. The text form is
 * exact on it; comparison and digests are made from it.
 */
import { normaliseFront, normaliseLine, wellFormed } from './normaliseFields'
import { normaliseInline } from './normaliseInline'
import type { Block, Prose, Sheet } from './sheet'

/** Lists nested deeper than this are lifted into the item above. */
const deepestList = 8

/** The wanted id, or the next one that is free: `d_o`, `d_o-2`, `d_o-3`. */
export const freeId = (taken: ReadonlySet<string>, wanted: string): string => {
  if (!taken.has(wanted)) return wanted
  for (let number = 2; ; number++) {
    const candidate = `${wanted.slice(0, 55)}-${number}`
    if (!taken.has(candidate)) return candidate
  }
}

/** Whether an id may stand in a document and in a text. */
export const isId = (id: string): boolean => /^[A-Za-z0-9_-]{1,64}$/.test(id)

type Grid = Extract<Prose, { type: 'grid' }>

/** Every row as long as the longest; one row of heads, the first, or none; nothing where nothing is in it. */
const normaliseGrid = (grid: Grid): Grid[] => {
  const columns = Math.max(0, ...grid.rows.map((row) => row.length))
  const hasHead = grid.rows[0]?.length ? grid.rows[0].every((cell) => cell.head) : false
  const rows = grid.rows
    .filter((row) => row.length > 0)
    .map((row, index) =>
      Array.from({ length: columns }, (_, column) => ({
        head: hasHead && index === 0,
        content: normaliseInline(row[column]?.content ?? []),
      })),
    )
  if (hasHead && rows[0]?.every((cell) => cell.content.length === 0)) rows.shift()
  return rows.length > 0 ? [{ type: 'grid', rows }] : []
}

const normaliseProse = (prose: Prose, headingId: (id: string) => string, depth: number): Prose[] => {
  switch (prose.type) {
    case 'paragraph': {
      const content = normaliseInline(prose.content)
      return content.length > 0 ? [{ type: 'paragraph', content }] : []
    }
    case 'heading':
      return [
        {
          type: 'heading',
          id: headingId(prose.id),
          level: prose.level,
          content: normaliseInline(prose.content),
        },
      ]
    case 'grid':
      return normaliseGrid(prose)
    default: {
      const items = prose.items
        .map((item) => item.flatMap((block) => normaliseProse(block, headingId, depth + 1)))
        .filter((item) => item.length > 0)
      if (items.length === 0) return []
      if (depth >= deepestList) return items.flat()
      return [
        prose.type === 'bullets'
          ? { type: 'bullets', items }
          : { type: 'numbers', start: prose.start, items },
      ]
    }
  }
}

/**
 * Ids of headings: those that are missing, unreadable or repeated get one by order (`h1`, `h2` …).
 * Headings are met in reading order; `explicit` are all ids that are kept.
 */
const headingIds = (sheet: Sheet): ((id: string) => string) => {
  const kept = new Set<string>()
  const collect = (prose: Prose): void => {
    if (prose.type === 'heading' && isId(prose.id)) kept.add(prose.id)
    if (prose.type === 'bullets' || prose.type === 'numbers') prose.items.flat().forEach(collect)
  }
  for (const block of sheet.blocks) if (block.type !== 'line') collect(block)
  const given = new Set<string>()
  let count = 0
  return (id) => {
    count++
    const mine = isId(id) && !given.has(id) ? id : freeId(new Set([...kept, ...given]), `h${count}`)
    given.add(mine)
    return mine
  }
}

export const normalise = (sheet: Sheet): Sheet => {
  const headingId = headingIds(sheet)
  const lineIds = new Set<string>()
  const blocks = sheet.blocks.flatMap((block): Block[] => {
    if (block.type !== 'line') return normaliseProse(block, headingId, 0)
    const line = normaliseLine(block.line)
    const id = freeId(lineIds, line.id)
    lineIds.add(id)
    return [{ type: 'line', line: { ...line, id } }]
  })
  return { front: normaliseFront(sheet.front), blocks }
}

export { wellFormed }
