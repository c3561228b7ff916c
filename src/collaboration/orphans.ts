/** What pages that are gone have left on this device, by page and epoch. */
import type { DeviceStore, KeptUpdate, SheetKey } from './deviceStore'

/** Something that was written upon an acknowledged base. */
export interface KeptVersion {
  epoch: number
  acknowledged: readonly Uint8Array[]
  refusedBecause?: string | undefined
}

export interface Orphan extends KeptVersion {
  unsent: Uint8Array[]
  rows: number[]
}

const updatesOf = (kept: KeptUpdate[], isAcknowledged: boolean): Uint8Array[] =>
  kept.filter((one) => one.isAcknowledged === isAcknowledged).map((one) => one.update)

export const readOrphans = async (store: DeviceStore, sheet: SheetKey): Promise<Orphan[]> => {
  const open = await store.openPages()
  const left = (await store.read(sheet)).filter((kept) => !open.has(kept.page))
  const groups = new Map<string, KeptUpdate[]>()
  for (const kept of left) {
    const name = `${kept.page} ${kept.epoch}`
    groups.set(name, [...(groups.get(name) ?? []), kept])
  }
  return [...groups.values()].flatMap((group) => {
    const first = group[0]
    if (first === undefined) return []
    const sorted = group.sort((a, b) => a.id - b.id)
    const rows = sorted.map((kept) => kept.id)
    return [
      { epoch: first.epoch, acknowledged: updatesOf(sorted, true), unsent: updatesOf(sorted, false), rows },
    ]
  })
}

export const forgetOrphan = async (store: DeviceStore, sheet: SheetKey, orphan: Orphan): Promise<void> => {
  await store.replace(sheet, orphan.rows, [])
}
