import { describe, expect, test } from 'vitest'
import { linesOf } from '@shared/sheet/lines'
import { exportText, importText } from '@shared/sheet/text'

const front = (fields: string) => `---\ntorfolio: 1\n${fields}---\n`
const where = (text: string) =>
  importText(text).problems.map(({ textLine, severity }) => [textLine, severity])

describe('compact lines', () => {
  test('say value, unit, tolerance, note and source', () => {
    const { sheet, problems } = importText(
      '```given\nd_o = 60 mm +/- 0.1 -- outside diameter [drawing 7-114]\nd = 40.0 mm -- seat [drawing] {tolerance=k6}\n```\n',
    )
    expect(problems).toEqual([])
    expect(sheet && linesOf(sheet)).toMatchObject([
      {
        id: 'd_o',
        kind: 'given',
        value: '60',
        unit: 'mm',
        tolerance: { plus: '0.1', minus: '0.1' },
        note: 'outside diameter',
        source: 'drawing 7-114',
      },
      { id: 'd', value: '40.0', tolerance: { fit: 'k6' }, note: 'seat' },
    ])
  })

  test('give a criterion its title, and a number where it has none', () => {
    const { sheet } = importText(
      '```criterion\nC3: tau <= tau_allow -- shear strength [EN 1993-1-1, 6.2.7]\nphi within 1 deg .. 2 deg\n```\n',
    )
    expect(sheet && linesOf(sheet)).toMatchObject([
      { symbol: 'C3', title: 'shear strength', note: '', relation: '<=', source: 'EN 1993-1-1, 6.2.7' },
      { symbol: 'C4', relation: 'within', limit: '1 deg', upper: '2 deg' },
    ])
  })

  test('that cannot be read are a problem with their line, and are kept as text', () => {
    const text = '# A\n\n```given\nd = 40 mm\nwhat is this\nT = 5 N m\n```\n'
    const { sheet, problems } = importText(text)
    expect(problems).toMatchObject([{ severity: 'error', code: 'syntax', textLine: 5 }])
    expect(sheet?.blocks.map((block) => block.type)).toEqual(['heading', 'line', 'paragraph', 'line'])
    expect(JSON.stringify(sheet?.blocks)).toContain('what is this')
  })
})

describe('YAML blocks', () => {
  test('hold every kind of line; rows without a name get the next number', () => {
    const { sheet, problems } = importText(
      '```table\n- symbol: TB1\n  columns: [{name: d, unit: mm}]\n  rows:\n    - {d: "40"}\n    - {name: HEB300, d: "50"}\n```\n\n```sizing\n- {symbol: Z1, vary: d, criterion: C1, between: [10 mm, 90 mm], series: R20}\n```\n',
    )
    expect(problems).toEqual([])
    expect(sheet && linesOf(sheet)).toMatchObject([
      {
        kind: 'table',
        rows: [
          { name: '1', cells: { d: '40' } },
          { name: 'HEB300', cells: { d: '50' } },
        ],
      },
      { kind: 'sizing', between: ['10 mm', '90 mm'], series: 'R20' },
    ])
  })

  test.each([
    ['a comment', '- symbol: d\n  value: "1" # one', 5],
    ['an anchor', '- symbol: d\n  value: &x "1"', 5],
    ['an alias', '- symbol: d\n  value: *x', 5],
    ['a tag', '- symbol: d\n  value: !!str 1', 5],
    ['a repeated key', '- symbol: d\n  symbol: e', 5],
    ['no list', 'just words', 4],
  ])('with %s are refused with the line', (_, yaml, line) => {
    const text = `Text\n\n\`\`\`given yaml\n${yaml}\n\`\`\`\n`
    expect(importText(text).problems[0]).toMatchObject({ severity: 'error', textLine: line })
    expect(JSON.stringify(importText(text).sheet)).toContain(yaml.split('\n')[0]?.slice(2))
  })

  test('name fields that a line does not have', () => {
    expect(importText('```given yaml\n- symbol: d\n  colour: red\n```\n').problems).toMatchObject([
      { code: 'invalid-field', textLine: 2, message: expect.stringContaining('colour') },
    ])
  })

  test('nested beyond reason are a problem, not the end of the program', () => {
    expect(importText(`\`\`\`given yaml\n${'['.repeat(20_000)}\n\`\`\`\n`).problems[0]).toMatchObject({
      severity: 'error',
    })
  })
})

