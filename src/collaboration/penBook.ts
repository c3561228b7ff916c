/** Pens as the editor sees them: who holds which, and which are this page's own. */
import { shallowRef } from 'vue'
import { limits, type HeldPen } from '@shared/protocol'
import type { Pens } from './contracts'

export interface PenDoor {
  take: (keys: string[]) => Promise<boolean>
  keep: (keys: string[]) => Promise<boolean>
  release: (keys: string[]) => void
}

export interface PenBook {
  pens: Pens
  /** All pens, as the server says. */
  show: (held: readonly HeldPen[]) => void
  /** The connection is gone, and with it the pens. */
  loseAll: () => void
}

export const createPenBook = (door: PenDoor): PenBook => {
  const held = shallowRef<ReadonlyMap<string, HeldPen>>(new Map())
  const mine = shallowRef<ReadonlySet<string>>(new Set())
  const keptAt = new Map<string, number>()
  const setMine = (change: (keys: Set<string>) => void) => {
    const keys = new Set(mine.value)
    change(keys)
    mine.value = keys
  }

  const pens: Pens = {
    holderOf: (key) => held.value.get(key)?.holder,
    isMine: (key) => mine.value.has(key),
    take: async (keys) => {
      const wanted = [...new Set(keys)].filter((key) => !mine.value.has(key))
      if (wanted.length > 0 && !(await door.take(wanted))) return false
      const now = Date.now()
      for (const key of wanted) keptAt.set(key, now)
      setMine((own) => wanted.forEach((key) => own.add(key)))
      return keys.every((key) => mine.value.has(key))
    },
    touch: (keys) => {
      const now = Date.now()
      const due = keys.filter((key) => mine.value.has(key) && now - (keptAt.get(key) ?? 0) > limits.penKeepMs)
      if (due.length === 0) return
      for (const key of due) keptAt.set(key, now)
      void door.keep(due).then((isKept) => {
        if (!isKept) setMine((own) => due.forEach((key) => own.delete(key)))
      })
    },
    release: (keys) => {
      const own = keys.filter((key) => mine.value.has(key))
      if (own.length === 0) return
      setMine((left) => own.forEach((key) => left.delete(key)))
      door.release(own)
    },
  }
  return {
    pens,
    show: (all) => {
      held.value = new Map(all.map((pen) => [pen.key, pen]))
      // One that has lapsed is nobody's any more, whatever this page believed.
      const lapsed = [...mine.value].filter(
        (key) => !held.value.has(key) && Date.now() - (keptAt.get(key) ?? 0) > 5_000,
      )
      if (lapsed.length > 0) setMine((own) => lapsed.forEach((key) => own.delete(key)))
    },
    loseAll: () => {
      mine.value = new Set()
      keptAt.clear()
    },
  }
}
