import { existsSync } from 'node:fs'
import type { Browser, BrowserContext, Page } from 'playwright-core'
import { afterAll, beforeAll, describe, expect, test } from 'vitest'
import {
  axeFindings,
  launchChromium,
  openContext,
  overflowOf,
  picture,
  signIn,
  signInQuietly,
} from '../support/browser'
import { PASSWORD, startServer, type TestServer } from '../support/server'

let office: TestServer
let browser: Browser

beforeAll(async () => {
  if (!existsSync('dist/client/index.html'))
    throw new Error('The client is not built: run npm run build first.')
  office = await startServer()
  const engineer = await office.signIn('engineer')
  const project = await office.addProject(engineer)
  await office.addCalculation(engineer, {
    projectId: project.id,
    title: 'Main shaft between gearbox and runner, strength and twist under starting torque',
    dueOn: '2026-12-04',
  })
  browser = await launchChromium()
}, 120_000)

afterAll(async () => {
  await browser?.close()
  await office?.close()
})

/** A page of its own, signed in where a person is named; closed when `work` is done. */
const withPage = async (
  wishes: Parameters<typeof openContext>[2],
  person: 'engineer' | 'administrator' | 'observer' | null,
  work: (page: Page, context: BrowserContext) => Promise<void>,
) => {
  const context = await openContext(browser, office.url, wishes)
  const page = await context.newPage()
  try {
    if (person) await signInQuietly(page, office.url, office.people[person].email, PASSWORD)
    await work(page, context)
  } finally {
    await context.close()
  }
}

const visit = async (page: Page, path: string, heading: string) => {
  await page.goto(path)
  await page.getByRole('heading', { level: 1, name: heading }).waitFor()
  await page.waitForLoadState('networkidle')
}

const pages = [
  { path: '/', heading: 'In-tray' },
  { path: '/calculations', heading: 'Calculations' },
  { path: '/projects', heading: 'Projects' },
  { path: '/templates', heading: 'Templates' },
  { path: '/templates/solid-shaft', heading: '' },
  { path: '/people', heading: 'People' },
  { path: '/help', heading: 'Help' },
  { path: '/no/such/page', heading: 'No such page' },
]
const widths = [320, 390, 820, 1280, 1536]

/** In light and at night, without loading the page again. */
const expectAccessible = async (page: Page, where: string) => {
  for (const colorScheme of ['light', 'dark'] as const) {
    await page.emulateMedia({ colorScheme })
    await page.waitForFunction(
      (dark) => (document.documentElement.dataset.appearance === 'night') === dark,
      colorScheme === 'dark',
    )
    expect(await axeFindings(page), `${where}, ${colorScheme}`).toEqual([])
  }
  await page.emulateMedia({ colorScheme: 'light' })
}

test.each([1280, 390])(
  'axe finds nothing on any page, in light and at night, at %i px',
  async (width) => {
    await withPage({ width }, null, async (page) => {
      await visit(page, '/sign-in', 'Sign in')
      await expectAccessible(page, 'sign-in')
      await visit(page, '/set-password#a-link-that-was-never-made', 'Set your password')
      await expectAccessible(page, 'set-password')
      await signInQuietly(page, office.url, office.people.administrator.email, PASSWORD)
      for (const { path, heading } of pages) {
        await visit(page, path, heading)
        await expectAccessible(page, path)
        await picture(page, `${path.slice(1).replaceAll('/', '-') || 'in-tray'}-${width}`)
      }
    })
  },
  240_000,
)

test('no page is wider than its window, from 320 px up', async () => {
  await withPage({}, 'administrator', async (page) => {
    for (const { path, heading } of pages) {
      await visit(page, path, heading)
      for (const width of widths) {
        await page.setViewportSize({ width, height: 900 })
        expect(await overflowOf(page), `${path} at ${width} px`).toBe(0)
      }
    }
  })
}, 120_000)

describe('signing in', () => {
  test('needs no mouse, and leads to what was asked for', async () => {
    await withPage({}, null, async (page) => {
      await page.goto('/calculations')
      await page.getByRole('heading', { level: 1, name: 'Sign in' }).waitFor()
      await page.keyboard.press('Tab')
      expect(await page.evaluate('document.activeElement?.textContent')).toBe('Skip to the content')
      await page.keyboard.press('Tab')
      await page.keyboard.type(office.people.engineer.email)
      await page.keyboard.press('Tab')
      await page.keyboard.type(PASSWORD)
      await page.keyboard.press('Enter')
      await page.getByRole('heading', { level: 1, name: 'Calculations' }).waitFor()
      expect(await page.title()).toBe('Calculations – Torfolio')
    })
  })

  test('a refusal keeps the e-mail, empties the password and puts the caret there', async () => {
    await withPage({}, null, async (page) => {
      await page.goto('/sign-in')
      await page.getByLabel('E-mail').fill(office.people.engineer.email)
      await page.getByLabel('Password').fill('not this one')
      await page.keyboard.press('Enter')
      await page.getByRole('alert').filter({ hasText: /\S/ }).waitFor()
      expect(await page.getByLabel('E-mail').inputValue()).toBe(office.people.engineer.email)
      expect(await page.getByLabel('Password').inputValue()).toBe('')
      expect(await page.getByLabel('Password').evaluate((field) => field === document.activeElement)).toBe(
        true,
      )
    })
  })

  test('an address of another site as the way back is not followed', async () => {
    await withPage({}, null, async (page) => {
      await page.goto('/sign-in?next=//elsewhere.example/')
      await page.getByLabel('E-mail').fill(office.people.engineer.email)
      await page.getByLabel('Password').fill(PASSWORD)
      await page.keyboard.press('Enter')
      await page.getByRole('heading', { level: 1, name: 'In-tray' }).waitFor()
      expect(page.url()).toBe(`${office.url}/`)
    })
  })

  test('signing out leads back, and the page before asks to sign in again', async () => {
    await withPage({}, null, async (page) => {
      await signIn(page, office.people.engineer.email, PASSWORD)
      await page.getByRole('button', { name: /signing out/ }).click()
      await page.getByRole('button', { name: 'Sign out' }).click()
      await page.getByRole('heading', { level: 1, name: 'Sign in' }).waitFor()
      await page.goto('/people')
      await page.getByRole('heading', { level: 1, name: 'Sign in' }).waitFor()
    })
  })
})

