/** One or more application processes' worth of collaboration on one database, and people who connect. */
import { WebSocket as NodeSocket, type ClientOptions } from 'ws'
import type { CollaborationOptions } from '@server/collaboration/attach'
import { MemoryDeviceStore } from '@/collaboration/deviceStore'
import { connectSheet, type SheetConnection } from '@/collaboration/sheetConnection'
import { freshDatabase, type TestDatabase } from '../../support/database'
import { makeFirm, type TestFirm, type Worker } from './firm'
import { origin, startProcess, type Process } from './process'

export { origin, startProcess, type Process }

/** A browser's WebSocket that says who it is. */
export const socketOf = (worker: Worker): typeof WebSocket => {
  class SignedIn extends NodeSocket {
    constructor(address: string | URL, _protocols?: unknown, options?: ClientOptions) {
      super(address, { ...options, headers: { 'x-account': worker.id, origin } })
    }
  }
  return SignedIn as unknown as typeof WebSocket
}

export interface Office {
  database: TestDatabase
  process: Process
  firm: TestFirm
  /** Opens the firm's sheet as this person, and waits until it is there. */
  open(worker: Worker, where?: { process?: Process; store?: MemoryDeviceStore }): Promise<SheetConnection>
  /** Opens it without waiting. */
  begin(worker: Worker, where?: { process?: Process; store?: MemoryDeviceStore }): SheetConnection
  end(): Promise<void>
}

export const openOffice = async (options: Partial<CollaborationOptions> = {}): Promise<Office> => {
  const database = await freshDatabase()
  const process = await startProcess(database.appUrl, options)
  const firm = await makeFirm(process.dataSource)
  const open: SheetConnection[] = []
  const office: Office = {
    database,
    process,
    firm,
    begin: (worker, where = {}) => {
      const connection = connectSheet(
        { documentId: firm.documentId, person: worker },
        {
          address: (where.process ?? process).address,
          store: where.store ?? new MemoryDeviceStore(),
          WebSocket: socketOf(worker),
        },
      )
      open.push(connection)
      return connection
    },
    open: async (worker, where) => {
      const connection = office.begin(worker, where)
      await until(() => connection.status.value.state === 'stored', 'the sheet is there')
      return connection
    },
    end: async () => {
      await Promise.all(open.map((connection) => connection.close()))
      await process.stop()
      await database.drop()
    },
  }
  return office
}

/** Waits for something to become true. */
export const until = async (
  isSo: () => boolean | Promise<boolean>,
  what: string,
  withinMs = 8_000,
): Promise<void> => {
  const end = Date.now() + withinMs
  while (!(await isSo())) {
    if (Date.now() > end) throw new Error(`Waited in vain: ${what}`)
    await new Promise((resolve) => setTimeout(resolve, 5))
  }
}

export const isStored = (connection: SheetConnection) =>
  until(() => connection.status.value.state === 'stored', 'stored')
