/** The press: a process that sets pages and can be killed. */
import { describe, expect, test } from 'vitest'
import type { SheetEvaluation } from '@server/evaluation/messages'
import type { PressOrder } from '@server/printing/order'
import { setPages } from '@server/printing/setPages'
import { createWaitingRoom } from '@server/printing/waitingRoom'
import { evaluateSheet } from '@shared/pipeline'
import { factsOf, fontsOf, textOfPages } from '../../support/printed'
import { sheetOf } from '../../support/sheetText'

const order = (text: string, paper: 'A4' | 'Letter' = 'A4'): Omit<PressOrder, 'program'> => {
  const sheet = sheetOf(text)
  const { lines, quotes, engine } = evaluateSheet(sheet)
  const presentations = lines.flatMap(({ id }) => engine.present(id) ?? [])
  const evaluation: SheetEvaluation = { lines, quotes, presentations, nomenclature: engine.nomenclature() }
  return {
    pages: {
      sheet,
      evaluation,
      problems: [],
      paper,
      titleBlock: {
        firm: 'Halden & Marsh',
        number: 'TF-0007',
        title: 'Shaft of the mill',
        revision: 'B',
        state: 'checking',
        project: 'P-1 Mill',
        prepared: 'E. Brandt',
        checked: 'not yet',
        approved: 'not yet',
        printed: '1 Dec 2026',
      },
      mark: { lead: 'PRELIMINARY – NOT ISSUED', detail: 'for checking · E. Brandt · 1 December 2026' },
      program: 'Torfolio 0.1.0',
    },
    printedAt: 1_764_590_400,
  }
}

const markup = `# Text that looks like markup

Pay #eval("1+1") and $x$ and \\#sys.version and \`@preview/thing\` as they stand.

\`\`\`given
d = 60 mm -- #panic("no") $ *star* <label> @ref [drawing]
\`\`\`
`

const wide = `# Wide

\`\`\`given
d = 60 mm
\`\`\`

\`\`\`formula
x = (${Array.from({ length: 60 }, () => 'd').join(' + ')})/(${Array.from({ length: 60 }, () => 'd').join(' + ')})
\`\`\`
`

describe('the press', { timeout: 120_000 }, () => {
  test('sets the same document to the same bytes, with title, author and only its own fonts', async () => {
    const [first, second] = await Promise.all([setPages(order(markup)), setPages(order(markup))])
    expect(Buffer.from(first.pdf).equals(Buffer.from(second.pdf))).toBe(true)
    expect(first.archival).toBe(true)
    const facts = factsOf(first.pdf)
    expect(facts).toMatch(/Title: +TF-0007 B, Shaft of the mill/)
    expect(facts).toMatch(/Author: +Halden & Marsh/)
    const fonts = fontsOf(first.pdf).split('\n').slice(2).filter(Boolean)
    expect(fonts.every((font) => /Lora|NewCM|DejaVuSansMono/.test(font) && / yes yes yes /.test(font))).toBe(
      true,
    )
  })

  test('draws authored text as it stands: nothing in it is run', async () => {
    const [page = ''] = textOfPages((await setPages(order(markup))).pdf)
    expect(page).toContain('#eval("1+1")')
    expect(page).toContain('#panic("no") $ *star* <label> @ref')
  })

  test('breaks a long expression, so that its last term is on the page', async () => {
    const pdf = (await setPages(order(wide, 'Letter'))).pdf
    expect(factsOf(pdf)).toContain('612 x 792 pts (letter)')
    // 60 terms above and 60 below, as symbols: none may be cut off at the edge, where text has no place.
    const text = textOfPages(pdf).join('\n')
    const symbolic = text.slice(text.indexOf('x = '), text.indexOf('60 mm +'))
    expect(symbolic.match(/\bd\b/g)).toHaveLength(120)
  })

  test('prints characters that no font has, and says that they cannot be read', async () => {
    const { pdf, archival } = await setPages(order('# 轴\n\nText.\n'))
    expect(archival).toBe(false)
    expect(textOfPages(pdf)[0]).toContain('Some characters of this sheet are in no font of the print')
  })

  test('is killed when it takes too long; the next order is set as ever', async () => {
    await expect(setPages(order(markup), { timeoutMs: 1 })).rejects.toMatchObject({ reason: 'timeout' })
    expect((await setPages(order(markup))).pages).toBe(1)
  })

  test('is killed when it takes too much memory', async () => {
    await expect(setPages(order(markup), { memoryMb: 10 })).rejects.toMatchObject({ reason: 'memory' })
  })

  test('a document that cannot be set is a failure with a reason, not a crash', async () => {
    const broken = order(markup)
    const titleBlock = { ...broken.pages.titleBlock, firm: 7 as unknown as string }
    await expect(setPages({ ...broken, pages: { ...broken.pages, titleBlock } })).rejects.toMatchObject({
      reason: 'fault',
      message: expect.stringContaining('expected string') as unknown,
    })
  })
})

describe('the waiting room', () => {
  test('lets so many work at once, the next wait, and refuses who comes after them', async () => {
    const room = createWaitingRoom(1, 1, 2)
    const begun: string[] = []
    let finish = () => {}
    const first = room.enter('one', () => {
      begun.push('first')
      return new Promise<void>((resolve) => (finish = resolve))
    })
    const second = room.enter('another', async () => void begun.push('second'))
    await Promise.resolve()
    expect(room.enter('a third', async () => void begun.push('third'))).toBeUndefined()
    expect(begun).toEqual(['first'])
    finish()
    await Promise.all([first, second])
    expect(begun).toEqual(['first', 'second'])
  })

  test('nobody takes all places', async () => {
    const room = createWaitingRoom(1, 5, 2)
    const set = () => Promise.resolve('set')
    const own = [room.enter('one', set), room.enter('one', set)]
    expect(room.enter('one', set)).toBeUndefined()
    expect(await room.enter('another', set)).toBe('set')
    await Promise.all(own)
    expect(await room.enter('one', set)).toBe('set')
  })

  test('a place is free again after work that failed', async () => {
    const room = createWaitingRoom(1, 0, 1)
    await expect(room.enter('one', () => Promise.reject(new Error('torn')))).rejects.toThrow('torn')
    expect(await room.enter('one', async () => 'set')).toBe('set')
  })
})