test('going to another page moves the focus to its heading and names it in the window', async () => {
  await withPage({}, 'engineer', async (page) => {
    await visit(page, '/', 'In-tray')
    await page.getByRole('navigation', { name: 'Places' }).getByRole('link', { name: 'Templates' }).click()
    await page.getByRole('heading', { level: 1, name: 'Templates' }).waitFor()
    await expect.poll(() => page.evaluate('document.activeElement?.textContent?.trim()')).toBe('Templates')
    expect(await page.title()).toBe('Templates – Torfolio')
  })
})

test('an administrator adds a person, who sets a password by the link and signs in', async () => {
  let link = ''
  await withPage({}, 'administrator', async (page) => {
    await visit(page, '/people', 'People')
    await page.getByRole('button', { name: 'Add a person' }).click()
    await page.getByLabel('Name').fill('Nils Aune')
    await page.getByLabel('E-mail').fill('nils.aune@first.test')
    await page.getByRole('button', { name: 'Add the person' }).click()
    await page.getByRole('heading', { name: 'Nils Aune is added' }).waitFor()
    link = (await page.locator('.link__address').textContent()) ?? ''
    await page.getByRole('button', { name: 'Done' }).click()
    await page.getByRole('cell', { name: 'link not used yet' }).waitFor()
  })
  await withPage({ width: 390 }, null, async (page) => {
    await page.goto(link)
    await page.getByText('nils.aune@first.test').waitFor()
    await page.getByRole('textbox', { name: 'Password' }).fill('quiet harbour at dawn')
    await page.getByLabel('Once more').fill('quiet harbour at dusk')
    await page.getByRole('button', { name: 'Set password' }).click()
    await page.getByText('The two do not agree.').waitFor()
    await page.getByLabel('Once more').fill('quiet harbour at dawn')
    await page.getByRole('button', { name: 'Set password' }).click()
    await page.getByRole('heading', { level: 1, name: 'Sign in' }).waitFor()
    await signIn(page, 'nils.aune@first.test', 'quiet harbour at dawn')
  })
}, 60_000)

test('an observer is told why there is no list of people', async () => {
  await withPage({}, 'observer', async (page) => {
    await visit(page, '/people', 'People')
    await page.getByText('Observers do not see the list of people.').waitFor()
    expect(await page.getByRole('link', { name: 'People' }).count()).toBe(0)
  })
})

test('a template computes its criteria while it is filled in, and makes a calculation', async () => {
  await withPage({}, 'engineer', async (page) => {
    await visit(page, '/templates/solid-shaft', '')
    const governing = page.getByRole('status').filter({ hasText: /governs: .*, (not )?satisfied/ })
    await governing.waitFor()
    const before = await governing.textContent()
    await page
      .getByLabel(/diameter/i)
      .first()
      .fill('12')
    await expect.poll(() => governing.textContent()).not.toBe(before)
    await page.getByRole('combobox', { name: 'Project' }).fill('P-')
    await page.keyboard.press('ArrowDown')
    await page.keyboard.press('Enter')
    await page.getByRole('textbox', { name: 'Title' }).fill('Pump shaft')
    await page.getByRole('button', { name: 'Begin the calculation' }).click()
    await page.waitForURL(/\/calculations\/[0-9a-f-]{36}$/)
    await page.getByRole('heading', { level: 1, name: 'Pump shaft' }).waitFor()
  })
}, 60_000)

test('the appearance that one chooses is kept on the device', async () => {
  await withPage({ appearance: 'light' }, 'engineer', async (page) => {
    await visit(page, '/', 'In-tray')
    await page.getByRole('button', { name: /signing out/ }).click()
    await page.getByRole('radio', { name: 'Night' }).check()
    await expect.poll(() => page.evaluate('document.documentElement.dataset.appearance')).toBe('night')
    await page.reload()
    await page.getByRole('heading', { level: 1, name: 'In-tray' }).waitFor()
    expect(await page.evaluate('document.documentElement.dataset.appearance')).toBe('night')
  })
})
