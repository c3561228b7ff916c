/** A sheet's connection for components: the session's events as refs, undo, pens, presence and drafts. */
import { computed, readonly, ref, shallowReadonly, shallowRef } from 'vue'
import { ySyncPluginKey } from '@tiptap/y-tiptap'
import { ownEdit } from '@shared/sheet/edits'
import type { ConnectionStatus, DraftOfMine, OpenSheetOptions, SheetConnection } from './contracts'
import { MemoryDeviceStore, type DeviceStore, type KeptDraft } from './deviceStore'
import { openIndexedDeviceStore } from './indexedDeviceStore'
import { createPenBook } from './penBook'
import { peopleOf, type PersonInSheet } from './presence'
import { isSimple, writeDraft } from './sendDraft'
import { SheetSession } from './sheetSession'
import { Undo } from './undo'

export type * from './contracts'

/** Where a browser keeps nothing, the page itself does, as long as it lives. */
const openDeviceStore = async (): Promise<DeviceStore> => {
  try {
    return await openIndexedDeviceStore()
  } catch {
    return new MemoryDeviceStore()
  }
}

const ownAddress = (): string => `${location.protocol === 'https:' ? 'wss:' : 'ws:'}//${location.host}`

export interface Surroundings {
  address: string
  store: DeviceStore
  WebSocket?: typeof WebSocket
  /** Longest pause between two tries to connect. */
  maxBackoffMs?: number
}

/** Opens the live sheet of a document for the person who is signed in; `close()` it on leaving. */
export const openSheetConnection = async ({
  documentId,
  person,
}: OpenSheetOptions): Promise<SheetConnection> =>
  connectSheet({ documentId, person }, { address: ownAddress(), store: await openDeviceStore() })

/** As `openSheetConnection`, with the surroundings given. */
export const connectSheet = (
  { documentId, person }: OpenSheetOptions,
  surroundings: Surroundings,
): SheetConnection => {
  const session = new SheetSession({ documentId, person: person.id, ...surroundings })
  const newUndo = () =>
    new Undo({
      doc: session.doc,
      trackedOrigins: [ySyncPluginKey, ownEdit],
      takePens: (keys) => book.pens.take(keys),
      releasePens: (keys) => book.pens.release(keys),
    })
  const book = createPenBook({
    take: (keys) => session.takePens(keys),
    keep: (keys) => session.keepPens(keys),
    release: (keys) => session.releasePens(keys),
  })
  let undo = newUndo()
  const doc = shallowRef(session.doc)
  const awareness = shallowRef(session.awareness)
  const undoManager = shallowRef(undo.manager)
  const status = ref<ConnectionStatus>({ ...session.status })
  const mayWrite = ref(session.mayWrite)
  const linesOpen = computed(
    () => mayWrite.value && (status.value.state === 'stored' || status.value.state === 'sending'),
  )
  const people = shallowRef<PersonInSheet[]>([])
  const drafts = shallowRef<DraftOfMine[]>([])

  const showPeople = () => {
    people.value = peopleOf(session.awareness)
  }
  session.awareness.on('change', showPeople)

  const draftOfMine = (kept: KeptDraft): DraftOfMine => ({
    ...kept,
    at: new Date(kept.at),
    copy: () => kept.text,
    send: async () => {
      const keys = [...new Set(kept.fields.map((field) => field.key))]
      if (!isSimple(session.doc, kept) || !(await book.pens.take(keys))) return false
      writeDraft(session.doc, kept, ownEdit)
      book.pens.release(keys)
      await session.drafts.drop(kept.id)
      return true
    },
    drop: () => session.drafts.drop(kept.id),
  })
  const showDrafts = (all: readonly KeptDraft[]) => {
    drafts.value = all.map(draftOfMine)
  }
  showDrafts(session.drafts.all)

  session.on('replaced', (nextDoc, nextAwareness) => {
    const stood = awareness.value.getLocalState()
    undo.end()
    undo = newUndo()
    nextAwareness.on('change', showPeople)
    if (stood !== null) nextAwareness.setLocalState({ where: stood.where ?? null })
    undoManager.value = undo.manager
    awareness.value = nextAwareness
    doc.value = nextDoc
    showPeople()
  })
  session.on('status', (next) => {
    status.value = next
    if (next.state === 'offline' || next.state === 'refused') book.loseAll()
  })
  session.on('rights', (may) => (mayWrite.value = may))
  session.on('pens', (held) => book.show(held))
  session.on('drafts', showDrafts)

  return {
    doc,
    awareness,
    undoManager,
    status: readonly(status),
    mayWrite: readonly(mayWrite),
    linesOpen,
    pens: book.pens,
    people: shallowReadonly(people),
    drafts: shallowReadonly(drafts),
    origin: ownEdit,
    undo: () => undo.undo(),
    redo: () => undo.redo(),
    standAt: (where) => session.awareness.setLocalStateField('where', where),
    holdField: (field) => session.holdField(field),
    keepAsDraft: (reason, fields) => session.keepAsDraft(reason, fields),
    close: async () => {
      undo.end()
      await session.close()
    },
  }
}
