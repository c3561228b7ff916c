import type { LineResult, Presentation } from '@shared/engine/contracts'
import { engineLine, engineLines, settingsOf } from '@shared/pipeline/engineLines'
import type { Line } from '@shared/sheet/kinds'
import type { Sheet } from '@shared/sheet/sheet'
import { onScopeDispose, ref, shallowRef, triggerRef } from 'vue'
import { createEngineClient, workerChannel, type EngineChannel } from '@/workers/engineClient'

/** Without Vue's proxies, which no message can carry to a worker. */
const plain = <T extends Sheet | Line>(value: T): T => JSON.parse(JSON.stringify(value)) as T

/**
 * Computes a sheet that belongs to nobody yet, such as a template that is being filled in: nothing of it is
 * stored. `channel` makes the way to the engine; a worker unless given.
 */
export const useTrialSheet = (channel: () => EngineChannel = workerChannel) => {
  const results = shallowRef(new Map<string, LineResult>())
  const presentations = shallowRef(new Map<string, Presentation>())
  /** What went wrong in the program itself; then no value is current. */
  const fault = ref<string | null>(null)
  const lines = shallowRef<Line[]>([])
  const isComputing = ref(false)
  let newest = 0

  const keep = (shown: readonly Presentation[]) => {
    for (const presentation of shown) presentations.value.set(presentation.id, presentation)
    triggerRef(presentations)
  }

  const client = createEngineClient(channel(), {
    results: (answer) => {
      for (const result of answer.lines) results.value.set(result.id, result)
      triggerRef(results)
      keep(answer.presentations)
      if (answer.number === newest) isComputing.value = false
    },
    presentations: (answer) => keep(answer.presentations),
    fault: (message) => {
      fault.value = message
      isComputing.value = false
    },
  })
  onScopeDispose(() => client.close())

  /** Puts the whole sheet in; once. */
  const open = (template: Sheet) => {
    const sheet = plain(template)
    lines.value = sheet.blocks.flatMap((block) => (block.type === 'line' ? [block.line] : []))
    const changes = engineLines(sheet).map((line, index, all) => ({
      id: line.id,
      after: all[index - 1]?.id ?? null,
      line,
    }))
    isComputing.value = true
    newest = client.apply({ settings: settingsOf(sheet), changes })
    client.show(lines.value.map(({ id }) => id))
  }

  /** Another value for one line. */
  const change = (typed: Line) => {
    const line = plain(typed)
    const place = lines.value.findIndex(({ id }) => id === line.id)
    if (place < 0) return
    lines.value = lines.value.with(place, line)
    isComputing.value = true
    newest = client.apply({
      changes: [{ id: line.id, after: lines.value[place - 1]?.id ?? null, line: engineLine(line) }],
    })
  }

  return { lines, results, presentations, fault, isComputing, open, change }
}
