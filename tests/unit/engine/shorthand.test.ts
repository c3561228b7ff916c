import { describe, expect, test } from 'vitest'
import {
  readCompact,
  writeCompact,
  type CompactContext,
  type CompactFields,
} from '@shared/engine/parse/shorthand'

const paragraph = (symbols = ''): CompactContext => ({
  isDefined: (name) => symbols.split(' ').includes(name),
})
const inBlock = (block: CompactFields['kind'], symbols = ''): CompactContext => ({
  ...paragraph(symbols),
  block,
})

const line = (text: string, context = paragraph()): CompactFields => {
  const reading = readCompact(text, context)
  if (reading.reading !== 'line') throw new Error(`${text} is ${reading.reading}`)
  return reading.line
}

describe('givens', () => {
  test('number, unit, tolerance, note and source', () => {
    expect(line('d_o = 60 mm +/- 0.1 -- outside diameter [drawing 7-114]')).toEqual({
      kind: 'given',
      symbol: 'd_o',
      value: '60',
      unit: 'mm',
      tolerance: { plus: '0.1', minus: '0.1' },
      note: 'outside diameter',
      source: 'drawing 7-114',
      fields: {},
    })
  })

  test('a fit stands among the fields', () => {
    expect(line('d = 40 mm -- seat [drawing] {tolerance=k6}')).toMatchObject({
      tolerance: { fit: 'k6' },
      fields: {},
    })
  })

  test.each([
    ['60.0', '60.0', '', undefined],
    ['-800 N m', '-800', 'N m', undefined],
    ['210*10^3 MPa', '210*10^3', 'MPa', undefined],
    ['1500 1/min', '1500', '1/min', undefined],
    ['40 mm +0.2/-0.1', '40', 'mm', { plus: '0.2', minus: '0.1' }],
    ['40 mm +0.021/+0.002', '40', 'mm', { plus: '0.021', minus: '-0.002' }],
    ['40 mm ± 0.1 mm', '40', 'mm', { plus: '0.1', minus: '0.1' }],
    ['1,5 mm', '1,5', 'mm', undefined],
  ])('x = %s', (right, value, unit, tolerance) => {
    const given = line(`x = ${right}`)
    expect(given).toMatchObject({ kind: 'given', value, unit })
    expect('tolerance' in given ? given.tolerance : undefined).toEqual(tolerance)
  })

  test('beside a symbol m the author is asked: given or formula', () => {
    expect(readCompact('b = 10 m', paragraph('m'))).toEqual({
      reading: 'ambiguous',
      given: { kind: 'given', symbol: 'b', value: '10', unit: 'm', fields: {} },
      formula: { kind: 'formula', symbol: 'b', expression: '10 m', unit: '', fields: {} },
    })
    expect(line('b = 10 m', inBlock('given', 'm')).kind).toBe('given')
    expect(line('b = 10 m', inBlock('formula', 'm')).kind).toBe('formula')
    expect(line('m = 10 m').kind).toBe('given')
  })

  test('a given block holds numbers only', () => {
    expect(readCompact('b = 2*a', inBlock('given'))).toEqual({
      reading: 'none',
      message: '2*a is no number with a unit. A given holds one number; write what is computed as a formula.',
    })
  })
})

describe('formulas', () => {
  test('a trailing to is the unit', () => {
    expect(line('tau = 16*T/(pi*d_o^3) to MPa -- surface shear stress [Saint-Venant]')).toEqual({
      kind: 'formula',
      symbol: 'tau',
      expression: '16*T/(pi*d_o^3)',
      unit: 'MPa',
      note: 'surface shear stress',
      source: 'Saint-Venant',
      fields: {},
    })
  })

  test('a sum of two quantities is a formula, Greek is spelled', () => {
    expect(line('τ = 5 MPa + 3 MPa')).toMatchObject({
      kind: 'formula',
      symbol: 'tau',
      expression: '5 MPa + 3 MPa',
    })
  })

  test('a condition is a formula, not a criterion', () => {
    expect(line('r = a > b ? a : b')).toMatchObject({ kind: 'formula', expression: 'a > b ? a : b' })
  })

  test('further fields stand in braces', () => {
    expect(line('x = 2*a {#k1 digits=3 reported=true}')).toMatchObject({
      id: 'k1',
      fields: { digits: '3', reported: 'true' },
    })
  })
})

