import { existsSync } from 'node:fs'
import type { Browser, Page } from 'playwright-core'
import { afterAll, beforeAll, describe, expect, test, vi } from 'vitest'
import {
  axeFindings,
  launchChromium,
  openContext,
  overflowOf,
  picture,
  signInQuietly,
} from '../support/browser'
import { PASSWORD, startServer, type PersonName, type TestServer } from '../support/server'

// A browser, a server and a database share two cores here.
vi.setConfig({ testTimeout: 120_000 })

let office: TestServer
let browser: Browser

beforeAll(async () => {
  if (!existsSync('dist/client/index.html'))
    throw new Error('The client is not built: run npm run build first.')
  office = await startServer()
  browser = await launchChromium()
}, 120_000)

afterAll(async () => {
  await browser?.close()
  await office?.close()
})

const newCalculation = async (wanted: Parameters<TestServer['addCalculation']>[1] = {}) =>
  (await office.addCalculation(await office.signIn('engineer'), wanted)).id

/** The sheet of a calculation on a page of its own, open and read; closed when `work` is done. */
const withSheet = async (
  calculation: string,
  work: (page: Page) => Promise<void>,
  { person = 'engineer', ...wishes }: Parameters<typeof openContext>[2] & { person?: PersonName } = {},
) => {
  const context = await openContext(browser, office.url, wishes)
  const page = await context.newPage()
  const faults: string[] = []
  page.on('pageerror', (error) => faults.push(String(error.stack ?? error)))
  try {
    await signInQuietly(page, office.url, office.people[person].email, PASSWORD)
    await page.goto(`/calculations/${calculation}`)
    await page.getByText(/^stored/).waitFor()
    await work(page)
    expect(faults).toEqual([])
  } finally {
    await context.close()
  }
}

const sheet = (page: Page) => page.getByRole('document', { name: 'Sheet' })
const line = (page: Page, symbol: string) => page.locator(`[role="group"][aria-label$=" ${symbol}"]`)
const select = (page: Page, symbol: string) => line(page, symbol).locator('.line__symbol-tex').click()
const typeLine = async (page: Page, text: string) => {
  await page.keyboard.type(text)
  await page.keyboard.press('Enter')
}
const focusPage = async (page: Page) => {
  await sheet(page).locator('> p').last().click()
}
const stored = (page: Page) => page.getByText(/^stored/).waitFor()
const spoken = (page: Page, symbol: string) => line(page, symbol).locator('.spoken').first()
const waitForSpeech = (page: Page, symbol: string, words: RegExp) =>
  spoken(page, symbol).filter({ hasText: words }).waitFor({ state: 'attached' })

/** A round shaft, its stress and its verdict, as one types them on paper. */
const typeShaft = async (page: Page) => {
  await focusPage(page)
  await typeLine(page, 'd = 40 mm -- outside diameter')
  await typeLine(page, 'T = 500 N m')
  await typeLine(page, 'tau = 16*T/(pi*d^3) to MPa -- surface shear stress')
  await typeLine(page, 'tau <= 60 MPa -- shear strength')
}

describe('an empty sheet', () => {
  test('lines typed as on paper become a given, a formula and a criterion with its verdict', async () => {
    await withSheet(await newCalculation(), async (page) => {
      await typeShaft(page)
      await waitForSpeech(page, 'tau', /39\.8 megapascal/)
      await line(page, 'C1').getByText('satisfied', { exact: true }).waitFor()
      await page.getByText('Made a criterion.').waitFor()
      await stored(page)
    })
  })

  test('what was typed is there after opening the sheet again', async () => {
    const calculation = await newCalculation()
    await withSheet(calculation, async (page) => {
      await typeShaft(page)
      await waitForSpeech(page, 'tau', /39\.8/)
      await stored(page)
    })
    await withSheet(calculation, async (page) => {
      await waitForSpeech(page, 'tau', /39\.8 megapascal/)
      expect(await page.locator('[data-line]').count()).toBe(4)
    })
  })

  test('a line can be kept as text, and ordinary text with an equals sign stays text', async () => {
    await withSheet(await newCalculation(), async (page) => {
      await focusPage(page)
      await typeLine(page, 'd = 40 mm')
      await page.getByRole('button', { name: 'Keep as text' }).click()
      await sheet(page).getByText('d = 40 mm').waitFor()
      expect(await page.locator('[data-line]').count()).toBe(0)
      await page.keyboard.press('Control+End')
      await typeLine(page, 'Two torques are equal = opposite, says the drawing.')
      expect(await page.locator('[data-line]').count()).toBe(0)
    })
  })

  test('the examples are lines to press', async () => {
    await withSheet(await newCalculation(), async (page) => {
      for (const example of ['d = 40 mm', 'T = 500 N m', 'tau = 16*T/(pi*d^3) to MPa', 'tau <= 60 MPa']) {
        await page.getByRole('button', { name: example, exact: true }).click()
      }
      await line(page, 'C1').getByText('satisfied', { exact: true }).waitFor()
    })
  })
})

