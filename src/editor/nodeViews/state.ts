import type { LineResult } from '@shared/engine/contracts'
import type { Line } from '@shared/sheet/kinds'
import { symbolText } from '@/editor/symbolText'
import type { MarkName } from '@/components/base/marks'

/** The engine's state of a line as mark and word; nothing where all is well. */
export const engineState = (
  line: Line,
  result: LineResult | undefined,
): { state: MarkName; word: string } | undefined => {
  if (line.contested) return { state: 'contested', word: 'contested' }
  if (!result) return undefined
  if (result.problems.some(({ severity }) => severity === 'error'))
    return { state: 'problem', word: 'problem' }
  if (result.state === 'waits') {
    const [first, ...others] = result.waitsFor
    const more = others.length > 0 ? ` and ${others.length} more` : ''
    return { state: 'waits', word: first ? `waits for ${symbolText(first)}${more}` : 'waits' }
  }
  if (result.problems.length > 0) return { state: 'advisory', word: 'advisory' }
  return undefined
}
