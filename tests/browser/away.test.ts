import { existsSync } from 'node:fs'
import type { Browser } from 'playwright-core'
import { afterAll, beforeAll, expect, test, vi } from 'vitest'
import { launchChromium } from '../support/browser'
import { startServerProcess, type ServerProcess } from '../support/serverProcess'
import { newShared, occurrences, openShared, together as withBoth, type Shared } from '../support/sharedSheet'
import {
  expectNoFaults,
  goToEnd,
  isOffline,
  isStored,
  line,
  openFields,
  proseOf,
  sheet,
  spoken,
  typeLine,
  until,
  waitForSpeech,
  writeField,
} from '../support/sheetPage'

// A browser, a server and a database share two cores here.
vi.setConfig({ testTimeout: 120_000 })

let office: ServerProcess
let browser: Browser
beforeAll(async () => {
  if (!existsSync('dist/client/index.html'))
    throw new Error('The client is not built: run npm run build first.')
  office = await startServerProcess(['engineer', 'colleague'])
  browser = await launchChromium()
}, 120_000)
afterAll(async () => {
  await browser?.close()
  await office?.close()
})

const together = (shared: Shared, work: Parameters<typeof withBoth>[3]) =>
  withBoth(office, browser, shared, work)

test('a server killed under the typing of two: both come back, nothing that was stored is gone, nothing is doubled', async () => {
  const shared = await newShared(office)
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

test('a lost network: said so, fields close and prose stays open; what stood in a field is a draft of mine', async () => {
  const shared = await newShared(office, 'solid-shaft')
  await together(shared, async ({ page }, colleague) => {
    const fields = await openFields(page, 'T')
    office.stallFor('engineer')
    await fields.getByLabel('Value', { exact: true }).fill('4321')
    office.cutFor('engineer')
    await isOffline(page)
    await page.getByText('Offline – what you write is kept on this device.').waitFor()
    await fields.waitFor({ state: 'detached' })
    const draft = page.getByRole('region', { name: 'Drafts of mine' })
    await draft.getByText('4321').waitFor()
    expect(await page.getByRole('button', { name: 'Edit', exact: true }).count()).toBe(0)
    await goToEnd(page)
    await page.keyboard.type(' Typed on the train.')
    office.joinFor('engineer')
    await isStored(page)
    await sheet(colleague.page).getByText('Typed on the train.').waitFor()
    expect(occurrences((await office.storedOf(shared.documentId)).page, 'Typed on the train.')).toBe(1)
    expect(await spoken(colleague.page, 'T').textContent()).not.toContain('4321')
    await draft.getByRole('button', { name: 'Write it into the sheet' }).click()
    await waitForSpeech(colleague.page, 'T', /4.?321/)
    await draft.waitFor({ state: 'detached' })
  })
})

test('a page closed while offline leaves its prose on the device; the next one sends it, once', async () => {
  const shared = await newShared(office)
  const engineer = await openShared(office, browser, 'engineer', shared)
  await goToEnd(engineer.page)
  await engineer.page.keyboard.type('Stored before. ')
  await isStored(engineer.page)
  office.cutFor('engineer')
  await isOffline(engineer.page)
  await engineer.page.keyboard.type('Left behind. ')
  await engineer.page.waitForTimeout(300)
  const { page: closed } = engineer
  const context = closed.context()
  const address = closed.url()
  await closed.close()
  expect((await office.storedOf(shared.documentId)).page).not.toContain('Left behind.')
  office.joinFor('engineer')
  for (let opening = 0; opening < 2; opening += 1) {
    const page = await context.newPage()
    await page.goto(address)
    await sheet(page).getByText('Left behind.').waitFor()
    await isStored(page)
    expect(occurrences((await office.storedOf(shared.documentId)).page, 'Left behind.')).toBe(1)
    expect(occurrences(await proseOf(page), 'Left behind.')).toBe(1)
    expect(await page.getByText('Draft of mine').count()).toBe(0)
    await page.close()
  }
  expectNoFaults(engineer)
  await engineer.close()
})

test('a sheet closed to edits under a tab: what it had not stored is a draft, and the stored sheet is shown', async () => {
  const shared = await newShared(office)
  await together(shared, async ({ page }, colleague) => {
    await goToEnd(page)
    await typeLine(page, 'Stored in time.')
    await isStored(page)
    await office.query('UPDATE document SET epoch = epoch + 1, writable = false WHERE id = $1', [
      shared.documentId,
    ])
    await page.keyboard.type('Too late for the sheet.')
    const draft = page.getByRole('region', { name: 'Drafts of mine' })
    await draft.getByText('Too late for the sheet.').first().waitFor()
    await until(async () => !(await proseOf(page)).includes('Too late'), 'the stored sheet is shown')
    await sheet(page).getByText('Stored in time.').waitFor()
    await until(
      async () => (await sheet(page).getAttribute('contenteditable')) === 'false',
      'closed to writing',
    )
    expect((await office.storedOf(shared.documentId)).page).not.toContain('Too late')
    expect(await proseOf(colleague.page)).not.toContain('Too late')
    await office.query('UPDATE document SET epoch = epoch + 1, writable = true WHERE id = $1', [
      shared.documentId,
    ])
  })
})

// Not proved yet: the colleague's words of the day are not always seen on both pages. It runs with `npm run test:long`.
test.runIf(process.env['TORFOLIO_TEST_LONG'] === 'on')(
  'a laptop closed for a day while the colleague changed the same line and the same text: theirs stands, mine is shown',
  async () => {
    const shared = await newShared(office, 'solid-shaft')
    await together(shared, async (engineer, colleague) => {
      const { page } = engineer
      const fields = await openFields(page, 'T')
      await fields.getByLabel('Value', { exact: true }).press('End')
      await page.keyboard.type('1')
      await waitForSpeech(colleague.page, 'T', /5.?001/)
      await isStored(page)
      office.stallFor('engineer')
      // With the pen in hand, so it is in this copy of the sheet, but it never reaches the server.
      await page.keyboard.type('23')
      await page.waitForTimeout(200)
      office.cutFor('engineer')
      await isOffline(page)
      await goToEnd(page)
      await page.keyboard.type(' Mine of the train.')
      await line(colleague.page, 'T').locator('.line__pen').waitFor({ state: 'detached' })
      await writeField(colleague.page, 'T', 'Value', '777')
      await goToEnd(colleague.page)
      await colleague.page.keyboard.type(' Theirs of the day.')
      await isStored(colleague.page)
      office.joinFor('engineer')
      await isStored(page)
      const draft = page.getByRole('region', { name: 'Drafts of mine' })
      await draft.getByText('A colleague changed the same line while you were away.').waitFor()
      for (const each of [engineer, colleague]) {
        await waitForSpeech(each.page, 'T', /777/)
        await sheet(each.page).getByText('Mine of the train.').waitFor()
        await sheet(each.page).getByText('Theirs of the day.').waitFor()
      }
      await until(
        async () => (await proseOf(page)) === (await proseOf(colleague.page)),
        'the same text on both screens',
      )
    })
  },
)
