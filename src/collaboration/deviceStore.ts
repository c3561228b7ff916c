/**
 * What this device keeps of a sheet until the server has acknowledged it: the acknowledged base and the
 * unsent updates apart, by person, document and epoch, and of every open page by itself; and drafts,
 * until their author drops them.
 */
export interface KeptUpdate {
  id: number
  page: string
  epoch: number
  update: Uint8Array
  isAcknowledged: boolean
}

export interface KeptDraft {
  id: string
  at: number
  reason: string
  fields: { key: string; field: string; before: unknown; mine: unknown }[]
  text: string
}

export interface SheetKey {
  person: string
  document: string
}

export interface DeviceStore {
  /** Everything kept of this sheet, of any page and epoch, in the order it was kept. */
  read(sheet: SheetKey): Promise<KeptUpdate[]>
  keep(sheet: SheetKey, kept: Omit<KeptUpdate, 'id'>): Promise<number>
  acknowledge(ids: number[]): Promise<void>
  /** In one step: forgets the first and keeps the others. */
  replace(sheet: SheetKey, forget: number[], keep: Omit<KeptUpdate, 'id'>[]): Promise<number[]>
  readDrafts(sheet: SheetKey): Promise<KeptDraft[]>
  keepDraft(sheet: SheetKey, draft: KeptDraft): Promise<void>
  dropDraft(sheet: SheetKey, id: string): Promise<void>
  /** Says that a page is open, until the returned function is called or the page is gone. */
  claim(page: string): () => void
  /** Pages that are open now, in any tab: what they keep is theirs to send. */
  openPages(): Promise<ReadonlySet<string>>
}

const keyOf = ({ person, document }: SheetKey): string => `${person} ${document}`

/** A store that lives as long as the program: for tests, and where a browser refuses to keep anything. */
export class MemoryDeviceStore implements DeviceStore {
  #next = 1
  readonly #updates = new Map<number, KeptUpdate & { sheet: string }>()
  readonly #drafts = new Map<string, KeptDraft & { sheet: string }>()
  readonly #pages = new Set<string>()

  async read(sheet: SheetKey): Promise<KeptUpdate[]> {
    return [...this.#updates.values()].filter((kept) => kept.sheet === keyOf(sheet))
  }

  async keep(sheet: SheetKey, kept: Omit<KeptUpdate, 'id'>): Promise<number> {
    const id = this.#next++
    this.#updates.set(id, { ...kept, id, sheet: keyOf(sheet) })
    return id
  }

  async acknowledge(ids: number[]): Promise<void> {
    for (const id of ids) {
      const kept = this.#updates.get(id)
      if (kept !== undefined) kept.isAcknowledged = true
    }
  }

  async replace(sheet: SheetKey, forget: number[], keep: Omit<KeptUpdate, 'id'>[]): Promise<number[]> {
    for (const id of forget) this.#updates.delete(id)
    return Promise.all(keep.map((kept) => this.keep(sheet, kept)))
  }

  async readDrafts(sheet: SheetKey): Promise<KeptDraft[]> {
    return [...this.#drafts.values()].filter((draft) => draft.sheet === keyOf(sheet))
  }

  async keepDraft(sheet: SheetKey, draft: KeptDraft): Promise<void> {
    this.#drafts.set(draft.id, { ...draft, sheet: keyOf(sheet) })
  }

  async dropDraft(_sheet: SheetKey, id: string): Promise<void> {
    this.#drafts.delete(id)
  }

  claim(page: string): () => void {
    this.#pages.add(page)
    return () => this.#pages.delete(page)
  }

  async openPages(): Promise<ReadonlySet<string>> {
    return new Set(this.#pages)
  }
}
