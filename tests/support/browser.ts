/** A browser for tests: Debian's Chromium, driven by playwright-core. */
import { mkdir, readFile } from 'node:fs/promises'
import { createRequire } from 'node:module'
import type { AxeResults } from 'axe-core'
import { chromium, type Browser, type BrowserContext, type Page } from 'playwright-core'

export const executablePath = '/usr/bin/chromium'

export const launchChromium = (): Promise<Browser> =>
  chromium.launch({
    executablePath,
    args: [
      '--no-sandbox',
      '--disable-gpu',
      '--disable-quic',
      '--no-first-run',
      '--disable-background-networking',
      '--disable-component-update',
      '--disable-sync',
    ],
  })

export interface ContextWishes {
  width?: number
  height?: number
  appearance?: 'light' | 'night'
  reducedMotion?: boolean
}

/** A fresh profile at `baseURL`. The page's policy is bypassed, as axe is injected into it. */
export const openContext = (
  browser: Browser,
  baseURL: string,
  wishes: ContextWishes = {},
): Promise<BrowserContext> =>
  browser.newContext({
    baseURL,
    bypassCSP: true,
    locale: 'en-GB',
    timezoneId: 'UTC',
    viewport: { width: wishes.width ?? 1280, height: wishes.height ?? 900 },
    colorScheme: wishes.appearance === 'night' ? 'dark' : 'light',
    reducedMotion: wishes.reducedMotion === false ? 'no-preference' : 'reduce',
  })

/** Signs in by the page, as a person does, and waits for the in-tray. */
export const signIn = async (page: Page, email: string, password: string): Promise<void> => {
  await page.goto('/sign-in')
  await page.getByLabel('E-mail').fill(email)
  await page.getByLabel('Password').fill(password)
  await page.getByRole('button', { name: 'Sign in', exact: true }).click()
  await page.getByRole('heading', { level: 1, name: 'In-tray' }).waitFor()
}

/** Signs in by the request alone, as a page of `origin` would: for tests that are about something else. */
export const signInQuietly = async (
  page: Page,
  origin: string,
  email: string,
  password: string,
): Promise<void> => {
  const answer = await page.request.post('/api/session', {
    headers: { Origin: origin },
    data: { email, password },
  })
  if (!answer.ok()) throw new Error(`Sign-in of ${email} was answered with ${answer.status()}`)
}

const axeSource = readFile(createRequire(import.meta.url).resolve('axe-core/axe.min.js'), 'utf8')

/** What axe finds on the page (WCAG 2.2 A and AA), one line each: rule, what it means, and where. */
export const axeFindings = async (page: Page): Promise<string[]> => {
  if (!(await page.evaluate('"axe" in window'))) await page.addScriptTag({ content: await axeSource })
  const results = await page.evaluate<AxeResults>(
    `axe.run(document, { runOnly: ['wcag2a', 'wcag2aa', 'wcag21a', 'wcag21aa', 'wcag22aa', 'best-practice'] })`,
  )
  return results.violations.flatMap(({ id, help, nodes }) =>
    nodes.map((node) => `${id}: ${help} (${node.target.join(' ')}) ${node.failureSummary ?? ''}`),
  )
}

/** How far the page reaches beyond the window to the right, in px; 0 where it fits. */
export const overflowOf = (page: Page): Promise<number> =>
  page.evaluate<number>(
    'Math.max(0, document.documentElement.scrollWidth - document.documentElement.clientWidth)',
  )

/** A picture of the page for people, in `.artefacts/`. */
export const picture = async (page: Page, name: string, fullPage = true): Promise<void> => {
  await mkdir('.artefacts', { recursive: true })
  await page.screenshot({ path: `.artefacts/${name}.png`, fullPage })
}
