/** What stands on the printed pages, before they are drawn. */
import { describe, expect, test } from 'vitest'
import { evaluateSheet } from '@shared/pipeline'
import { composePages } from '@server/printing/compose/composePages'
import type { Pages, PrintedLine } from '@server/printing/pages'
import { sheetOf } from '../../support/sheetText'

const composed = (text: string): Pages => {
  const sheet = sheetOf(text)
  const { lines, quotes, engine } = evaluateSheet(sheet)
  const presentations = lines.flatMap(({ id }) => engine.present(id) ?? [])
  return composePages({
    sheet,
    evaluation: { lines, quotes, presentations, nomenclature: engine.nomenclature() },
    problems: [],
    paper: 'A4',
    titleBlock: {
      firm: 'Firm',
      number: 'TF-0001',
      title: 'Shaft',
      revision: 'A',
      state: 'preparing',
      project: 'P-1 Mill',
      prepared: 'E. Brandt',
      checked: 'not yet',
      approved: 'not yet',
      printed: '1 Dec 2026',
    },
    mark: { lead: 'PRELIMINARY – NOT ISSUED', detail: 'for checking' },
    program: 'Torfolio',
  })
}

const linesOf = (pages: Pages): PrintedLine[] => pages.blocks.filter((block) => block.is === 'line')
const lineNumbered = (pages: Pages, number: string): PrintedLine => {
  const line = linesOf(pages).find((one) => one.number === number)
  if (!line) throw new Error(`There is no line ${number}.`)
  return line
}
const words = (node: unknown): string => JSON.stringify(node)
const appendix = (pages: Pages, title: string) => pages.appendices.find((one) => one.title === title)

const shaft = `---
torfolio: 1
title: Shaft
purpose: "Sizes a shaft.\\n\\nSecond paragraph."
conclusion: It holds.
sources:
  steel: { title: EN 10025-2, edition: '2019', clause: table 6 }
---

# Givens

\`\`\`given
d = 60 mm -- outside diameter [drawing]
T = 800 N m -- torque [steel, table 6]
\`\`\`

\`\`\`given yaml
- symbol: n_S
  value: "2.0"
  note: safety factor
  nature: assumption
  basis: Steady torque.
  toConfirm: { owner: E. Brandt, due: "2027-01-10" }
\`\`\`

# Stress

\`\`\`formula
tau = 16*T/(pi*d^3) to MPa -- stress at the surface {reported=true}
\`\`\`

\`\`\`criterion
C1: tau <= 10 MPa -- strength
\`\`\`
`

describe('a sheet on paper', () => {
  test('a line shows symbols, substituted values and the result, under its number', () => {
    const line = lineNumbered(composed(shaft), '2.1')
    expect(words(line.parts.symbolic)).toContain('"T"')
    expect(words(line.parts.substituted)).toContain('"800"')
    expect(words(line.parts.result)).toContain('"18.9"')
    expect(line.note).toBe('stress at the surface')
  })

  test('a criterion says its verdict and its utilisation', () => {
    // 16·800 N·m/(π·(60 mm)³) = 18.86 MPa by hand.
    expect(lineNumbered(composed(shaft), '2.2').verdict).toEqual({
      satisfied: false,
      word: 'not satisfied',
      hasBar: true,
      utilisation: expect.closeTo(1.886, 3) as unknown,
      shown: '1.89',
    })
  })

  test('criteria that are not satisfied and values to confirm are said at the top', () => {
    const said = composed(shaft).notices.map(({ text }) => text)
    expect(said).toContain('1 criterion is not satisfied: line 2.2.')
    expect(said).toContain('1 value is to be confirmed before issue: line 1.3.')
    expect(said).toContain('Not written yet: method.')
  })

  test('assumptions stand apart with their basis and who confirms them', () => {
    const pages = composed(shaft)
    expect(words(appendix(pages, 'Assumptions and defaults'))).toContain(
      'Steady torque. To confirm by E. Brandt, due 2027-01-10.',
    )
    expect(appendix(pages, 'To be confirmed before issue')?.table?.rows).toHaveLength(1)
  })

  test('the nomenclature names every symbol with meaning, value, unit and where it is used', () => {
    const rows = appendix(composed(shaft), 'Nomenclature')?.table?.rows ?? []
    expect(rows).toHaveLength(4)
    expect(words(rows[0])).toMatch(/outside diameter.*"60".*"mm".*"1\.1".*"2\.1"/)
  })

  test('a source is listed with edition and clause and the lines that cite it', () => {
    const [row] = appendix(composed(shaft), 'Sources')?.table?.rows ?? []
    expect(words(row)).toMatch(/EN 10025-2.*2019.*table 6.*"1\.2"/)
  })

  test('reported results and criteria are summed up', () => {
    const [results, criteria] = composed(shaft).summary
    expect(words(results?.table?.rows)).toMatch(/stress at the surface.*18\.9/)
    expect(words(criteria?.table?.rows)).toContain('not satisfied')
  })

  test('paragraphs of the purpose stay paragraphs', () => {
    expect(composed(shaft).purpose).toEqual(['Sizes a shaft.', 'Second paragraph.'])
  })
})

