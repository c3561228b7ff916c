import { existsSync } from 'node:fs'
import type { Browser } from 'playwright-core'
import { afterAll, beforeAll, describe, expect, test, vi } from 'vitest'
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
  sheet,
  spoken,
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

const together = (shared: Shared, work: Parameters<typeof withBoth>[3]) =>
  withBoth(office, browser, shared, work)

describe('the word stored', () => {
  test('is shown only when what was typed is committed', async () => {
    const shared = await newShared(office)
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
    const shared = await newShared(office)
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

describe('pens', () => {
  test('a line that one is writing in shows the initials to the other, who cannot write in it until it is left', async () => {
    const shared = await newShared(office, 'solid-shaft')
    await together(shared, async ({ page }, colleague) => {
      const fields = await openFields(page, 'T')
      await fields.getByLabel('Value', { exact: true }).fill('610')
      await line(colleague.page, 'T').locator('.line__pen', { hasText: 'EB' }).waitFor()
      await waitForSpeech(colleague.page, 'T', /610/)
      const theirs = await openFields(colleague.page, 'T')
      await theirs.getByText('Edda Brandt is writing in this line.').waitFor()
      expect(await theirs.getByLabel('Value', { exact: true }).isDisabled()).toBe(true)
      await page.getByLabel('Value', { exact: true }).press('Enter')
      await theirs.getByText('Edda Brandt is writing in this line.').waitFor({ state: 'detached' })
      await theirs.getByLabel('Value', { exact: true }).fill('620')
      await waitForSpeech(page, 'T', /620/)
    })
  })

  test('a pen whose holder has lost the connection is free', async () => {
    const shared = await newShared(office, 'solid-shaft')
    await together(shared, async ({ page }, colleague) => {
      await (await openFields(page, 'T')).getByLabel('Value', { exact: true }).fill('610')
      await line(colleague.page, 'T').locator('.line__pen', { hasText: 'EB' }).waitFor()
      office.cutFor('engineer')
      await line(colleague.page, 'T').locator('.line__pen').waitFor({ state: 'detached' })
      await writeField(colleague.page, 'T', 'Value', '630')
      office.joinFor('engineer')
      await waitForSpeech(page, 'T', /630/)
    })
  })
})

test('each sees the other’s initials and caret', async () => {
  const shared = await newShared(office)
  await together(shared, async ({ page }, colleague) => {
    await goToEnd(page)
    await page.keyboard.type('Here I stand.')
    await colleague.page.getByRole('list', { name: 'Also in this sheet' }).getByText('EB').waitFor()
    await page.getByRole('list', { name: 'Also in this sheet' }).getByText('CA').waitFor()
    await sheet(colleague.page).locator('.caret__initials', { hasText: 'EB' }).waitFor({ state: 'attached' })
  })
})

test('a reader sees what changes and has nothing to write with', async () => {
  const shared = await newShared(office, 'solid-shaft')
  await together(shared, async ({ page }) => {
    const client = await office.signIn('engineer')
    await client
      .post(`/api/calculations/${shared.calculation}/participations`)
      .send({ accountId: office.people.observer.id, part: 'observer' })
      .expect(201)
    const observer = await openShared(office, browser, 'observer', shared)
    await writeField(page, 'T', 'Value', '612')
    await waitForSpeech(observer.page, 'T', /612/)
    const { head } = await office.storedOf(shared.documentId)
    expect(await sheet(observer.page).getAttribute('contenteditable')).toBe('false')
    await line(observer.page, 'T').locator('.line__symbol-tex').click()
    await observer.page.keyboard.press('Enter')
    await observer.page.keyboard.press('Delete')
    await observer.page.keyboard.type('written by a reader')
    await observer.page.waitForTimeout(400)
    expect(await observer.page.locator('.fields').count()).toBe(0)
    expect((await office.storedOf(shared.documentId)).head).toBe(head)
    expectNoFaults(observer)
    await observer.close()
  })
})

test('rights taken away: the sheet closes to writing at once and says so', async () => {
  const shared = await newShared(office)
  await together(shared, async ({ page }, colleague) => {
    await goToEnd(colleague.page)
    await colleague.page.keyboard.type('While I may.')
    await sheet(page).getByText('While I may.').waitFor()
    const client = await office.signIn('engineer')
    const { body } = await client.get(`/api/calculations/${shared.calculation}`).expect(200)
    const part = (body.participations as { id: string; person: { id: string } }[]).find(
      ({ person }) => person.id === office.people.colleague.id,
    )
    await client.delete(`/api/calculations/${shared.calculation}/participations/${part?.id}`).expect(200)
    await colleague.page.getByText('You may read this sheet, and no longer write in it.').waitFor()
    expect(await sheet(colleague.page).getAttribute('contenteditable')).toBe('false')
    await page.keyboard.press('Control+End')
  })
})

test('opening, clicking and selecting by two people write nothing', async () => {
  const shared = await newShared(office, 'stepped-shaft-line')
  const { head } = await office.storedOf(shared.documentId)
  await together(shared, async (engineer, colleague) => {
    for (const { page } of [engineer, colleague]) {
      await page.locator('[data-line] .line__symbol-tex').nth(2).click()
      for (let press = 0; press < 8; press += 1) await page.keyboard.press('ArrowDown')
      await page.keyboard.press('Enter')
      await page.keyboard.press('Escape')
      await sheet(page).locator('> p').first().click()
      await page.keyboard.press('Shift+End')
      await page.keyboard.press('Control+End')
      await page.keyboard.press('Control+a')
    }
    await engineer.page.waitForTimeout(800)
  })
  expect((await office.storedOf(shared.documentId)).head).toBe(head)
})

test('undo takes back one’s own steps and leaves the colleague’s', async () => {
  const shared = await newShared(office, 'solid-shaft')
  await together(shared, async ({ page }, colleague) => {
    await waitForSpeech(page, 'T', /newton/)
    const before = (await spoken(page, 'T').textContent()) ?? ''
    await writeField(page, 'T', 'Value', '640')
    await waitForSpeech(colleague.page, 'T', /640/)
    await goToEnd(colleague.page)
    await colleague.page.keyboard.type(' Words of the colleague.')
    await sheet(page).getByText('Words of the colleague.').waitFor()
    await line(page, 'T').locator('.line__symbol-tex').click()
    await page.keyboard.press('Control+z')
    await waitForSpeech(colleague.page, 'T', new RegExp(`^${before}$`))
    await page.keyboard.press('Control+z')
    await page.waitForTimeout(300)
    for (const each of [page, colleague.page])
      await sheet(each).getByText('Words of the colleague.').waitFor()
    // Over a line that the colleague has changed since, undo goes without touching it, and says so.
    await writeField(page, 'T', 'Value', '650')
    await waitForSpeech(colleague.page, 'T', /650/)
    await writeField(colleague.page, 'T', 'Value', '660')
    await waitForSpeech(page, 'T', /660/)
    await page.keyboard.press('Control+z')
    await page.getByText(/colleague has changed/i).waitFor()
    await waitForSpeech(page, 'T', /660/)
  })
})

describe('large and crooked pastes', () => {
  const paste = async ({ page }: SheetPage, text: string, html?: string) => {
    await page.context().grantPermissions(['clipboard-read', 'clipboard-write'])
    await page.evaluate(
      `navigator.clipboard.write([new ClipboardItem({
        'text/plain': new Blob([${JSON.stringify(text)}], { type: 'text/plain' }),
        ${html === undefined ? '' : `'text/html': new Blob([${JSON.stringify(html)}], { type: 'text/html' }),`}
      })])`,
    )
    await page.keyboard.press('Control+v')
  }

  test('a novel is kept, and the colleague has it', async () => {
    const shared = await newShared(office)
    const sentence = 'It was a long shaft and a dark one, and nobody had verified it. '
    const novel = [...Array(400).keys()].map((page) => `Page ${page}. ${sentence.repeat(8)}`).join('\n\n')
    expect(novel.length).toBeGreaterThan(200_000)
    await together(shared, async (engineer, colleague) => {
      await goToEnd(engineer.page)
      await paste(engineer, novel)
      await sheet(engineer.page).getByText('Page 399.').waitFor()
      await isStored(engineer.page)
      await sheet(colleague.page).getByText('Page 399.').waitFor()
      expect(occurrences((await office.storedOf(shared.documentId)).page, 'Page 250.')).toBe(1)
      await goToEnd(colleague.page)
      await colleague.page.keyboard.type(' The end.')
      await sheet(engineer.page).getByText('The end.').waitFor()
    })
    expect(office.isRunning()).toBe(true)
  })

  test('a table with ragged rows becomes a table that both can read and write', async () => {
    const shared = await newShared(office)
    await together(shared, async (engineer, colleague) => {
      await goToEnd(engineer.page)
      await paste(
        engineer,
        'a\tb\tc\nd\ne\tf',
        '<table><tr><td>a1</td><td>b1</td><td>c1</td></tr><tr><td>d2</td></tr><tr><td>e3</td><td colspan="4">f3</td></tr></table>',
      )
      await isStored(engineer.page)
      for (const { page } of [engineer, colleague])
        for (const cell of ['a1', 'b1', 'c1', 'd2', 'e3', 'f3'])
          await sheet(page).locator('td', { hasText: cell }).first().waitFor()
      await sheet(colleague.page).locator('td', { hasText: 'd2' }).click()
      await colleague.page.keyboard.press('End')
      await colleague.page.keyboard.type(' written on')
      await sheet(engineer.page).getByText('d2 written on').waitFor()
    })
    expect(office.isRunning()).toBe(true)
  })
})
