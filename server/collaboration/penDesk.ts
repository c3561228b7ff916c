/** Pens of one document: asked for, granted all or none, kept, laid down. Rows decide; the list here is for showing. */
import { initialsOf, limits, penColourOf, type AskPens, type HeldPen } from '@shared/protocol'
import { lockWritable, readDocument } from '@server/repositories/documentUpdates'
import { givePens, keepPens, readPens, releasePens, type PenRow } from '@server/repositories/pens'
import { inTransaction, type FirmScope } from '@server/repositories/transaction'
import type { Member } from './member'

export interface PenAnswer {
  granted: boolean
  /** The head at the grant: applied by the asker before it writes. */
  head: number
  taken: HeldPen[]
}

const shown = (pen: PenRow): HeldPen => ({
  key: pen.key,
  holder: {
    account: pen.holder,
    name: pen.holderName,
    initials: initialsOf(pen.holderName),
    pen: penColourOf(pen.holder),
  },
  until: pen.until.toISOString(),
})

export class PenDesk {
  #held: HeldPen[] = []
  #soonest = Infinity
  readonly #scope: FirmScope
  readonly #documentId: string

  constructor(scope: FirmScope, documentId: string) {
    this.#scope = scope
    this.#documentId = documentId
  }

  get held(): HeldPen[] {
    return this.#held
  }

  /** Whether a pen that is shown has lapsed by now. */
  hasLapsed(now: number): boolean {
    return now > this.#soonest
  }

  /** Reads who holds what; true where that differs from what was shown. */
  async refresh(): Promise<boolean> {
    const rows = await inTransaction(this.#scope, (tx) => readPens(tx, this.#documentId))
    const before = this.#fingerprint()
    this.#held = rows.map(shown).sort((a, b) => (a.key < b.key ? -1 : 1))
    this.#soonest = Math.min(Infinity, ...rows.map((row) => row.until.getTime()))
    return this.#fingerprint() !== before
  }

  #fingerprint(): string {
    return this.#held.map((pen) => `${pen.key} ${pen.holder.account}`).join('\n')
  }

  /**
   * @param isHere whether a client of the same account is connected to this process: one's own pen may be
   * taken over from a page that is gone, not from another page that is open
   */
  async ask(
    member: Member,
    { act, keys }: AskPens,
    epoch: number,
    isHere: (clientId: number) => boolean,
  ): Promise<PenAnswer> {
    const holder = { accountId: member.accountId, clientId: member.clientId }
    return inTransaction(this.#scope, async (tx) => {
      if (act === 'release') {
        await releasePens(tx, this.#documentId, holder, keys)
        return { granted: true, head: 0, taken: [] }
      }
      if (act === 'keep') {
        const kept = await keepPens(tx, this.#documentId, keys, holder, limits.penLapseMs)
        return { granted: kept.length === new Set(keys).size, head: 0, taken: [] }
      }
      // The same lock as appending: what was stored before the grant is below this head, the rest is refused.
      const document = await lockWritable(tx, this.#documentId, epoch)
      if (document === undefined) {
        const row = await readDocument(tx, this.#documentId)
        return { granted: false, head: row?.head ?? 0, taken: [] }
      }
      const rows = await readPens(tx, this.#documentId, keys)
      const inTheWay = rows.filter((pen) => {
        if (pen.holder !== member.accountId) return true
        return pen.clientId !== member.clientId && isHere(pen.clientId)
      })
      if (inTheWay.length === 0)
        await givePens(tx, this.#documentId, [...new Set(keys)], holder, limits.penLapseMs)
      return { granted: inTheWay.length === 0, head: document.head, taken: inTheWay.map(shown) }
    })
  }

  /** Lays down everything the member held: on leaving and on disconnection. */
  async layDown(member: Member): Promise<void> {
    await inTransaction(this.#scope, (tx) =>
      releasePens(tx, this.#documentId, { accountId: member.accountId, clientId: member.clientId }),
    )
  }
}
