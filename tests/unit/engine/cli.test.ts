import { mkdtemp, rm, writeFile } from 'node:fs/promises'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { afterAll, beforeAll, describe, expect, test } from 'vitest'
import { runEvaluate } from '@server/cli/evaluation/run'

let folder = ''
beforeAll(async () => {
  folder = await mkdtemp(join(tmpdir(), 'evaluate-'))
})
afterAll(() => rm(folder, { recursive: true }))

const shaft = `---
torfolio: 1
title: Solid shaft
---

# Given

\`\`\`given
T = 800 N m -- torque
d_o = 60.0 mm -- outside diameter
tau_allow = 60 MPa
\`\`\`

# Check

\`\`\`formula
tau = 16*T/(pi*d_o^3) to MPa -- surface shear stress
\`\`\`

\`\`\`analysis yaml
- symbol: S1
  analysis: section
  inputs:
    shape: solid-round
    d_o: d_o
\`\`\`

\`\`\`criterion
C1: tau <= tau_allow -- shear strength
\`\`\`
`

const run = async (text: string, ...words: string[]) => {
  const file = join(folder, 'sheet.md')
  await writeFile(file, text)
  return runEvaluate([file, ...words])
}
const json = async (text: string, ...words: string[]) => {
  const { out, exitCode } = await run(text, '--json', ...words)
  return {
    exitCode,
    report: JSON.parse(out) as Record<string, never> & { problems: { message: string; textLine?: number }[] },
  }
}

describe('what is printed', () => {
  test('each line with its number, its value and the verdict', async () => {
    const { out, exitCode } = await run(shaft)
    expect(exitCode).toBe(0)
    expect(out).toContain('1.2   d_o = 60.0 mm   — outside diameter')
    expect(out).toContain('2.1   tau = 18.9 MPa')
    expect(out).toContain('C1: 18.9 MPa ≤ 60 MPa: satisfied, utilisation 31.4 %')
    expect(out).toContain('S1.J = ')
  })

  test('as data: SI in full precision, members of analyses, criteria', async () => {
    const { exitCode, report } = await json(shaft)
    expect(exitCode).toBe(0)
    expect(Object.keys(report).sort()).toEqual(['criteria', 'lines', 'problems', 'values'])
    expect(report).toMatchObject({
      values: {
        d_o: { si: 0.06, number: 60, unit: 'mm', shown: '60.0 mm' },
        tau: { unit: 'MPa', shown: '18.9 MPa' },
        // Solid round: J = pi d^4 / 32 (exact).
        'S1.J': { si: (Math.PI / 32) * 0.06 ** 4 },
      },
      criteria: [{ symbol: 'C1', title: 'shear strength', satisfied: true }],
      problems: [],
    })
  })

  test('a criterion that is not satisfied: exit 2', async () => {
    const { exitCode, report } = await json(shaft, '--given', 'd_o=40mm')
    expect(exitCode).toBe(2)
    expect(report).toMatchObject({ criteria: [{ satisfied: false }] })
  })

  test('a problem: exit 1, with the line of the text; what waits is absent', async () => {
    const { exitCode, report } = await json(shaft.replace('16*T', '16*M'))
    expect(exitCode).toBe(1)
    expect(report.problems[0]).toMatchObject({ code: 'unknown-symbol', textLine: 17 })
    expect(report['values']).not.toHaveProperty('tau')
    expect(report['criteria']).toEqual([])
  })
})

describe('other values for givens', () => {
  test('in another unit they are brought to the given’s own', async () => {
    const { report } = await json(shaft, '--given', 'd_o=6.5 cm', '--given=T=0.9kN m')
    expect(report).toMatchObject({ values: { d_o: { number: 65, shown: '65 mm' }, T: { si: 900 } } })
  })

  test.each([
    ['d_x=65mm', /no given d_x\. Did you mean d_o/],
    ['d_o=65', /has no unit: d_o is in mm/],
    ['d_o=65 kg', /d_o is a length, in mm/],
    ['d_o=thick', /no number/],
    ['d_o', /takes a symbol and a value/],
  ])('%s is refused', async (text, message) => {
    const { exitCode, complaint, out } = await run(shaft, '--given', text)
    expect(exitCode).toBe(1)
    expect(complaint).toMatch(message)
    expect(out).toBe('')
  })
})

describe('bad input', () => {
  test('a missing file, a folder, no file, two files, an unknown option', async () => {
    const complaints = await Promise.all(
      [[join(folder, 'nowhere.md')], [folder], [], ['a.md', 'b.md'], ['--fast', 'a.md']].map(runEvaluate),
    )
    expect(complaints.map(({ exitCode }) => exitCode)).toEqual([1, 1, 1, 1, 1])
    const [missing, directory, none, two, option] = complaints.map(({ complaint }) => complaint)
    expect(missing).toMatch(/there is no such file/)
    expect(directory).toMatch(/it is a folder/)
    expect(none).toMatch(/No file was named/)
    expect(two).toMatch(/One file at a time/)
    expect(option).toMatch(/no option --fast/)
  })

  test('complaints are data, too, where data were asked for', async () => {
    const { out } = await runEvaluate([join(folder, 'nowhere.md'), '--json'])
    expect(JSON.parse(out)).toMatchObject({ values: {}, problems: [{ severity: 'error' }] })
  })

  test('a front matter of rubbish: said with its line, and the sheet is evaluated all the same', async () => {
    const { exitCode, report } = await json(shaft.replace('title: Solid shaft', 'title: [unclosed\n\t: - {'))
    expect(exitCode).toBe(1)
    expect(report.problems.some(({ textLine }) => textLine !== undefined)).toBe(true)
  })

  test('bytes that are no text', async () => {
    const file = join(folder, 'bytes.md')
    await writeFile(file, Buffer.from([0xff, 0xfe, 0x00, 0xd8]))
    expect((await runEvaluate([file])).complaint).toMatch(/not UTF-8/)
  })
})
