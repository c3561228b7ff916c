/**
 * Between application processes: NOTIFY says that a document has a new head or that its pens changed,
 * outside of the transactions that did it and at most every 25 ms. A notification may be lost and a
 * LISTEN may die without a word, so a heartbeat watches the connection, and after every new start (and
 * every few seconds) heads are read again. Correctness never depends on any of this: the document's row
 * orders all appends.
 */
import { Client } from 'pg'
import { z } from 'zod'

const CHANNEL = 'torfolio_sheet'
const BATCH_MS = 25
/** Below PostgreSQL's limit of 8 000 bytes. */
const PAYLOAD_BYTES = 7_500

const noticeSchema = z.object({
  from: z.string(),
  heads: z.array(z.tuple([z.string(), z.number().int()])),
  pens: z.array(z.string()),
})

export interface FanOutOptions {
  /** Where the database is; the connection is this one's own, outside of any pool. */
  url: string
  /** Sends one NOTIFY by the pool. */
  notify: (channel: string, payload: string) => Promise<void>
  headRaised: (documentId: string, head: number) => void
  pensChanged: (documentId: string) => void
  /** Heads are to be read again: something may have been missed. */
  somethingMissed: () => void
  failed: (error: unknown) => void
  heartbeatMs?: number
}

export class FanOut {
  /** Tells our own notifications from those of others. */
  readonly #self = crypto.randomUUID()
  readonly #heads = new Map<string, number>()
  readonly #pens = new Set<string>()
  readonly #options: FanOutOptions
  #batch: NodeJS.Timeout | undefined
  #sending: Promise<void> = Promise.resolve()
  #client: Client | undefined
  #heartbeat: NodeJS.Timeout | undefined
  #again: NodeJS.Timeout | undefined
  #isClosed = false

  constructor(options: FanOutOptions) {
    this.#options = options
  }

  async start(): Promise<void> {
    await this.#listen()
    const every = this.#options.heartbeatMs ?? 5_000
    this.#heartbeat = setInterval(() => void this.#beat(), every)
    this.#heartbeat.unref()
  }

  headRaised(documentId: string, head: number): void {
    this.#heads.set(documentId, head)
    this.#later()
  }

  pensChanged(documentId: string): void {
    this.#pens.add(documentId)
    this.#later()
  }

  #later(): void {
    this.#batch ??= setTimeout(() => {
      this.#batch = undefined
      this.#sending = this.#send()
    }, BATCH_MS)
  }

  async #send(): Promise<void> {
    const heads = [...this.#heads]
    const pens = [...this.#pens]
    this.#heads.clear()
    this.#pens.clear()
    const most = Math.floor(PAYLOAD_BYTES / 120)
    try {
      for (let from = 0; from < Math.max(heads.length, pens.length); from += most) {
        const part = {
          from: this.#self,
          heads: heads.slice(from, from + most),
          pens: pens.slice(from, from + most),
        }
        await this.#options.notify(CHANNEL, JSON.stringify(part))
      }
    } catch (error) {
      // The others find out by reading heads again.
      this.#options.failed(error)
    }
  }

  async #listen(): Promise<void> {
    if (this.#isClosed) return
    const client = new Client({
      connectionString: this.#options.url,
      application_name: 'torfolio listen',
      keepAlive: true,
    })
    client.on('error', (error) => {
      this.#options.failed(error)
      this.#restart(client)
    })
    client.on('end', () => this.#restart(client))
    client.on('notification', ({ payload }) => this.#heard(payload ?? ''))
    this.#client = client
    try {
      await client.connect()
      await client.query(`LISTEN ${CHANNEL}`)
      this.#options.somethingMissed()
    } catch (error) {
      this.#options.failed(error)
      this.#restart(client)
    }
  }

  #restart(client: Client): void {
    if (this.#client !== client || this.#isClosed) return
    this.#client = undefined
    client.end().catch(() => undefined)
    this.#again = setTimeout(() => void this.#listen(), 250)
    this.#again.unref()
  }

  async #beat(): Promise<void> {
    const client = this.#client
    this.#options.somethingMissed()
    if (client === undefined) return
    let timer: NodeJS.Timeout | undefined
    const silence = new Promise<never>((_resolve, reject) => {
      timer = setTimeout(() => reject(new Error('The listening connection is silent.')), 3_000)
    })
    try {
      await Promise.race([client.query('SELECT 1'), silence])
    } catch (error) {
      this.#options.failed(error)
      this.#restart(client)
    } finally {
      clearTimeout(timer)
    }
  }

  #heard(payload: string): void {
    const notice = noticeSchema.safeParse(parsed(payload))
    if (!notice.success || notice.data.from === this.#self) return
    for (const [documentId, head] of notice.data.heads) this.#options.headRaised(documentId, head)
    for (const documentId of notice.data.pens) this.#options.pensChanged(documentId)
  }

  /** Sends what waits, then ends the connection. */
  async close(): Promise<void> {
    this.#isClosed = true
    clearInterval(this.#heartbeat)
    clearTimeout(this.#again)
    clearTimeout(this.#batch)
    await this.#sending
    if (this.#heads.size > 0 || this.#pens.size > 0) await this.#send()
    const client = this.#client
    this.#client = undefined
    await client?.end().catch(() => undefined)
  }
}

const parsed = (payload: string): unknown => {
  try {
    return JSON.parse(payload)
  } catch {
    return undefined
  }
}