describe('lines', () => {
  test('a changed given changes what depends on it, and undo brings it back', async () => {
    await withSheet(await newCalculation(), async (page) => {
      await typeShaft(page)
      await waitForSpeech(page, 'tau', /39\.8/)
      await select(page, 'd')
      await page.keyboard.press('Enter')
      await page.getByLabel('Value', { exact: true }).fill('30')
      await page.keyboard.press('Enter')
      await waitForSpeech(page, 'tau', /94\.3 megapascal/)
      await line(page, 'C1').getByText('not satisfied', { exact: true }).waitFor()
      await page.keyboard.press('Control+z')
      await waitForSpeech(page, 'tau', /39\.8/)
    })
  })

  test('everything is done by the keyboard: select, open, leave, move, copy, paste, delete, undo', async () => {
    await withSheet(await newCalculation(), async (page) => {
      await typeShaft(page)
      await waitForSpeech(page, 'tau', /39\.8/)
      await page.keyboard.press('ArrowUp')
      await page.keyboard.press('ArrowUp')
      const selected = page.locator('.line--selected')
      expect(await selected.getAttribute('aria-label')).toContain('tau')
      await page.keyboard.press('x')
      expect(await page.locator('[data-line]').count()).toBe(4)
      await page.keyboard.press('F2')
      await page.getByLabel('Expression').waitFor()
      await page.keyboard.press('Escape')
      await page.keyboard.press('Alt+Shift+ArrowUp')
      await page
        .locator('[data-line]')
        .nth(1)
        .filter({ has: page.locator('.spoken', { hasText: 'tau' }) })
        .waitFor()
      await page.keyboard.press('Delete')
      await page.getByText('Line deleted; 1 line used it.').waitFor()
      expect(await page.locator('[data-line]').count()).toBe(3)
      await page.keyboard.press('Control+z')
      await waitForSpeech(page, 'tau', /39\.8/)
    })
  })

  test('a line that is pasted where its symbol stands gets the next free one', async () => {
    const calculation = await newCalculation()
    await withSheet(calculation, async (page) => {
      await page.context().grantPermissions(['clipboard-read', 'clipboard-write'])
      await typeShaft(page)
      await select(page, 'd')
      await page.keyboard.press('Control+c')
      await page.keyboard.press('Control+v')
      await line(page, 'd_2').waitFor()
      expect(await page.getByLabel('Symbol').inputValue()).toBe('d_2')
    })
  })

  test('what cannot be read stays in its field with the problem beneath', async () => {
    await withSheet(await newCalculation(), async (page) => {
      await typeShaft(page)
      await select(page, 'tau')
      await page.keyboard.press('Enter')
      await page.getByLabel('Expression').fill('16*T/(pi*d^3)+')
      await page.locator('.fields').getByText('A value is missing after +.').waitFor()
      await page.keyboard.press('Escape')
      await line(page, 'tau').getByText('A value is missing after +.').waitFor()
      await page
        .getByRole('button', { name: 'Problems (1)' })
        .or(page.getByRole('button', { name: /Problems \(/ }))
        .first()
        .waitFor()
    })
  })

  test('Tab leaves the sheet in three presses or fewer', async () => {
    await withSheet(await newCalculation(), async (page) => {
      await typeShaft(page)
      await select(page, 'T')
      let presses = 0
      do {
        await page.keyboard.press('Tab')
        presses += 1
      } while (presses < 8 && (await page.evaluate(`document.activeElement?.closest('.page') !== null`)))
      expect(presses).toBeLessThanOrEqual(3)
    })
  })
})

test('a section analysis is chosen, filled in and used by another line', async () => {
  await withSheet(await newCalculation(), async (page) => {
    await focusPage(page)
    await typeLine(page, 'd = 40 mm')
    await page.keyboard.press('Control+Enter')
    await page.getByRole('menu', { name: 'Commands' }).waitFor()
    await page.keyboard.press('a')
    await page.getByRole('button', { name: /^Section/ }).click()
    await page.getByLabel('Shape').selectOption('solid-round')
    await page.getByLabel(/Outside diameter/).fill('d')
    await line(page, 'S1').getByText('S1.J', { exact: true }).waitFor()
    await page.getByRole('button', { name: 'Done' }).click()
    await line(page, 'S1').getByRole('img').waitFor()
    await picture(page, 'sheet-analysis-1280-light')
  })
})

test('opening, clicking, selecting and reading write nothing', async () => {
  const calculation = await newCalculation({
    beginning: { kind: 'template', template: 'solid-shaft', givens: {} },
  })
  const headOf = async () => {
    const client = await office.signIn('engineer')
    const { body: found } = await client.get(`/api/calculations/${calculation}`).expect(200)
    const { body } = await client.get(`/api/revisions/${found.revisions[0].id}`).expect(200)
    return body.document.head as number
  }
  const before = await headOf()
  await withSheet(calculation, async (page) => {
    await page.locator('[data-line] .line__symbol-tex').first().click()
    for (let press = 0; press < 12; press += 1) await page.keyboard.press('ArrowDown')
    await page.keyboard.press('Enter')
    await page.keyboard.press('Escape')
    await sheet(page).locator('> p').first().click()
    await page.keyboard.press('Control+End')
    await page.waitForTimeout(1200)
  })
  expect(await headOf()).toBe(before)
})

test('somebody who may only read gets the sheet without anything to write with', async () => {
  const calculation = await newCalculation({
    beginning: { kind: 'template', template: 'solid-shaft', givens: {} },
  })
  await withSheet(
    calculation,
    async (page) => {
      await page.locator('[data-line]').first().waitFor()
      expect(await page.getByRole('button', { name: 'Edit', exact: true }).count()).toBe(0)
      expect(await sheet(page).getAttribute('contenteditable')).toBe('false')
    },
    { person: 'administrator' },
  )
})

describe.each(['light', 'night'] as const)('a sheet from a template, %s', (appearance) => {
  test.each([390, 820, 1280, 1536])(
    'at %i px: axe finds nothing and nothing reaches beyond the window',
    async (width) => {
      const calculation = await newCalculation({
        beginning: { kind: 'template', template: 'solid-shaft', givens: {} },
      })
      await withSheet(
        calculation,
        async (page) => {
          await page.locator('[data-line]').first().scrollIntoViewIfNeeded()
          await page.locator('.line__result .katex').first().waitFor()
          await page.waitForTimeout(400)
          expect(await axeFindings(page)).toEqual([])
          expect(await overflowOf(page)).toBe(0)
          await picture(page, `sheet-${width}-${appearance}`, false)
          await page.locator('[data-line] .line__symbol-tex').first().click()
          await page.keyboard.press('Enter')
          await page.locator('.fields').waitFor()
          expect(await axeFindings(page)).toEqual([])
          expect(await overflowOf(page)).toBe(0)
          await picture(page, `sheet-fields-${width}-${appearance}`, false)
        },
        { width, appearance },
      )
    },
  )
})

describe('text', () => {
  const bar = (page: Page) => page.getByRole('toolbar', { name: 'Text' })

  test('headings, emphasis, lists and a table are made with the keyboard and the bar, and stay', async () => {
    const calculation = await newCalculation()
    await withSheet(calculation, async (page) => {
      await focusPage(page)
      await page.keyboard.type('The shaft of the hoist')
      await page.keyboard.press('Control+Enter')
      await page.keyboard.press('1')
      await sheet(page).getByRole('heading', { level: 1, name: 'The shaft of the hoist' }).waitFor()
      await page.keyboard.press('End')
      await page.keyboard.press('Enter')
      await page.keyboard.press('Control+b')
      await page.keyboard.type('Two')
      await page.keyboard.press('Control+b')
      await page.keyboard.type(' parts:')
      await page.keyboard.press('Enter')
      await bar(page).getByRole('button', { name: 'Bullets' }).click()
      await page.keyboard.type('thick')
      await page.keyboard.press('Enter')
      await page.keyboard.type('thin')
      await page.keyboard.press('Enter')
      await page.keyboard.press('Enter')
      await bar(page).getByRole('button', { name: 'Table', exact: true }).click()
      await page.keyboard.type('Part')
      await page.keyboard.press('ArrowRight')
      await page.keyboard.type('Diameter')
      await page.keyboard.press('Enter')
      await page.keyboard.type('60 mm')
      await bar(page).getByRole('button', { name: 'Rows and columns' }).click()
      await page.getByText('Column after').click()
      await page.waitForFunction('document.querySelectorAll(".page table tr:first-child > *").length === 4')
      await page.keyboard.type('h6')
      // A head without words is the author's to fill; the page itself has none of its own.
      for (const words of ['Fit', 'Note']) {
        await sheet(page)
          .locator('th')
          .nth(words === 'Fit' ? 2 : 3)
          .click()
        await page.keyboard.type(words)
      }
      expect(await axeFindings(page)).toEqual([])
      await picture(page, 'text')
      await stored(page)
    })
    await withSheet(calculation, async (page) => {
      expect(await sheet(page).locator('strong').innerText()).toBe('Two')
      expect(await sheet(page).locator('li').allInnerTexts()).toEqual(['thick', 'thin'])
      expect(await sheet(page).locator('th').allInnerTexts()).toEqual(['Part', 'Diameter', 'Fit', 'Note'])
      await sheet(page).getByText('60 mm').waitFor()
    })
  })

  test('a link leads to http, https or mailto; anything else is refused with the reason', async () => {
    await withSheet(await newCalculation(), async (page) => {
      await focusPage(page)
      await page.keyboard.type('maker')
      await page.keyboard.press('Shift+Home')
      await page.keyboard.press('Control+k')
      await page.getByLabel('Address').fill('javascript:alert(1)')
      await page.keyboard.press('Enter')
      await page.getByText(/this one begins with “javascript:”/).waitFor()
      expect(await sheet(page).locator('a').count()).toBe(0)
      await page.getByLabel('Address').fill('example.com/shaft')
      await page.keyboard.press('Enter')
      await sheet(page).locator('a[href="https://example.com/shaft"]', { hasText: 'maker' }).waitFor()
      await sheet(page).locator('a').click()
      await page.keyboard.press('Control+k')
      await page.getByRole('button', { name: 'Remove link' }).click()
      await sheet(page).locator('a').waitFor({ state: 'detached' })
      await sheet(page).getByText('maker').waitFor()
    })
  })

  test('on a phone the bar stands at the foot while text is written, and nothing overflows', async () => {
    await withSheet(
      await newCalculation(),
      async (page) => {
        expect(await bar(page).isVisible()).toBe(false)
        await focusPage(page)
        await page.keyboard.type('The shaft')
        await bar(page).waitFor()
        expect(await overflowOf(page)).toBe(0)
      },
      { width: 390, height: 844 },
    )
  })
})

describe('the title block', () => {
  test('who prepares changes title and due day where they stand; an empty title is refused', async () => {
    await withSheet(await newCalculation(), async (page) => {
      await page.getByRole('button', { name: 'Edit title and due day' }).click()
      await page.getByLabel('Title', { exact: true }).fill('')
      await page.keyboard.press('Enter')
      await page.getByText('A calculation needs a title').waitFor()
      await page.getByLabel('Title', { exact: true }).fill('Hoist shaft, strength')
      await page.getByLabel(/^Due/).fill('2031-03-14')
      await page.getByRole('button', { name: 'Keep' }).click()
      await page.getByRole('heading', { level: 1, name: /Hoist shaft, strength/ }).waitFor()
      await page.getByText('14 March 2031').waitFor()
    })
  })

  test('a reader sees the title block and the text without tools to change them', async () => {
    await withSheet(
      await newCalculation(),
      async (page) => {
        expect(await page.getByRole('button', { name: 'Edit title and due day' }).count()).toBe(0)
        expect(await page.getByRole('toolbar', { name: 'Text' }).count()).toBe(0)
      },
      { person: 'steward' },
    )
  })
})

test('the form of an analysis begins with its sketch and numbered marks, and the first field in focus', async () => {
  await withSheet(await newCalculation(), async (page) => {
    await focusPage(page)
    await page.keyboard.press('Control+Enter')
    await page.keyboard.press('a')
    await page.getByRole('button', { name: /shaft line/i }).click()
    await page.getByText('Usual proportions').waitFor()
    await page.locator('.line--open figure svg').getByText('②').waitFor()
    expect(await page.evaluate('document.activeElement?.closest(".line--open") !== null')).toBe(true)
  })
})