describe('a sheet with errors', () => {
  const faulty = `# Lines

\`\`\`given
d = 60 mm
\`\`\`

\`\`\`formula
x = d + q
y = 2*x
\`\`\`
`
  test('prints: the line says what is wrong, the next one what it waits for, the top both', () => {
    const pages = composed(faulty)
    expect(lineNumbered(pages, '1.2').problems[0]).toMatchObject({ severity: 'error' })
    expect(lineNumbered(pages, '1.3').problems.map(({ message }) => message)).toEqual([
      'No value: it waits for x.',
    ])
    expect(lineNumbered(pages, '1.3').parts.result).toBeUndefined()
    expect(pages.notices.map(({ text }) => text)).toContain('2 lines have no value: lines 1.2, 1.3.')
  })
})

describe('an analysis', () => {
  const analysed = `# Section

\`\`\`given
d = 60 mm
\`\`\`

\`\`\`analysis yaml
symbol: S1
analysis: section
inputs:
  shape: solid-round
  d_o: d
\`\`\`
`
  const pages = composed(analysed)
  const { analysis } = lineNumbered(pages, '1.2')

  test('prints inputs as typed with their value, working, outputs, figure and what limits it', () => {
    expect(words(analysis?.inputs[0]?.rows)).toMatch(/Solid round.*Outside diameter.*"60/)
    expect(analysis?.working.length).toBeGreaterThan(0)
    expect(words(analysis?.outputs?.rows)).toMatch(/torsion constant.*magnitude/i)
    expect(analysis?.figure?.elements.length).toBeGreaterThan(3)
    expect(analysis?.method.length).toBeGreaterThan(0)
    expect(analysis?.validity.length).toBeGreaterThan(0)
  })

  test('each step of the working has its symbols, its values and its result', () => {
    const step = analysis?.working.find(({ parts }) => parts.symbolic)
    expect(step).toMatchObject({ parts: { symbolic: {}, substituted: {}, result: {} } })
  })

  test('its method and version are recorded, its cautions printed', () => {
    expect(words(appendix(pages, 'Methods of the analyses')?.table?.rows)).toMatch(/Section.*"1".*"1\.2"/)
    expect(pages.cautions.some((caution) => caution.startsWith('Section: '))).toBe(true)
  })

  test('formulas of a method statement are mathematics, not dollar signs', () => {
    const pieces = analysis?.method.flat() ?? []
    expect(pieces.some((piece) => piece.is === 'math')).toBe(true)
    expect(words(pieces)).not.toContain('$')
  })
})

describe('what the press could not draw', () => {
  const deep = `${'1/(1 + '.repeat(40)}1${')'.repeat(40)}`
  const depthOf = (value: unknown): number =>
    typeof value === 'object' && value !== null ? 1 + Math.max(0, ...Object.values(value).map(depthOf)) : 0

  test('mathematics nested deeper than it goes is written on one line, with every term', () => {
    const pages = composed(`# Deep\n\n\`\`\`formula\nx = ${deep}\n\`\`\`\n`)
    const { symbolic } = lineNumbered(pages, '1.1').parts
    expect(depthOf(symbolic)).toBeLessThan(45)
    // Forty ones above, forty beside the plus signs, one at the end.
    expect(words(symbolic).match(/"text":"1"/g)).toHaveLength(81)
  })

  test('a language with its country is known by its language', () => {
    expect(composed('---\ntorfolio: 1\nlanguage: de-AT\n---\n\nText.\n').language).toBe('de')
    expect(composed('---\ntorfolio: 1\nlanguage: plain English\n---\n\nText.\n').language).toBe('en')
  })
})
