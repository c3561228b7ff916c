import { computed, type ComputedRef } from 'vue'
import { lineSchema, type Line } from '@shared/sheet/kinds'
import { numberSheet, type Numbering } from '@shared/sheet/numbering'
import type { Block, Inline, Sheet } from '@shared/sheet/sheet'
import type { SheetContent } from './useSheetContent'

export interface ContentsEntry {
  id: string
  number: string
  text: string
  level: 1 | 2 | 3
}

export interface SheetNumbers {
  /** The sheet as plain data, as it stands. */
  sheet: ComputedRef<Sheet>
  numbering: ComputedRef<Numbering>
  contents: ComputedRef<ContentsEntry[]>
}

/** A line of which only the id matters. */
const placeholder = (id: string): Line => lineSchema.parse({ kind: 'given', id })

const plainText = (content: readonly Inline[]): string =>
  content
    .map((inline) => (inline.type === 'text' ? inline.text : inline.type === 'quote' ? inline.symbol : ''))
    .join('')

/** Numbers of lines and headings, and the list of contents, from order alone. */
export const useSheetNumbers = (content: SheetContent): SheetNumbers => {
  const sheet = computed((): Sheet => {
    const placed = new Set<string>()
    const blocks = content.blocks.value.flatMap((block): Block[] => {
      if (block.type !== 'place') return [block]
      const id = String(block.id)
      const line = content.lines.get(id)
      if (!line || placed.has(id)) return []
      placed.add(id)
      return [{ type: 'line', line }]
    })
    return { front: content.front.value, blocks }
  })
  /** What numbers depend on, as one text: typing in a paragraph leaves it the same, and every number with it. */
  const structure = computed(() =>
    JSON.stringify(
      content.blocks.value.map((block) =>
        block.type === 'heading' ? [block.level, block.id] : block.type === 'place' ? block.id : 0,
      ),
    ),
  )
  const numbering = computed((): Numbering => {
    const entries = JSON.parse(structure.value) as ([1 | 2 | 3, string] | string | 0)[]
    const blocks = entries.flatMap((entry): Block[] => {
      if (Array.isArray(entry)) return [{ type: 'heading', level: entry[0], id: entry[1], content: [] }]
      return typeof entry === 'string' ? [{ type: 'line', line: placeholder(entry) }] : []
    })
    return numberSheet({ front: content.front.value, blocks })
  })
  const contents = computed(() =>
    sheet.value.blocks.flatMap((block): ContentsEntry[] =>
      block.type === 'heading'
        ? [
            {
              id: block.id,
              number: numbering.value.headings.get(block.id) ?? '',
              text: plainText(block.content) || 'Untitled',
              level: block.level,
            },
          ]
        : [],
    ),
  )
  return { sheet, numbering, contents }
}
