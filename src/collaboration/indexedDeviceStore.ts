/** The device store in the browser: IndexedDB for what is kept, Web Locks for which pages are open. */
import type { DeviceStore, KeptDraft, KeptUpdate, SheetKey } from './deviceStore'

const DATABASE = 'torfolio-sheets'
const LOCK = 'torfolio-page-'

const done = <T>(request: IDBRequest<T>): Promise<T> =>
  new Promise((resolve, reject) => {
    request.onsuccess = () => resolve(request.result)
    request.onerror = () => reject(request.error ?? new Error('The browser could not read what it keeps.'))
  })

const committed = (transaction: IDBTransaction): Promise<void> =>
  new Promise((resolve, reject) => {
    transaction.oncomplete = () => resolve()
    transaction.onerror = transaction.onabort = () =>
      reject(transaction.error ?? new Error('The browser could not keep what was typed.'))
  })

const openDatabase = (): Promise<IDBDatabase> => {
  const request = indexedDB.open(DATABASE, 1)
  request.onupgradeneeded = () => {
    const updates = request.result.createObjectStore('updates', { keyPath: 'id', autoIncrement: true })
    updates.createIndex('sheet', 'sheet')
    const drafts = request.result.createObjectStore('drafts', { keyPath: 'id' })
    drafts.createIndex('sheet', 'sheet')
  }
  return done(request)
}

const keyOf = ({ person, document }: SheetKey): string => `${person} ${document}`

/** @throws where the browser keeps nothing (private windows of some browsers) */
export const openIndexedDeviceStore = async (): Promise<DeviceStore> => {
  const database = await openDatabase()
  const writing = (name: 'updates' | 'drafts') => {
    const transaction = database.transaction(name, 'readwrite', { durability: 'relaxed' })
    return { store: transaction.objectStore(name), finished: committed(transaction) }
  }
  const ofSheet = <T>(name: 'updates' | 'drafts', sheet: SheetKey): Promise<T[]> =>
    done<T[]>(database.transaction(name).objectStore(name).index('sheet').getAll(keyOf(sheet)))

  return {
    read: (sheet) => ofSheet<KeptUpdate>('updates', sheet),

    keep: async (sheet, kept) => {
      const { store, finished } = writing('updates')
      const id = await done(store.add({ ...kept, sheet: keyOf(sheet) }))
      await finished
      return Number(id)
    },

    acknowledge: async (ids) => {
      const { store, finished } = writing('updates')
      for (const id of ids) {
        const request: IDBRequest<KeptUpdate | undefined> = store.get(id)
        request.onsuccess = () => {
          if (request.result !== undefined) store.put({ ...request.result, isAcknowledged: true })
        }
      }
      await finished
    },

    replace: async (sheet, forget, keep) => {
      const { store, finished } = writing('updates')
      for (const id of forget) store.delete(id)
      const adding = keep.map((kept) => done(store.add({ ...kept, sheet: keyOf(sheet) })))
      const ids = await Promise.all(adding)
      await finished
      return ids.map(Number)
    },

    readDrafts: (sheet) => ofSheet<KeptDraft>('drafts', sheet),

    keepDraft: async (sheet, draft) => {
      const { store, finished } = writing('drafts')
      store.put({ ...draft, sheet: keyOf(sheet) })
      await finished
    },

    dropDraft: async (_sheet, id) => {
      const { store, finished } = writing('drafts')
      store.delete(id)
      await finished
    },

    // A lock ends with its page, however the page ends.
    claim: (page) => {
      let release: () => void = () => undefined
      void navigator.locks.request(LOCK + page, () => new Promise<void>((resolve) => (release = resolve)))
      return () => release()
    },

    openPages: async () => {
      const { held = [] } = await navigator.locks.query()
      return new Set(
        held.flatMap(({ name }) => (name?.startsWith(LOCK) === true ? [name.slice(LOCK.length)] : [])),
      )
    },
  }
}
