/** A real server process is killed with SIGKILL under typing, again and again; what was shown as stored is counted. */
import { spawn, type ChildProcess } from 'node:child_process'
import { join } from 'node:path'
import { build } from 'vite'
import { afterAll, beforeAll, expect, test } from 'vitest'
import * as Y from 'yjs'
import { loadDocument } from '@server/collaboration/storedDocument'
import { inTransaction } from '@server/repositories/transaction'
import { MemoryDeviceStore } from '@/collaboration/deviceStore'
import { connectSheet } from '@/collaboration/sheetConnection'
import { openOffice, socketOf, until, type Office } from './support/office'
import { openProxy } from './support/proxy'
import { prose, type } from './support/writing'

const KILLS = 20
const folder = join(process.cwd(), '.artefacts/sheet-process')

let office: Office
const children: ChildProcess[] = []
beforeAll(async () => {
  office = await openOffice()
  await build({
    configFile: false,
    logLevel: 'error',
    resolve: {
      alias: { '@shared': join(process.cwd(), 'shared'), '@server': join(process.cwd(), 'server') },
    },
    build: {
      ssr: join(process.cwd(), 'tests/collab/support/sheetProcess.ts'),
      outDir: folder,
      emptyOutDir: true,
      target: 'node20',
    },
  })
})
afterAll(async () => {
  for (const child of children) child.kill('SIGKILL')
  await office.end()
})

const startChild = async (): Promise<{ child: ChildProcess; port: number }> => {
  const child = spawn(process.execPath, [join(folder, 'sheetProcess.js'), office.database.appUrl], {
    stdio: ['ignore', 'pipe', 'inherit'],
  })
  children.push(child)
  let said = ''
  child.stdout.on('data', (part: Buffer) => (said += part.toString()))
  await until(() => said.includes('\n'), 'the process listens', 20_000)
  return { child, port: Number(said) }
}

test(`killed ${KILLS} times under typing: of what was shown as stored, nothing is gone, and nothing comes twice`, async () => {
  const proxy = await openProxy()
  const sheet = connectSheet(
    { documentId: office.firm.documentId, person: office.firm.ada },
    {
      address: proxy.address,
      store: new MemoryDeviceStore(),
      WebSocket: socketOf(office.firm.ada),
      maxBackoffMs: 150,
    },
  )
  const shownStored = new Set<string>()
  const typed: string[] = []
  let next = startChild()
  for (let kill = 0; kill < KILLS; kill++) {
    const { child, port } = await next
    next = startChild()
    proxy.lead(port)
    await until(() => sheet.status.value.state === 'stored', 'back', 20_000)
    const typeWord = () => {
      typed.push(`w${typed.length}.`)
      type(sheet, typed.at(-1) ?? '')
    }
    const look = () => {
      if (sheet.status.value.state === 'stored') for (const each of typed) shownStored.add(each)
    }
    for (let word = 0; word < 4; word++) {
      typeWord()
      await until(() => sheet.status.value.state !== 'stored', 'sending')
      await until(() => sheet.status.value.state === 'stored', 'stored')
      look()
    }
    // Then faster than the server answers, until the blow falls in the middle of it.
    for (let word = 0; word < 6 + kill; word++) {
      typeWord()
      await new Promise((resolve) => setTimeout(resolve, 2 + (kill % 4) * 5))
      look()
    }
    child.kill('SIGKILL')
    proxy.lead(undefined)
    type(sheet, `offline${kill}.`)
    typed.push(`offline${kill}.`)
    await until(() => sheet.status.value.state === 'offline', 'offline')
    const loaded = await inTransaction(office.firm.scope, (tx) => loadDocument(tx, office.firm.documentId))
    const page = loaded.doc.getXmlFragment('page').toString()
    loaded.doc.destroy()
    expect([...shownStored].filter((word) => !page.includes(word))).toEqual([])
  }
  const last = await next
  proxy.lead(last.port)
  await until(() => sheet.status.value.state === 'stored', 'back at last', 20_000)
  const loaded = await inTransaction(office.firm.scope, (tx) => loadDocument(tx, office.firm.documentId))
  const opening = loaded.doc.getXmlFragment('page').get(0)
  const text = opening instanceof Y.XmlElement ? opening.toString() : ''
  loaded.doc.destroy()
  expect(shownStored.size).toBeGreaterThan(KILLS)
  expect(text).toBe(`<paragraph>Opening words.${typed.join('')}</paragraph>`)
  expect(prose(sheet)).toBe(`Opening words.${typed.join('')}`)
  expect(sheet.drafts.value).toHaveLength(0)
  await sheet.close()
  await proxy.close()
}, 300_000)
