import { existsSync } from 'node:fs'
import type { Browser } from 'playwright-core'
import { afterAll, beforeAll, expect, test } from 'vitest'
import { launchChromium, openContext, picture, signInQuietly } from '../support/browser'
import { PASSWORD } from '../support/server'
import { startServerProcess, type ServerProcess } from '../support/serverProcess'
import { openShared, share } from '../support/sharedSheet'
import {
  expectNoFaults,
  goToEnd,
  isStored,
  line,
  openFields,
  proseOf,
  sentences,
  sheet,
  typeLine,
  until,
  waitForSpeech,
  writeField,
  type SheetPage,
} from '../support/sheetPage'

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

test('one writes a calculation from a template and changes it while a colleague edits the same sheet; it is printed', async () => {
  await office.addProject(await office.signIn('engineer'))
  const context = await openContext(browser, office.addressOf('engineer'))
  const page = await context.newPage()
  page.setDefaultTimeout(20_000)
  const faults: string[] = []
  page.on('pageerror', (error) => faults.push(String(error.stack ?? error)))
  const engineer: SheetPage = { page, person: 'engineer', faults, close: () => context.close() }
  await signInQuietly(page, office.addressOf('engineer'), office.people.engineer.email, PASSWORD)

  // From the template's form, with another torque than the template's.
  await page.goto('/templates/stepped-shaft-line')
  await page
    .getByLabel(/T_2|T₂/)
    .first()
    .fill('450')
  await page.getByRole('combobox', { name: 'Project' }).click()
  await page.getByRole('option').first().click()
  await page.getByRole('textbox', { name: 'Title' }).fill('Mill drive, output shaft')
  await page.getByRole('button', { name: 'Begin the calculation' }).click()
  await page.waitForURL(/\/calculations\//)
  await isStored(page)
  await waitForSpeech(page, 'T_2', /450 newton/)
  const calculation = /calculations\/([0-9a-f-]+)/.exec(page.url())?.[1] ?? ''
  const shared = await share(office, calculation)
  const colleague = await openShared(office, browser, 'colleague', shared)

  // Each sees the other, and the pen of a line that is written in.
  await page.getByRole('list', { name: 'Also in this sheet' }).getByText('CA').waitFor()
  const fields = await openFields(page, 'd_1')
  await fields.getByLabel('Value', { exact: true }).fill('55')
  await line(colleague.page, 'd_1').scrollIntoViewIfNeeded()
  await line(colleague.page, 'd_1').locator('.line__pen', { hasText: 'EB' }).waitFor()
  await waitForSpeech(colleague.page, 'd_1', /55 mill/)

  // Both at once: the colleague another line and the text, the engineer this line and new ones.
  await writeField(colleague.page, 'L_3', 'Value', '180')
  await goToEnd(colleague.page)
  await colleague.page.keyboard.type(' Checked against the drawing.')
  await fields.getByLabel('Value', { exact: true }).press('Enter')
  await page.keyboard.press('Control+End')
  await page.keyboard.press('Enter')
  await typeLine(page, 'u_1 = tau_nom/tau_allow -- share of the allowable stress')
  await waitForSpeech(page, 'u_1', /equals/)
  for (const each of [page, colleague.page]) {
    await waitForSpeech(each, 'd_1', /55 mill/)
    await waitForSpeech(each, 'L_3', /180 mill/)
    await waitForSpeech(each, 'u_1', /equals/)
    await sheet(each).getByText('Checked against the drawing.').waitFor()
    await isStored(each)
  }
  await until(
    async () =>
      (await sentences(page)).join('\n') === (await sentences(colleague.page)).join('\n') &&
      (await proseOf(page)) === (await proseOf(colleague.page)),
    'the same on both screens',
    40_000,
  )
  await picture(page, 'main-job')

  const address = await page.getByRole('link', { name: 'Print' }).getAttribute('href')
  const pages = await page.request.get(address ?? '')
  expect(pages.status()).toBe(200)
  expect((await pages.body()).subarray(0, 4).toString()).toBe('%PDF')
  expectNoFaults(engineer, colleague)
  await colleague.close()
  await engineer.close()
}, 180_000)
