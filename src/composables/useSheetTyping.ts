import { engineLine } from '@shared/pipeline/engineLines'
import { readCompact } from '@shared/engine/parse/shorthand'
import { quantityText } from '@/editor/symbolText'
import { typedLine } from '@/editor/commands/newLine'
import type { Typing } from '@/editor/extensions/typedLine'
import type { SheetContent } from './useSheetContent'
import type { SheetEngineState } from './useSheetEngine'
import type { SheetNumbers } from './useSheetNumbers'

/** How typed paragraphs read in this sheet, and what they would give. */
export const useSheetTyping = (
  content: SheetContent,
  engine: SheetEngineState,
  numbers: SheetNumbers,
): Typing => {
  const isDefined = (name: string): boolean =>
    [...content.lines.values()].some(({ symbol }) => symbol === name)
  return {
    read: (text) => readCompact(text, { isDefined }),
    preview: async (compact) => {
      const line = typedLine(numbers.sheet.value, compact)
      const trial = await engine.tryLine(engineLine(line), content.order.value.at(-1) ?? null)
      if (!trial) return null
      const { result, presentation } = trial
      const problem = result.problems.find(({ severity }) => severity === 'error')
      if (problem) return { plain: '', problem: problem.message }
      if (result.state === 'waits') return { plain: '', problem: `waits for ${result.waitsFor.join(', ')}` }
      if (result.criterion) return { plain: result.criterion.satisfied ? 'satisfied' : 'not satisfied' }
      return {
        plain: result.value ? `= ${quantityText(result.value.shown)}` : '',
        tex: presentation?.screen.result,
      }
    },
  }
}
