import { describe, expect, test } from 'vitest'
import { parseExpression } from '@shared/engine/parse/parse'
import { builtins } from '@shared/engine/evaluate/builtins'
import { checked, complaints, read, tree } from '../../support/expressions'

describe('unit phrases', () => {
  test.each([
    ['10 N m', '10[N m]'],
    ['7850 kg/m^3', '7850[kg/m^3]'],
    ['5 N/mm2', '5[N/mm2]'],
    ['5 kNm', '5[kNm]'],
    ['5 N·m', '5[N·m]'],
    ['5 mm²', '5[mm²]'],
    ['10mm', '10[mm]'],
    ['5 µm', '5[µm]'],
    ['30°', '30[°]'],
    ['20 °C', '20[°C]'],
    ['5 lbf-in', '5[lbf-in]'],
    ['5 s^-1', '5[s^-1]'],
    ['5 % + 3', '(5[%] + 3)'],
    ['210*10^3 MPa', '210000[MPa]'],
    ['10^3 mm', '1000[mm]'],
    ['800 unit("N m")', '800[N m]'],
  ])('%s is one quantity', (text, expected) => {
    expect(tree(text)).toBe(expected)
  })

  test('a phrase binds tighter than a division', () => {
    expect(tree('8 kg/7850 kg/m^3')).toBe('(8[kg] / 7850[kg/m^3])')
    expect(tree('17 h/1 h')).toBe('(17[h] / 1[h])')
    expect(tree('T/60 N/mm^2')).toBe('(T / 60[N/mm^2])')
  })

  test('a phrase ends where a name is no unit', () => {
    expect(tree('5 N*L')).toBe('(5[N] * L)')
    expect(tree('16 T')).toBe('(16 * T)')
    expect(tree('2 d_o')).toBe('(2 * d_o)')
  })

  test('a number times a name is a product, not a phrase', () => {
    expect(tree('2*m*h')).toBe('((2 * m) * h)')
  })

  test('in, min and sec are units only within a phrase', () => {
    expect(tree('5 in + in')).toBe('(5[in] + in)')
    expect(tree('5 min + min(a, b)')).toBe('(5[min] + min<a, b>)')
    expect(tree('5 min(a, b)')).toBe('(5 * min<a, b>)')
    expect(tree('5 sec')).toBe('5[sec]')
  })

  test('no phrase starts after ^', () => {
    expect(tree('x^2 m', 'm')).toBe('((x ^ 2) * m)')
    expect(tree('x^-2 m', 'm')).toBe('((x ^ (- 2)) * m)')
  })

  test('a display unit follows to', () => {
    expect(tree('16*T/(pi*d^3) to N/mm2')).toBe('((16 * T) / {(pi * (d ^ 3))}) to N/mm2')
    expect(tree('n to 1/min')).toBe('n to 1/min')
  })

  test('one-letter names that are symbols here are no units', () => {
    for (const name of ['t', 'L', 'T', 'H', 'F', 'b']) expect(tree(`5 ${name}`)).toBe(`(5 * ${name})`)
  })

  test('the exponent of a unit is a plain number', () => {
    expect(complaints('5 mm^x')).toEqual([
      {
        code: 'syntax',
        message:
          'The exponent of a unit is a plain number, as in m^2. To raise 5 mm as a whole, put it in brackets.',
        at: '5 mm^',
        repairs: ['(5 mm)^x'],
      },
    ])
  })

  test('an inverse unit after a number is written with an exponent', () => {
    expect(complaints('1500 1/min*t')).toEqual([
      {
        code: 'syntax',
        message: '1/min is no unit inside an expression. Write min^-1.',
        at: '1/min',
        repairs: ['1500 min^-1*t'],
      },
    ])
  })

  test('an unknown display unit is underlined and mended where it stands', () => {
    expect(complaints('a to mpa')).toEqual([
      {
        code: 'unknown-unit',
        message: 'mpa is no unit of the list. Near it is MPa.',
        at: 'mpa',
        repairs: ['a to MPa'],
      },
    ])
    expect(complaints('a to W/m K')).toMatchObject([
      { code: 'ambiguous-division', at: 'W/m K', repairs: ['a to W/m/K', 'a to W K/m'] },
    ])
  })
})

