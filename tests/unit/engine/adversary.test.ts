/** Slips that an engineer makes, and the wrong number or idle message that each of them once led to. */
import { describe, expect, test } from 'vitest'
import { importText } from '@shared/sheet/text'
import { criterion, engineWith, formula, given } from '../../support/engineLines'
import { evaluated } from '../../support/sheetText'

const temperatures = [given('T_1', '80', 'degC'), given('T_2', '20', 'degC')]

const drive = [
  given('n', '1450', 'rpm'),
  given('D', '200', 'mm'),
  given('P', '45', 'kW'),
  given('omega', '150', 'rad/s'),
]

/** What one formula below some givens comes to. */
const found = (givens: typeof drive, expression: string, unit = '') => {
  const line = engineWith([...givens, formula('x', expression, unit)]).result('x')
  return { shown: line?.value?.shown, si: line?.value?.si, problem: line?.problems[0] }
}

describe('a difference of temperatures', () => {
  test.each([
    ['T_1 - T_2', '60.0 K'],
    ['abs(T_2 - T_1)', '60.0 K'],
    ['2*(T_1 - T_2)', '120 K'],
    ['T_1 > T_2 ? T_1 - T_2 : 0', '60.0 K'],
    ['T_1 - T_2 - 5 K', '55.0 K'],
    ['max(T_1, T_2)', '80.0 degC'],
    ['T_1 + (T_1 - T_2)/2', '110 degC'],
  ])('%s shows as %s', (expression, shown) => {
    expect(found(temperatures, expression).shown).toBe(shown)
  })

  test.each(['abs(T_1 - T_2)', '(T_1 - T_2)', 'max(T_1 - T_2, 5 K)'])(
    '%s is refused where a scale with a zero of its own is asked for',
    (expression) => {
      expect(found(temperatures, expression, 'degC').problem?.code).toBe('unit-mismatch')
      expect(found(temperatures, `numerical_value(${expression}, degC)`).problem?.code).toBe('unit-mismatch')
    },
  )

  test('does not pass a limit that stands on a scale', () => {
    const engine = engineWith([
      ...temperatures,
      criterion('C1', 'T_1 - T_2', '50 degC'),
      criterion('C2', 'T_1 - T_2', '50 K'),
      criterion('C3', 'T_1', '90 degC'),
    ])
    expect(engine.result('C1')?.problems[0]?.code).toBe('unit-mismatch')
    expect(engine.result('C2')?.criterion?.satisfied).toBe(false)
    expect(engine.result('C3')?.criterion?.satisfied).toBe(true)
    expect(found(temperatures, 'T_1 - T_2 > 50 degC ? 1 : 2').problem?.code).toBe('unit-mismatch')
  })

  test('has no sign turned: an absolute temperature is not negated', () => {
    expect(found(temperatures, '-T_1').problem?.code).toBe('unit-mismatch')
    expect(found(temperatures, 'max(T_2, -20 degC)').shown).toBe('20.0 degC')
  })
})

describe('a handbook constant', () => {
  /** The formula that the first repair puts, evaluated. */
  const repaired = (expression: string, unit: string): number | undefined => {
    const { problem } = found(drive, expression, unit)
    expect(problem?.code).toBe('handbook-constant')
    return found(drive, problem?.repairs?.[0]?.fields['expression'] ?? '', unit).si
  }
  const speed = 1450 / 60

  test.each([
    ['pi*D*n/60', 'm/s', Math.PI * 0.2 * speed],
    ['pi*D*n/60000', 'm/s', Math.PI * 0.2 * speed],
    ['pi*D*n/1000', 'm/min', Math.PI * 0.2 * speed],
    ['pi*D*n/12', 'ft/min', Math.PI * 0.2 * speed],
    ['pi*n/30', 'rad/s', 2 * Math.PI * speed],
    ['60/n', 's', 1 / speed],
    ['n/60', '', speed],
    ['33000*P/(2*pi*n)', 'N m', 45_000 / (2 * Math.PI * speed)],
    ['30*P/(pi*n)', 'N m', 45_000 / (2 * Math.PI * speed)],
    ['9550000*P/n', 'N mm', 45_000 / (2 * Math.PI * speed)],
  ])('%s is mended without changing what it means', (expression, unit, expected) => {
    expect(repaired(expression, unit)).toBeCloseTo(expected, 9)
  })
})

