/**
 * Takes the pictures of the README from a running demo: `npm run pictures`, with the demo freshly seeded
 * (`TORFOLIO_DATA=/tmp/pictures npm start`). Not a test; what it shows, the browser tests check.
 */
import { execFileSync } from 'node:child_process'
import { copyFileSync, mkdtempSync, writeFileSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { calculationList } from '@shared/api/calculations'
import { launchChromium } from '../support/browser'

const address = process.env['TORFOLIO_ADDRESS'] ?? 'http://127.0.0.1:4180'
const folder = 'docs/pictures'

const browser = await launchChromium()
const context = await browser.newContext({ viewport: { width: 1280, height: 800 }, colorScheme: 'light' })
const page = await context.newPage()
// Over the sheet, so that the wheel scrolls it.
await page.mouse.move(760, 620)
const picture = (name: string) => page.screenshot({ path: `${folder}/${name}.png` })
/** Values come by themselves; nothing on the page says that the last one has come. */
const settle = () => page.waitForTimeout(2500)
const scrollTo = async (top: number): Promise<void> => {
  await page.evaluate((y) => window.scrollTo(0, y), top)
  await settle()
}

await page.goto(address)
await page.getByRole('button', { name: /Lena Brandt/ }).waitFor()
await picture('sign-in')
await page.getByRole('button', { name: /Lena Brandt/ }).click()
await settle()
await picture('in-tray')

const answer = await context.request.get(`${address}/api/calculations`)
const { calculations } = calculationList.parse(await answer.json())
const open = async (title: string) => {
  const found = calculations.find((calculation) => calculation.title.startsWith(title))
  if (!found) throw new Error(`The demo has no calculation ${title}`)
  await page.goto(`${address}/calculations/${found.id}`)
  await settle()
  return found
}

const hoist = await open('Gate hoist cross shaft')
await scrollTo(420)
await picture('sheet')
// Lines are drawn as they come into view.
await page.getByText('cross shaft, fixed at the gearbox').scrollIntoViewIfNeeded()
await settle()
await page.getByText('Show values').first().scrollIntoViewIfNeeded()
await page.mouse.wheel(0, -330)
await settle()
await picture('analysis')

await open('Test rig torsion bar')
await page.getByText('power of the actuator').first().waitFor({ timeout: 60_000 })
await scrollTo(700)
await picture('problem')

await page.goto(`${address}/templates/stepped-shaft-line`)
await settle()
await picture('template')

const pages = await context.request.get(`${address}/api/revisions/${hoist.revision.id}/pages.pdf`)
const work = mkdtempSync(join(tmpdir(), 'torfolio-pictures-'))
writeFileSync(join(work, 'pages.pdf'), await pages.body())
execFileSync('pdftoppm', [
  '-r',
  '80',
  '-png',
  '-f',
  '4',
  '-l',
  '4',
  '-singlefile',
  join(work, 'pages.pdf'),
  join(work, 'page'),
])
copyFileSync(join(work, 'page.png'), join(folder, 'print.png'))
await browser.close()
