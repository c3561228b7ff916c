/**
 * What one page knows of its document's storing: the acknowledged base and the numbered unsent updates,
 * in memory and, a moment later, on the device.
 */
import * as Y from 'yjs'
import type { DeviceStore, SheetKey } from './deviceStore'

interface Unsent {
  number: number
  update: Uint8Array
  /** Row on the device, once it is there. */
  row: Promise<number | undefined>
  /** Contains everything before it: the answer to a server that lacked something. */
  isWhole: boolean
}

/** Acknowledged updates that are merged into one beyond this many. */
const MOST_APART = 200

export class KeptChanges {
  readonly page: string
  readonly epoch: number
  #acknowledged: Uint8Array[]
  #unsent: Unsent[] = []
  #next = 1
  /** Rows of the base on this device. */
  #baseRows: Promise<number | undefined>[] = []
  readonly #store: DeviceStore
  readonly #sheet: SheetKey
  readonly #failed: (error: unknown) => void

  constructor(options: {
    store: DeviceStore
    sheet: SheetKey
    page: string
    epoch: number
    base: Uint8Array
    failed: (error: unknown) => void
  }) {
    this.#store = options.store
    this.#sheet = options.sheet
    this.#failed = options.failed
    this.page = options.page
    this.epoch = options.epoch
    this.#acknowledged = [options.base]
    this.#baseRows = [this.#keep(options.base, true)]
  }

  get hasUnsent(): boolean {
    return this.#unsent.length > 0
  }
  get acknowledged(): readonly Uint8Array[] {
    return this.#acknowledged
  }
  get unsent(): Uint8Array[] {
    return this.#unsent.map((unsent) => unsent.update)
  }

  /** A colleague's update, or the stored state again. */
  received(update: Uint8Array): void {
    this.#acknowledged.push(update)
    this.#baseRows.push(this.#keep(update, true))
    this.#tidy()
  }

  /** Gives an update its number. */
  add(update: Uint8Array, isWhole = false): number {
    const number = this.#next++
    this.#unsent.push({ number, update, row: this.#keep(update, false), isWhole })
    return number
  }

  /** The server has committed this number. */
  stored(number: number): void {
    const found = this.#unsent.find((unsent) => unsent.number === number)
    if (found === undefined) return
    const done = this.#unsent.filter((one) => one === found || (found.isWhole && one.number < number))
    this.#unsent = this.#unsent.filter((one) => !done.includes(one))
    for (const { update, row } of done) {
      this.#acknowledged.push(update)
      this.#baseRows.push(row)
      void row
        .then((id) => (id === undefined ? undefined : this.#store.acknowledge([id])))
        .catch(this.#failed)
    }
    this.#tidy()
  }

  #keep(update: Uint8Array, isAcknowledged: boolean): Promise<number | undefined> {
    return this.#store
      .keep(this.#sheet, { page: this.page, epoch: this.epoch, update, isAcknowledged })
      .catch((error: unknown) => {
        this.#failed(error)
        return undefined
      })
  }

  /** Many small updates become one, in memory and on the device. */
  #tidy(): void {
    if (this.#acknowledged.length < MOST_APART) return
    const merged = Y.mergeUpdates(this.#acknowledged)
    this.#acknowledged = [merged]
    const old = this.#baseRows
    const row = Promise.all(old).then(async (ids) => {
      const forget = ids.filter((id) => id !== undefined)
      const kept = { page: this.page, epoch: this.epoch, update: merged, isAcknowledged: true }
      const [id] = await this.#store.replace(this.#sheet, forget, [kept])
      return id
    })
    this.#baseRows = [
      row.catch((error: unknown) => {
        this.#failed(error)
        return undefined
      }),
    ]
  }

  /** Forgets everything on the device: it is stored, or has become a draft or another page's concern. */
  async forget(): Promise<void> {
    const ids = await Promise.all([...this.#baseRows, ...this.#unsent.map((unsent) => unsent.row)])
    this.#baseRows = []
    await this.#store.replace(
      this.#sheet,
      ids.filter((id) => id !== undefined),
      [],
    )
  }

  /** Resolves when everything up to now is on the device. */
  async onDevice(): Promise<void> {
    await Promise.all([...this.#baseRows, ...this.#unsent.map((unsent) => unsent.row)])
  }
}