test('a preferred number is taken in a unit of the value’s own kind', () => {
  expect(found(drive, 'preferred(D, R40, MPa)').problem?.code).toBe('dimension-mismatch')
  expect(found(drive, 'preferred(61, R40, MPa)').problem?.code).toBe('dimension-mismatch')
  expect(found(drive, 'preferred(61 mm, R40, mm)').shown).toBe('63.0 mm')
})

test('a bare number of more than a turn in a sine asks for its unit', () => {
  const { problem } = found([], 'sin(30)')
  expect(problem?.code).toBe('ambiguous-unit')
  expect(problem?.repairs?.map(({ fields }) => fields['expression'])).toEqual(['sin(30 deg)', 'sin(30 rad)'])
  expect(found([], 'sin(30 deg)').si).toBeCloseTo(0.5, 12)
  expect(found([], 'sin(1.5)').problem).toBeUndefined()
})

test('what rounding left does not make a whole number of the next one', () => {
  expect(found([], 'floor(0.3/0.1)').si).toBe(3)
  expect(found([], 'ceil(0.1*3/0.1)').si).toBe(3)
  expect(found([], 'ceil(3.0001)').si).toBe(4)
})

test('a formula that asks for two units shows neither', () => {
  expect(found(drive, 'D to mm', 'm').problem?.code).toBe('unit-mismatch')
  expect(found(drive, 'D to mm', 'mm').shown).toBe('200 mm')
})

test('at() of a plain quantity is a problem, not a line without value', () => {
  expect(found(drive, 'at(D, 5 mm)').problem?.message).toMatch(/varies along a member/)
})

test.each([
  ['5 Mpa', /a unit is spelled mPa or MPa/],
  ['5 RPM', /a unit is spelled rpm/],
  ['12e-6/K', /K is a unit: a unit stands directly after its number/],
  ['log(100)', /Write log10\(x\) or ln\(x\)/],
  ['arcsin(0.5)', /Write asin\(x\)/],
  ['Sqrt(4)', /Write sqrt/],
  ['PI*2', /Write pi/],
])('%s is told what to write instead', (expression, told) => {
  expect(found([], expression).problem?.message).toMatch(told)
})

test('tabs are read as spaces, and a criterion between two bounds is told its form', () => {
  expect(evaluated('```given\n\td = 60\tmm\t--\tdiameter\n```\n').get('d')?.value?.shown).toBe('60 mm')
  const { problems } = importText('```criterion\nC1: 60 MPa <= tau <= 65 MPa\n```\n')
  expect(problems[0]?.message).toMatch(/x within a \.\. b/)
})

test('text inside a block says how the block is written and ended', () => {
  const { problems } = importText('```given\nd = 5 mm\nSome text after\n')
  expect(problems[0]?.message).toMatch(/symbol = …; a line of three backticks ends the block/)
})

describe('an analysis of what cannot be', () => {
  const section = (points: string[]) =>
    `\`\`\`analysis yaml\n- symbol: S1\n  analysis: section\n  inputs:\n    shape: closed-cell\n    points:\n${points
      .map((point, i) => `      - {name: '${i + 1}', ${point}, t: 5 mm}\n`)
      .join('')}\`\`\`\n`

  test('a last corner that repeats the first is told to be left out, not that the line crosses itself', () => {
    const corners = ['y: 0 mm, z: 0 mm', 'y: 90 mm, z: 0 mm', 'y: 90 mm, z: 90 mm', 'y: 0 mm, z: 0 mm']
    expect(evaluated(section(corners)).get('S1')?.problems[0]?.message).toMatch(/corner 1 are the same point/)
    expect(evaluated(section(corners.slice(0, 3))).get('S1')?.state).toBe('value')
  })

  test('segments without common metal are no shaft', () => {
    const shaft = (bore: string) =>
      `\`\`\`analysis yaml\n- symbol: S1\n  analysis: shaft-line\n  inputs:\n    G: 80 GPa\n    start: fixed\n    end: free\n    segments:\n      - {name: a, length: 1 m, d: 60 mm, d_i: ${bore}}\n      - {name: b, length: 1 m, d: 40 mm}\n    torques:\n      - {name: '1', x: 2 m, T: 100 N m}\n\`\`\`\n`
    const [problem] = evaluated(shaft('40 mm')).get('S1')?.problems ?? []
    expect(problem?.message).toMatch(/Segments a and b do not meet/)
    expect(problem?.span?.field).toBe('inputs.segments.a.d_i')
    expect(evaluated(shaft('39 mm')).get('S1')?.state).toBe('value')
  })
})
