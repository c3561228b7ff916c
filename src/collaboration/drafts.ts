/** Drafts of mine: what could not be stored as it was, kept on the device until its author drops it. */
import type { DeviceStore, KeptDraft, SheetKey } from './deviceStore'
import type { DifferingField } from './differences'

const shown = (value: unknown): string => {
  if (value === undefined || value === null) return '–'
  return typeof value === 'string' ? value : JSON.stringify(value)
}

const asText = (fields: readonly DifferingField[]): string =>
  fields.map(({ key, field, mine }) => `${key}\t${field}\t${shown(mine)}`).join('\n')

export class Drafts {
  #drafts: KeptDraft[] = []
  readonly #store: DeviceStore
  readonly #sheet: SheetKey
  readonly #changed: (drafts: readonly KeptDraft[]) => void
  readonly #failed: (error: unknown) => void

  constructor(
    store: DeviceStore,
    sheet: SheetKey,
    changed: (drafts: readonly KeptDraft[]) => void,
    failed: (error: unknown) => void,
  ) {
    this.#store = store
    this.#sheet = sheet
    this.#changed = changed
    this.#failed = failed
  }

  get all(): readonly KeptDraft[] {
    return this.#drafts
  }

  async load(): Promise<void> {
    const kept = await this.#store.readDrafts(this.#sheet)
    const known = new Set(this.#drafts.map((draft) => draft.id))
    this.#drafts = [...this.#drafts, ...kept.filter((draft) => !known.has(draft.id))]
    this.#changed(this.#drafts)
  }

  /** Resolves when it is on the device: only then may what it was made of be forgotten there. */
  async add(reason: string, fields: DifferingField[]): Promise<void> {
    if (fields.length === 0) return
    const draft = { id: crypto.randomUUID(), at: Date.now(), reason, fields, text: asText(fields) }
    this.#drafts = [...this.#drafts, draft]
    this.#changed(this.#drafts)
    try {
      await this.#store.keepDraft(this.#sheet, draft)
    } catch (error) {
      // It stands on the screen in any case.
      this.#failed(error)
    }
  }

  async drop(id: string): Promise<void> {
    this.#drafts = this.#drafts.filter((draft) => draft.id !== id)
    this.#changed(this.#drafts)
    await this.#store.dropDraft(this.#sheet, id)
  }
}
