import { existsSync } from 'node:fs'
import type { Browser } from 'playwright-core'
import { afterAll, beforeAll, describe, expect, test, vi } from 'vitest'
import { launchChromium } from '../support/browser'
import { startServerProcess, type ServerProcess } from '../support/serverProcess'
import type { PersonName } from '../support/server'
import {
  expectNoFaults,
  goToEnd,
  isOffline,
  isStored,
  line,
  openFields,
  openSheetPage,
  proseOf,
  sentences,
  sheet,
  statusOf,
  typeLine,
  until,
  waitForSpeech,
  writeField,
  type SheetPage,
} from '../support/sheetPage'

// A browser, a server and a database share two cores here.
vi.setConfig({ testTimeout: 120_000 })

let office: ServerProcess
let browser: Browser
beforeAll(async () => {
  if (!existsSync('dist/client/index.html'))
    throw new Error('The client is not built: run npm run build first.')
  office = await startServerProcess(['engineer', 'colleague', 'observer'])
  browser = await launchChromium()
}, 120_000)
afterAll(async () => {
  await browser?.close()
  await office?.close()
})

interface Shared {
  calculation: string
  documentId: string
}

/** A calculation of the engineer's that the colleague prepares, too. */
const newShared = async (template?: string): Promise<Shared> => {
  const client = await office.signIn('engineer')
  const made = await office.addCalculation(
    client,
    template === undefined ? {} : { beginning: { kind: 'template', template, givens: {} } },
  )
  await client
    .post(`/api/calculations/${made.id}/participations`)
    .send({ accountId: office.people.colleague.id, part: 'preparer' })
    .expect(201)
  const { body } = await client.get(`/api/revisions/${made.revisions[0]?.id}`).expect(200)
  return { calculation: made.id, documentId: body.document.documentId as string }
}

const open = (person: PersonName, { calculation }: Shared): Promise<SheetPage> =>
  openSheetPage(browser, office, { person, address: office.addressOf(person), calculation })

/** Both on the same sheet; closed when `work` is done, and neither page may have had a fault. */
const together = async (
  shared: Shared,
  work: (engineer: SheetPage, colleague: SheetPage) => Promise<void>,
): Promise<void> => {
  const engineer = await open('engineer', shared)
  const colleague = await open('colleague', shared)
  try {
    await work(engineer, colleague)
    expectNoFaults(engineer, colleague)
  } finally {
    office.joinFor('engineer')
    office.joinFor('colleague')
    await engineer.close()
    await colleague.close()
  }
}

const occurrences = (text: string, word: string): number => text.split(word).length - 1

describe('the word stored', () => {
  test('is shown only when what was typed is committed', async () => {
    const shared = await newShared()
    await together(shared, async ({ page }) => {
      await goToEnd(page)
      for (let word = 0; word < 12; word += 1) {
        const { head } = await office.storedOf(shared.documentId)
        await page.keyboard.type(`word${word}. `)
        await isStored(page)
        const stored = await office.storedOf(shared.documentId)
        expect(stored.page).toContain(`word${word}.`)
        expect(stored.head).toBeGreaterThan(head)
      }
    })
  })

  test('is not shown while the server does not answer', async () => {
    const shared = await newShared()
    await together(shared, async ({ page }) => {
      await goToEnd(page)
      await page.keyboard.type('before. ')
      await isStored(page)
      office.cutFor('engineer')
      await page.keyboard.type('after. ')
      await isOffline(page)
      expect((await office.storedOf(shared.documentId)).page).not.toContain('after.')
      office.joinFor('engineer')
      await isStored(page)
      expect(occurrences((await office.storedOf(shared.documentId)).page, 'after.')).toBe(1)
    })
  })
})

test('a server killed under the typing of two: both come back, nothing that was stored is gone, nothing is doubled', async () => {
  const shared = await newShared()
  await together(shared, async (engineer, colleague) => {
    const typed: string[] = []
    const shownStored = new Set<string>()
    await goToEnd(engineer.page)
    await typeLine(engineer.page, 'Opening of the first.')
    await isStored(engineer.page)
    await sheet(colleague.page).getByText('Opening of the first.').waitFor()
    await sheet(colleague.page).locator('> p').first().click()
    await colleague.page.keyboard.press('End')
    for (let kill = 0; kill < 3; kill += 1) {
      for (let word = 0; word < 6; word += 1) {
        for (const [name, { page }] of [
          ['a', engineer],
          ['b', colleague],
        ] as const) {
          const said = `${name}${kill}x${word}.`
          await page.keyboard.type(said)
          typed.push(said)
          if (word < 4) {
            await isStored(page)
            shownStored.add(said)
          }
        }
      }
      await office.kill()
      for (const { page } of [engineer, colleague]) await isOffline(page)
      const { page: committed } = await office.storedOf(shared.documentId)
      expect([...shownStored].filter((word) => !committed.includes(word))).toEqual([])
      for (const [name, { page }] of [
        ['a', engineer],
        ['b', colleague],
      ] as const) {
        await page.keyboard.type(`${name}${kill}away.`)
        typed.push(`${name}${kill}away.`)
      }
      await office.start()
      for (const { page } of [engineer, colleague]) await isStored(page)
      // The caret stays where it was, although the document beneath it is another.
    }
    await until(
      async () => (await proseOf(engineer.page)) === (await proseOf(colleague.page)),
      'the same text',
    )
    const text = await proseOf(engineer.page)
    expect(typed.filter((word) => occurrences(text, word) !== 1)).toEqual([])
    const { page: committed } = await office.storedOf(shared.documentId)
    expect(typed.filter((word) => occurrences(committed, word) !== 1)).toEqual([])
    expect(await engineer.page.getByText('Draft of mine').count()).toBe(0)
  })
})
