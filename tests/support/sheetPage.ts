/** A sheet in a browser, as a person has it before them: what they see of it and what they do in it. */
import { expect } from 'vitest'
import type { Browser, Locator, Page } from 'playwright-core'
import { openContext, signInQuietly, type ContextWishes } from './browser'
import { PASSWORD, type Clients, type PersonName } from './server'

export interface SheetPage {
  page: Page
  person: PersonName
  /** Uncaught faults of the page; none is expected, ever. */
  faults: string[]
  close(): Promise<void>
}

/** Opens the sheet of a calculation for a person in a profile of their own, and waits until it is read. */
export const openSheetPage = async (
  browser: Browser,
  { people }: Pick<Clients, 'people'>,
  where: { person: PersonName; address: string; calculation: string },
  wishes: ContextWishes = {},
): Promise<SheetPage> => {
  const context = await openContext(browser, where.address, wishes)
  const page = await context.newPage()
  page.setDefaultTimeout(20_000)
  const faults: string[] = []
  page.on('pageerror', (error) => faults.push(String(error.stack ?? error)))
  await signInQuietly(page, where.address, people[where.person].email, PASSWORD)
  await page.goto(`/calculations/${where.calculation}`)
  await isStored(page)
  return { page, person: where.person, faults, close: () => context.close() }
}

export const expectNoFaults = (...pages: SheetPage[]): void => {
  for (const { person, faults } of pages) expect({ person, faults }).toEqual({ person, faults: [] })
}

export const statusOf = (page: Page): Locator => page.locator('.status').first()
export const isStored = (page: Page): Promise<void> =>
  statusOf(page)
    .filter({ hasText: /^stored/ })
    .waitFor()
export const isOffline = (page: Page): Promise<void> =>
  statusOf(page).filter({ hasText: 'offline' }).waitFor()

export const sheet = (page: Page): Locator => page.getByRole('document', { name: 'Sheet' })
/** A line by its symbol. */
export const line = (page: Page, symbol: string): Locator =>
  page.locator(`[role="group"][aria-label$=" ${symbol}"]`)

/** What a screen reader is told of a line: symbol, meaning and value in words. */
export const spoken = (page: Page, symbol: string): Locator => line(page, symbol).locator('.spoken').first()
/** Lines are typeset where they are in view, so the line is brought there. */
export const waitForSpeech = async (page: Page, symbol: string, words: RegExp): Promise<void> => {
  await line(page, symbol).scrollIntoViewIfNeeded()
  await spoken(page, symbol).filter({ hasText: words }).waitFor({ state: 'attached' })
}

/** The spoken sentences of all lines, in reading order: what both screens must agree upon. */
export const sentences = async (page: Page): Promise<string[]> => {
  const found: string[] = []
  for (const each of await page.locator('[data-line]').all()) {
    await each.scrollIntoViewIfNeeded()
    found.push((await each.locator('.spoken').first().textContent()) ?? '')
  }
  return found
}

/** The sheet's text without carets of colleagues. */
export const proseOf = (page: Page): Promise<string> =>
  page.evaluate<string>(
    `[...document.querySelectorAll('.page > p, .page > h1, .page > h2, .page > h3')]
      .map((block) => { const copy = block.cloneNode(true); copy.querySelectorAll('.caret').forEach((one) => one.remove()); return copy.textContent.replaceAll('\\u2060', '') })
      .join('\\n')`,
  )

export const typeLine = async (page: Page, text: string): Promise<void> => {
  await page.keyboard.type(text)
  await page.keyboard.press('Enter')
}
/** Puts the caret into the last paragraph. */
export const goToEnd = async (page: Page): Promise<void> => {
  await sheet(page).locator('> p').last().click()
  await page.keyboard.press('End')
}

/** Selects a line and opens its fields. */
export const openFields = async (page: Page, symbol: string): Promise<Locator> => {
  await line(page, symbol).locator('.line__symbol-tex').click()
  await page.keyboard.press('Enter')
  const fields = line(page, symbol).locator('.fields')
  await fields.waitFor()
  return fields
}
/** Writes one field of a line and leaves it. */
export const writeField = async (page: Page, symbol: string, label: string, text: string): Promise<void> => {
  const fields = await openFields(page, symbol)
  await fields.getByLabel(label, { exact: true }).fill(text)
  await page.keyboard.press('Enter')
  await fields.waitFor({ state: 'detached' })
}

/** Waits for something to become true of pages. */
export const until = async (isSo: () => Promise<boolean>, what: string, withinMs = 20_000): Promise<void> => {
  const end = Date.now() + withinMs
  while (!(await isSo())) {
    if (Date.now() > end) throw new Error(`Waited in vain: ${what}`)
    await new Promise((resolve) => setTimeout(resolve, 40))
  }
}
