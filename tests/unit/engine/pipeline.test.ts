import { describe, expect, test } from 'vitest'
import { engineLines, evaluateSheet, quotesOf } from '@shared/pipeline'
import { evaluated, sheetOf } from '../../support/sheetText'

const steppedShaft = `
\`\`\`given
G = 80 GPa
T_1 = 800 N m
T_2 = 400 N m
\`\`\`

\`\`\`analysis yaml
- symbol: S1
  analysis: shaft-line
  inputs:
    G: G
    start: fixed
    end: free
    segments:
      - { name: 1, length: 400 mm, d: 60 mm, r: 2 mm }
      - { name: 2, length: 300 mm, d: 40 mm }
    torques:
      - { name: 1, x: 400 mm, T: T_1 }
      - { name: 2, x: 700 mm, T: T_2 }
\`\`\`
`

const withLines = (block: string) => evaluated(`${steppedShaft}\n${block}`)
const messages = (lines: ReturnType<typeof evaluated>, symbol: string) =>
  lines
    .get(symbol)
    ?.problems.map(({ message }) => message)
    .join(' ') ?? ''

describe('an analysis in a sheet', () => {
  test('its members are read like symbols; the torque in each segment follows from equilibrium', () => {
    const lines = withLines('```formula\ntau = S1.tau_1\nT_m = at(S1.T, 200 mm)\nT_n = at(S1.T, 600 mm)\n```')
    // Nominal stress 16 T / (pi d^3) with T = 1200 N m (statics).
    expect(lines.get('tau')?.value?.si).toBeCloseTo((16 * 1200) / (Math.PI * 0.06 ** 3), 0)
    expect(lines.get('T_m')?.value?.shown).toBe('1200 N m')
    expect(lines.get('T_n')?.value?.shown).toBe('400 N m')
  })

  test('a station outside, of another dimension, or of nothing along the line', () => {
    const lines = withLines(
      '```formula\na = at(S1.T, 900 mm)\nb = at(S1.T, 3 kg)\nc = at(S1.Q, 1 mm)\nd = at(3, 1 mm)\n```',
    )
    expect(messages(lines, 'a')).toMatch(/outside/)
    expect(messages(lines, 'b')).toMatch(/must be a length; this is a mass/)
    expect(messages(lines, 'c')).toMatch(/no value named Q/)
    expect(lines.get('d')?.state).toBe('problem')
  })

  test('a member that does not exist, none at all, or one that does not apply', () => {
    const lines = withLines('```formula\na = S1.tau_mx\nb = S1\nc = S1.K_ts_2\n```')
    expect(messages(lines, 'a')).toMatch(/Did you mean S1\.tau_max/)
    expect(messages(lines, 'b')).toMatch(/Read one of its values/)
    expect(messages(lines, 'c')).toMatch(/no K_ts_2 with these inputs/)
  })

  test('a signed output against an upper limit is pointed out', () => {
    const lines = withLines('```criterion\nC1: S1.phi_end <= 3 deg\nC2: S1.tau_max <= 60 MPa\n```')
    expect(lines.get('C1')?.problems.map(({ code, severity }) => [code, severity])).toEqual([
      ['signed-demand', 'advisory'],
    ])
    expect(lines.get('C1')?.criterion?.satisfied).toBe(true)
    expect(lines.get('C2')?.problems).toEqual([])
  })
})

describe('inputs of an analysis', () => {
  const section = (inputs: string) => {
    const line = evaluated(
      `\`\`\`analysis yaml\n- symbol: S\n  analysis: section\n  inputs: ${inputs}\n\`\`\``,
    ).get('S')
    return line?.problems.map(({ code, message, span }) => `${code} ${span?.field}: ${message}`) ?? []
  }

  test.each([
    ['{ shape: solid-round }', 'missing-input inputs.d_o: Outside diameter is missing.'],
    [
      '{ shape: solid-round, d_o: 6 N }',
      'dimension-mismatch inputs.d_o: Outside diameter must be a length; this is a force.',
    ],
    [
      '{ shape: solid-round, d_o: -6 mm }',
      'out-of-range inputs.d_o: Outside diameter must be greater than 0 mm; it is -6.00 mm.',
    ],
    [
      '{ shape: solid-round, d_o: 6 mm, d_q: 3 mm }',
      'invalid-field inputs.d_q: This analysis has no input named d_q.',
    ],
    ['{ shape: solid-rond }', 'invalid-field inputs.shape: Shape cannot be solid-rond'],
    ['{ shape: hollow-round, d_o: 6 mm, d_i: 7 mm }', 'out-of-range inputs.d_i: The bore must be smaller'],
    ['{ shape: solid-round, d_o: 6 mm/0 }', 'domain inputs.d_o: Division by zero: 0 is zero.'],
    [
      '{ shape: solid-round, d_o: [{ name: 1, x: 3 mm }] }',
      'invalid-field inputs.d_o: Outside diameter takes a single value, not rows.',
    ],
  ])('%s', (inputs, problem) => {
    expect(
      section(inputs).some((found) => found.startsWith(problem)),
      section(inputs).join('\n'),
    ).toBe(true)
  })

  test('a kind that this version does not know is kept and said', () => {
    const line = evaluated('```analysis yaml\n- symbol: S\n  analysis: sektion\n```').get('S')
    expect(line?.problems[0]).toMatchObject({ code: 'invalid-field', span: { field: 'analysis' } })
  })
})

describe('from a sheet to its lines', () => {
  const text = `# One

\`\`\`given
d = 40 mm
\`\`\`

The radius is [r](value:) and in metres [r](<value:m;digits=2>).

\`\`\`formula
r = d/2
\`\`\`
`
  test('quoted values in prose', () => {
    const sheet = sheetOf(text)
    expect(quotesOf(sheet).map(({ symbol, unit, digits }) => [symbol, unit, digits])).toEqual([
      ['r', undefined, undefined],
      ['r', 'm', 2],
    ])
  })

  test('a line whose id stands twice', () => {
    const sheet = sheetOf(text)
    const twice = {
      ...sheet,
      blocks: [...sheet.blocks, ...sheet.blocks.filter((block) => block.type === 'line')],
    }
    expect(engineLines(twice).map(({ id, repeats }) => [id, repeats])).toEqual([
      ['d', undefined],
      ['r', undefined],
      ['d~2', 'd'],
      ['r~2', 'r'],
    ])
    const { lines } = evaluateSheet(twice)
    expect(lines.map(({ problems }) => problems.map(({ code }) => code))).toEqual([
      [],
      [],
      ['repeated-line'],
      ['repeated-line'],
    ])
    expect(lines[1]?.value?.shown).toBe('20.0 mm')
  })

  test('kinds that are not computed yet are kept', () => {
    const lines = evaluated('```cases yaml\n- symbol: C\n  rows: []\n```\n\n```formula\nx = C.max(y)\n```')
    expect(lines.get('C')).toMatchObject({ state: 'inert', problems: [] })
    expect(lines.get('x')?.problems[0]?.message).toContain('C is a table of load cases')
  })
})
