import { describe, expect, test } from 'vitest'
import fc from 'fast-check'
import { formatNumber, formatQuantity, presentQuantity, readNumber } from '@shared/engine/display'
import { drawNumber } from '@shared/engine/display/numeral'

const shown = (value: number, digits = 3): string => formatNumber(value, { digits })

describe('a number by significant digits', () => {
  test.each([
    [84.2013, '84.2'],
    [60, '60.0'],
    [5, '5.00'],
    [0, '0'],
    [-0, '0'],
    [1234.4, '1234'],
    [999.6, '1000'],
    [9999.4, '9999'],
    [9999.6, '10.0×10³'],
    [12345, '12.3×10³'],
    [84200000, '84.2×10⁶'],
    [0.0031, '0.00310'],
    [0.000123456, '123×10⁻⁶'],
    [0.00099999, '0.00100'],
    [-1272345, '-1.27×10⁶'],
    [1e-300, '1.00×10⁻³⁰⁰'],
    [Number.NaN, 'not finite'],
  ])('%d with three digits is %s', (value, text) => {
    expect(shown(value)).toBe(text)
  })

  test('with more digits stays plain for longer, with fewer claims none that it lacks', () => {
    expect(shown(123456.4, 6)).toBe('123456')
    expect(shown(1234, 2)).toBe('1.2×10³')
    expect(shown(123, 2)).toBe('1.2×10²')
    expect(shown(0.5, 1)).toBe('0.5')
    expect(shown(84200000, 15)).toBe('84200000.0000000')
  })

  test('is never 0 unless the value is, and reads back as itself to the shown digits', () => {
    fc.assert(
      fc.property(
        fc.double({ noNaN: true, noDefaultInfinity: true }),
        fc.integer({ min: 1, max: 15 }),
        (value, digits) => {
          const read = readNumber(shown(value, digits))
          const mantissa = Number(read?.mantissa)
          const back = Number(`${read?.negative ? '-' : ''}${read?.mantissa}e${read?.exponent ?? 0}`)
          if (value === 0) return back === 0
          return (
            mantissa !== 0 &&
            Math.abs(back - value) <= 0.5000001 * 10 ** (1 - digits) * Math.abs(back) + 5e-324
          )
        },
      ),
      { numRuns: 2000 },
    )
  })

  test('stands before its unit as typed', () => {
    expect(formatQuantity(84.2013, 'MPa')).toBe('84.2 MPa')
    expect(formatQuantity(800, 'N m', 4)).toBe('800.0 N m')
    expect(formatQuantity(0.72, '')).toBe('0.720')
  })
})

describe('a number as set', () => {
  test.each([
    ['1234', '1234'],
    ['12345', '12\\,345'],
    ['1234567.25', '1\\,234\\,567.25'],
    ['0.123456', '0.123\\,456'],
    ['210*10^3', '{210\\times 10^{3}}'],
    ['2.1e-5', '{2.1\\times 10^{-5}}'],
    ['1.27×10⁶', '{1.27\\times 10^{6}}'],
    ['-5', '{-}5'],
    ['.5', '.5'],
  ])('%s', (text, tex) => {
    expect(drawNumber(text).tex).toBe(tex)
  })

  test('is said with its power of ten', () => {
    expect(drawNumber('-1.27×10⁻⁶').speech).toBe('minus 1.27 times 10 to the power minus 6')
  })
})

describe('a unit', () => {
  test.each([
    ['N m', '\\mathrm{N}{\\cdot}\\mathrm{m}', 'newton metre'],
    ['N·m', '\\mathrm{N}{\\cdot}\\mathrm{m}', 'newton metre'],
    ['kNm', '\\mathrm{kNm}', 'kilonewton metre'],
    ['N/mm2', '\\mathrm{N}/\\mathrm{mm}^{2}', 'newton per square millimetre'],
    ['kg/m^3', '\\mathrm{kg}/\\mathrm{m}^{3}', 'kilogram per cubic metre'],
    ['mm^4', '\\mathrm{mm}^{4}', 'millimetre to the power 4'],
    ['s^-1', '\\mathrm{s}^{-1}', 'second to the power minus 1'],
    ['mm²', '\\mathrm{mm}^{2}', 'square millimetre'],
    ['m⁻¹', '\\mathrm{m}^{-1}', 'metre to the power minus 1'],
    ['1/s', '\\mathrm{1}/\\mathrm{s}', '1 per second'],
    ['W/(m K)', '\\mathrm{W}/(\\mathrm{m}{\\cdot}\\mathrm{K})', 'watt per metre kelvin'],
    ['%', '\\mathrm{\\%}', 'percent'],
    ['degC', '\\mathrm{{}^{\\circ}C}', 'degree Celsius'],
    ['µm', '\\mathrm{\\mu m}', 'micrometre'],
    ['lbf-in', '\\mathrm{lbf\\text{-}in}', 'pound-force inch'],
    ['hp_metric', '\\mathrm{hp\\_metric}', 'metric horsepower'],
    ['kg m2', '\\mathrm{kg}{\\cdot}\\mathrm{m}^{2}', 'kilogram square metre'],
  ])('%s', (unit, tex, speech) => {
    const drawn = presentQuantity({ shown: `3 ${unit}`, unit })
    expect(drawn.tex).toBe(`3\\,${tex}`)
    expect(drawn.speech).toBe(`3 ${speech}`)
  })

  test('a degree sign follows its number at once', () => {
    expect(presentQuantity({ shown: '30 °', unit: '°' }).tex).toBe('30\\mathrm{{}^{\\circ}}')
  })
})
