import { computed, type ComputedRef } from 'vue'
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
  const numbering = computed(() => numberSheet(sheet.value))
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