describe('front matter', () => {
  test('carries title, number, template and sources', () => {
    const { heading, sheet, problems } = importText(
      front(
        'title: Drive shaft\nnumber: TF-0042\ntemplate: {name: Solid shaft, edition: 3}\nsources:\n  steel: {title: EN 10025-2, edition: "2019"}\n  drawing: 7-114\n',
      ),
    )
    expect(problems).toEqual([])
    expect(heading).toEqual({
      title: 'Drive shaft',
      number: 'TF-0042',
      template: { name: 'Solid shaft', edition: '3' },
    })
    expect(sheet?.front.sources).toEqual({
      steel: { title: 'EN 10025-2', edition: '2019' },
      drawing: { title: '7-114' },
    })
  })

  test('of rubbish is a problem with its line, and the rest is read', () => {
    expect(where('---\ntitle: [\n---\nText\n')[0]).toEqual([expect.any(Number), 'error'])
    expect(where(front('d: 40 mm\nunitSystem: imperial\n'))).toEqual([
      [3, 'error'],
      [4, 'error'],
    ])
    expect(importText('---\ntitle: [\n---\nText\n').sheet?.blocks).toHaveLength(1)
    expect(where('---\ntitle: x\nText\n')[0]).toEqual([1, 'error'])
  })

  test('of a newer program is not read at all', () => {
    const { sheet, problems } = importText('---\ntorfolio: 99\n---\nText\n')
    expect(sheet).toBeUndefined()
    expect(problems).toMatchObject([{ severity: 'error', textLine: 2 }])
  })
})

describe('prose', () => {
  test('quotes values and refers to lines', () => {
    const { sheet, problems } = importText(
      'See [T](<value:N m;digits=4>) and [C1](line:).\n\n```criterion\nC1: T <= 5 N m\n```\n',
    )
    expect(problems).toEqual([])
    expect(sheet?.blocks[0]).toEqual({
      type: 'paragraph',
      content: [
        { type: 'text', text: 'See ' },
        { type: 'quote', symbol: 'T', unit: 'N m', digits: 4 },
        { type: 'text', text: ' and ' },
        { type: 'reference', line: 'C1' },
        { type: 'text', text: '.' },
      ],
    })
  })

  test('a reference to a line that is not there becomes text, and says so', () => {
    const { sheet, problems } = importText('See [C9](line:).\n')
    expect(problems).toMatchObject([{ severity: 'advisory', textLine: 1 }])
    expect(sheet?.blocks[0]).toEqual({ type: 'paragraph', content: [{ type: 'text', text: 'See C9.' }] })
  })

  test('a row longer than its table makes the table wider; nothing is lost', () => {
    const { sheet, problems } = importText('| a | b |\n| --- | --- |\n| 1 | 2 | 3 |\n| 4 |\n')
    expect(problems).toMatchObject([{ severity: 'advisory', textLine: 3 }])
    const grid = sheet?.blocks[0]
    expect(grid?.type === 'grid' && grid.rows.map((row) => row.map((cell) => cell.content.length))).toEqual([
      [1, 1, 0],
      [1, 1, 1],
      [1, 0, 0],
    ])
  })

  test('keeps what a sheet has no form for as text', () => {
    const { sheet, problems } = importText(
      '> quoted\n\n```python\nprint(1)\n```\n\n<script>x</script>\n\n[bad](javascript:alert(1))\n',
    )
    expect(problems.map(({ textLine }) => textLine)).toEqual([1, 3])
    const text = JSON.stringify(sheet)
    for (const kept of ['quoted', 'print(1)', '<script>x</script>', 'javascript:alert(1)'])
      expect(text).toContain(kept)
    expect(text).not.toContain('"link"')
  })

  test('too long a text is refused before it is read', () => {
    expect(importText('x'.repeat(8_000_001)).problems).toMatchObject([{ code: 'limit-exceeded' }])
  })
})

test('the text of a sheet reads like an engineer would write it', () => {
  const text =
    '---\ntorfolio: "1"\ntitle: "Shaft"\nunitSystem: "SI"\nlanguage: "en"\npurpose: ""\nmethod: ""\nconclusion: ""\n---\n\n# Givens\n\n```given\nd_o = 60 mm +/- 0.1 -- outside diameter [drawing 7-114]\nT = 500 N m\n```\n\nThe torque is [T](<value:N m>), _steady_ and **known**.\n\n- first\n- second\n\n| a | b |\n| --- | --- |\n| 1 | 2 |\n'
  const { sheet, heading, problems } = importText(text)
  expect(problems).toEqual([])
  expect(sheet && exportText(sheet, heading)).toBe(text)
})