describe('criteria', () => {
  test('symbol, sides, title and source', () => {
    expect(line('C1: tau <= tau_allow -- shear strength [EN 1993-1-1, 6.2.7]')).toEqual({
      kind: 'criterion',
      symbol: 'C1',
      demand: 'tau',
      relation: '<=',
      limit: 'tau_allow',
      note: 'shear strength',
      source: 'EN 1993-1-1, 6.2.7',
      fields: {},
    })
  })

  test('within takes two bounds', () => {
    expect(line('f_1 within 0.8*f_n .. 1.2*f_n')).toMatchObject({
      symbol: '',
      relation: 'within',
      limit: '0.8*f_n',
      upper: '1.2*f_n',
    })
    expect(readCompact('C1: x within a', inBlock('criterion'))).toEqual({
      reading: 'none',
      message: 'within takes two bounds: x within a .. b.',
    })
  })

  test('≤ is <=', () => {
    expect(line('tau ≤ tau_allow')).toMatchObject({ kind: 'criterion', relation: '<=' })
  })
})

describe('ordinary text stays text', () => {
  test.each([
    'The shaft is solid.',
    'tau = shear stress',
    'Use d = 40 mm shafts',
    'if a < b then',
    'Note: see drawing',
    'd =',
    '= 40 mm',
    'a <= ',
    '',
  ])('%s', (text) => {
    expect(readCompact(text, paragraph()).reading).toBe('none')
  })
})

test.each([
  ['{basis="as built, see 3"}', 'as built, see 3'],
  [String.raw`{basis=as\ built}`, 'as built'],
  [String.raw`{basis="a \"quoted\" word" nature=assumption}`, 'a "quoted" word'],
])('a field of several words is quoted or escaped: %s', (tail, basis) => {
  const read = readCompact(`a = 1 mm -- note ${tail}`, paragraph())
  expect(read.reading === 'line' && read.line).toMatchObject({ fields: { basis } })
})

test('a quotation mark without its partner is said', () => {
  expect(readCompact('a = 1 mm -- note {basis="as built}', paragraph()).reading).toBe('none')
})

describe('the way back', () => {
  test.each([
    'd_o = 60 mm +/- 0.1 -- outside diameter [drawing 7-114]',
    'd = 40 mm -- seat [drawing] {tolerance=k6}',
    'd = 40 mm +0.021/+0.002',
    'tau = 16*T/(pi*d_o^3) to MPa -- surface shear stress [Saint-Venant]',
    'C1: tau <= tau_allow -- shear strength [EN 1993-1-1, 6.2.7]',
    'x within a .. b',
    String.raw`x = a -- of \[two\] \{three\} {#k1 basis="as \"built\""}`,
  ])('%s is written as it was read', (text) => {
    const read = readCompact(text, paragraph())
    expect(read.reading === 'line' && writeCompact(read.line)).toBe(text)
  })

  test('brackets, backslashes and dashes in a note survive', () => {
    const given: CompactFields = {
      kind: 'given',
      symbol: 'd',
      value: '40',
      unit: 'mm',
      note: String.raw`see [A] -- and \ {b}`,
      source: 'a]b',
      fields: {},
    }
    const text = writeCompact(given)
    expect(text === undefined ? undefined : line(text)).toEqual(given)
  })

  test('what one line cannot hold is left to the long form', () => {
    const formula: CompactFields = { kind: 'formula', symbol: 'x', expression: 'a', unit: '', fields: {} }
    expect(writeCompact({ ...formula, note: 'two\nlines' })).toBeUndefined()
    expect(writeCompact({ ...formula, expression: 'a -- b' })).toBeUndefined()
    expect(writeCompact({ ...formula, note: ' padded ' })).toBeUndefined()
    expect(writeCompact({ ...formula, expression: '' })).toBeUndefined()
  })
})