describe('the clash rule', () => {
  test('with a mass m, 10 m and 800 N m can be read in two ways', () => {
    expect(complaints('10 m', 'm')).toEqual([
      {
        code: 'ambiguous-unit',
        message: '10 m can be read in two ways: m is both a unit and a symbol of this sheet.',
        at: '10 m',
        repairs: ['10 unit("m")', '10*(m)'],
      },
    ])
    expect(complaints('800 N m', 'm')[0]?.repairs).toEqual(['800 unit("N m")', '800 N*(m)'])
  })

  test('every repair can be read', () => {
    expect(tree('800 unit("N m")', 'm')).toBe('800[N m]')
    expect(tree('800 N*(m)', 'm')).toBe('(800[N] * {m})')
    expect(tree('10*(m)', 'm')).toBe('(10 * {m})')
  })

  test('with both N and m, three readings are offered', () => {
    expect(complaints('800 N m', 'N m')).toMatchObject([
      {
        message: '800 N m can be read in several ways: N and m are both a unit and a symbol of this sheet.',
        repairs: ['800 unit("N m")', '800 N*(m)', '800*(N)*(m)'],
      },
    ])
  })

  test('nothing is ambiguous where something unknown would be left over', () => {
    expect(tree('9.81 m/s^2', 'm')).toBe('9.81[m/s^2]')
    expect(tree('800 N m', 'N')).toBe('800[N m]')
  })

  test('a divided symbol is offered as a divisor', () => {
    expect(complaints('10 m/s', 's')[0]?.repairs).toEqual(['10 unit("m/s")', '10 m/(s)'])
  })

  test('where only a unit can stand, one phrase as a whole is that', () => {
    expect(read('10 m', 'm', true).problems).toEqual([])
    expect(read('-10 m', 'm', true).problems).toEqual([])
    expect(read('2*10 m', 'm', true).problems).toMatchObject([{ code: 'ambiguous-unit' }])
    expect(tree('x to m', 'm')).toBe('x to m')
    expect(tree('numerical_value(x, m)', 'm')).toBe('numerical_value<x, [m]>')
  })

  test('only the last names of a phrase are asked for', () => {
    const asked: string[] = []
    parseExpression('5 N m + 3*k', { isDefined: (name) => (asked.push(name), false), functions: builtins })
    expect(asked).toEqual(['m'])
  })
})

describe('divisions that can be read in two ways', () => {
  test.each([
    ['16 T/pi d^3', '/pi d^3', '/(pi d^3)', '/pi*d^3', ['16 T/(pi d^3)', '16 T/pi*d^3']],
    ['E/2(1+nu)', '/2(1+nu)', '/(2(1+nu))', '/2*(1+nu)', ['E/(2(1+nu))', 'E/2*(1+nu)']],
    ['a/(b)(c)', '/(b)(c)', '/((b)(c))', '/(b)*(c)', ['a/((b)(c))', 'a/(b)*(c)']],
  ])('an implicit product after a / : %s', (text, at, first, second, repairs) => {
    expect(complaints(text)).toEqual([
      {
        code: 'ambiguous-division',
        message: `${at} can be read in two ways: ${first} or ${second}.`,
        at,
        repairs,
      },
    ])
  })

  test.each([
    ['1/2 m', '1/(2 m)', '1/2*1 m'],
    ['pi*40^2/4 mm^2', 'pi*40^2/(4 mm^2)', 'pi*40^2/4*1 mm^2'],
    ['nu/2 m', 'nu/(2 m)', 'nu/2*1 m'],
  ])('a number with a unit after a / and something dimensionless: %s', (text, first, second) => {
    expect(checked(text, { nu: '' }).said).toEqual([
      {
        code: 'ambiguous-division',
        message: `${text} can be read in two ways: ${first} or ${second}.`,
        at: text,
        repairs: [first, second],
      },
    ])
    for (const reading of [first, second]) expect(checked(reading, { nu: '' }).problems).toEqual([])
  })

  test('a space after the / of a unit', () => {
    expect(complaints('5 W/m K')).toEqual([
      {
        code: 'ambiguous-division',
        message: 'W/m K can be read in two ways: after the / it is open whether K is divided, too.',
        at: 'W/m K',
        repairs: ['5 W/m/K', '5 W K/m'],
      },
    ])
  })

  test('a divisor with explicit signs or in brackets is clear', () => {
    expect(tree('16*T/(pi*d^3)')).toBe('((16 * T) / {(pi * (d ^ 3))})')
    expect(tree('E/2*(1+nu)')).toBe('((E / 2) * {(1 + nu)})')
    expect(tree('a/b + 2 c')).toBe('((a / b) + (2 * c))')
    expect(checked('8 kg/7850 kg/m^3', {}).problems).toEqual([])
  })
})

describe('arguments that are no values', () => {
  test('numerical_value takes a unit, entry a bare word', () => {
    expect(tree('numerical_value(T, N m)')).toBe('numerical_value<T, [N m]>')
    expect(tree('entry(table.column, HEB300)')).toBe('entry<table.column, HEB300>')
    expect(complaints('numerical_value(T, )')[0]?.message).toBe(
      'numerical_value takes a unit here, such as MPa.',
    )
    expect(complaints('numerical_value(T, mpa)')[0]?.message).toBe(
      'mpa is no unit of the list. Near it is MPa.',
    )
    expect(complaints('entry(table.column, 3*4)')[0]?.message).toBe(
      'entry takes a bare word here, such as R40.',
    )
  })

  test('only load cases have a member that is called', () => {
    const { parsed } = read('C.max(x)*2')
    expect(parsed?.reads).toEqual(['C'])
    expect(tree('S1.tau(x)')).toBe('(S1.tau * {x})')
  })
})
