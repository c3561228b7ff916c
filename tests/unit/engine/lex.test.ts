import { describe, expect, test } from 'vitest'
import { readAuthoredNumber } from '@shared/engine/parse/authoredNumber'
import { nearestNames } from '@shared/engine/parse/nearest'
import { readSymbolName } from '@shared/engine/parse/symbolName'
import { complaints, read, tree } from '../../support/expressions'

describe('symbols', () => {
  test.each([
    ['τ_max', 'tau_max'],
    ['tau_max', 'tau_max'],
    ['τ′', "tau'"],
    ["T_1'", "T_1'"],
    ['d₀', 'd_0'],
    ['d_o₁', 'd_o_1'],
    ['Δφ', 'Deltaphi'],
    ['µ', 'mu'],
    ['ϕ', 'phi'],
    ['σ__x', 'sigma__x'],
  ])('%s is the symbol %s', (typed, name) => {
    expect(readSymbolName(typed)).toEqual({ name })
    expect(tree(typed)).toBe(name)
  })

  test.each([
    ['', 'A symbol is missing.'],
    ['2d', '2d begins with a digit. A symbol begins with a letter.'],
    ['_d', '_d begins with _. A symbol begins with a letter.'],
    ['d o', 'd o has a space in it. Write d_o.'],
    [
      '🔩',
      "🔩 cannot stand in a symbol. A symbol has letters, Greek letters, digits, _ and primes: d_o, τ_max, T'.",
    ],
    [
      'd-o',
      "- cannot stand in a symbol. A symbol has letters, Greek letters, digits, _ and primes: d_o, τ_max, T'.",
    ],
    ['pi', 'pi cannot be a symbol: pi is the number 3.14159….'],
    ['π', 'π cannot be a symbol: pi is the number 3.14159….'],
    ['to', 'to cannot be a symbol: to stands before a display unit.'],
    ['S1.T', 'S1.T has a point in it. A point reads a value of an analysis; a symbol of its own has none.'],
    ['bη', 'bη would read as the Greek letter beta. Put _ between the letters.'],
  ])('%s is refused as a symbol', (typed, message) => {
    expect(readSymbolName(typed)).toEqual({ message })
  })

  test('the name of a function is no symbol', () => {
    expect(readSymbolName('sqrt', new Set(['sqrt']))).toEqual({
      message: 'sqrt cannot be a symbol: it is a function.',
    })
  })

  test('tau, phi, e, i and in are ordinary symbols', () => {
    expect(tree('tau*phi*e*i*in')).toBe('((((tau * phi) * e) * i) * in)')
  })

  test('only pi is predefined, typed or spelled', () => {
    expect(read('pi*π*x').parsed?.reads).toEqual(['x'])
  })

  test('a name followed by a bracket multiplies unless it is a function', () => {
    expect(tree('T(1+e)')).toBe('(T * {(1 + e)})')
    expect(tree('sqrt(1+e)')).toBe('sqrt<(1 + e)>')
  })

  test('members are read through points, four names deep at most', () => {
    expect(tree('S1.tau_2 + C.hot.x + C.1.x')).toBe('((S1.tau_2 + C.hot.x) + C.1.x)')
    expect(complaints('a.b.c.d.e')[0]).toMatchObject({
      code: 'syntax',
      message: 'a.b.c.d… has too many points. A reference has at most three.',
    })
  })

  test('names of the host language are harmless symbols', () => {
    expect(tree('constructor + __proto__ + toString + hasOwnProperty')).toBe(
      '(((constructor + __proto__) + toString) + hasOwnProperty)',
    )
  })

  test.each([
    'import',
    'createUnit',
    'evaluate',
    'parse',
    'compile',
    'simplify',
    'derivative',
    'resolve',
    'config',
    'help',
    'chain',
  ])('%s(…) is not available', (name) => {
    expect(complaints(`${name}(x)`)).toEqual([
      { code: 'syntax', message: `${name} is not available in an expression.`, at: name, repairs: [] },
    ])
  })

  test('the nearest names come first', () => {
    expect(nearestNames('tau_mx', ['tau_max', 'tau_m', 'sigma', 'd_o'])).toEqual(['tau_m', 'tau_max'])
    expect(nearestNames('taumax', ['tau_max', 'sigma'])).toEqual(['tau_max'])
    expect(nearestNames('Q', ['sigma', 'tau'])).toEqual([])
  })
})

describe('signs', () => {
  test('typographic operators are the plain ones', () => {
    expect(tree('a·b×c÷d−e')).toBe('((((a * b) * c) / d) - e)')
    expect(tree('a≤b')).toBe('(a <= b)')
    expect(tree('a≠b')).toBe('(a != b)')
  })

  test('raised digits are exponents', () => {
    expect(tree('d³ + x⁻² + y¹²')).toBe('(((d ^ 3) + (x ^ -2)) + (y ^ 12))')
  })

  test('precedence is that of mathematics', () => {
    expect(tree('-a^2 + b*c^-d^2')).toBe('((- (a ^ 2)) + (b * (c ^ (- (d ^ 2)))))')
    expect(tree('a > b and not (c < d) or e == f ? g : h')).toBe(
      '((((a > b) and (not {(c < d)})) or (e == f)) ? g : h)',
    )
  })

  test.each([
    ['a = b', '=', '= cannot stand in an expression. To compare two values, write ==.', []],
    ['[a]', '[', 'Square brackets cannot stand in an expression. Write ( ).', ['(a)']],
    ['a ** 2', '**', 'A power is written with ^.', ['a ^ 2']],
    ['√(a)', '√', 'A root is written sqrt(…).', ['sqrt(a)']],
    [
      '|a|',
      '|',
      'Bars cannot stand in an expression. Write abs(x) for a magnitude, or for an alternative.',
      [],
    ],
    ['a !', '!', '! cannot stand in an expression. To turn a condition round, write not.', []],
    ['a; b', ';', 'A semicolon cannot stand in an expression. One formula holds one value.', []],
    ['"a"', '"', 'Quotation marks stand only in unit("…").', []],
    ['a % b', '%', '% is a unit and stands after a number: 5 %.', []],
    ['🔩', '🔩', '🔩 cannot stand in an expression.', []],
    ['a < b < c', '<', 'Two values are compared at a time. Write a < b and b < c.', []],
  ])('%s says what to write', (text, at, message, repairs) => {
    expect(complaints(text)).toEqual([{ code: 'syntax', message, at, repairs }])
  })
})

describe('brackets and what is missing', () => {
  test.each([
    ['16*T/(pi*d^3', '(pi*d^3', 'A closing bracket is missing.', ['16*T/(pi*d^3)']],
    ['((a+b)*(c', '(c', '2 closing brackets are missing.', ['((a+b)*(c))']],
    ['a+b)', ')', 'A closing bracket has no opening one.', ['a+b']],
    [
      '(a to MPa',
      '(a ',
      'A closing bracket is missing before to. to stands at the end and fixes the display unit.',
      ['(a) to MPa'],
    ],
    ['a +', '+', 'A value is missing after +.', []],
    ['a + * b', '+', 'A value is missing after +.', []],
    ['* a', '*', 'A value is missing before *.', []],
    ['a*()', '()', 'The brackets are empty.', []],
    ['min(a,)', ')', 'A value is missing before ).', []],
    [
      'a, b',
      ',',
      'A comma stands only between the arguments of a function. The decimal mark is the point.',
      [],
    ],
    ['a > b ? c', 'a > b ? c', 'A condition has ? without its :. Write test ? value : other value.', []],
    ['a : b', ':', ': has no ? before it. Write test ? value : other value.', []],
    ['a to', 'to', 'A unit is missing after to.', []],
    ['', '', 'The expression is empty.', []],
    ['sqrt', 'sqrt', 'sqrt is a function: its arguments stand in brackets after it, sqrt(…).', []],
    ['sqrt(a, b)', 'sqrt(a, b)', 'sqrt takes 1 argument (x), not 2.', []],
    ['d 2', ' 2', 'An operator is missing between d and 2.', ['d*2']],
  ])('%s', (text, at, message, repairs) => {
    const [problem] = complaints(text)
    expect(problem).toEqual({ code: 'syntax', message, at, repairs })
  })
})

describe('numbers', () => {
  test.each([
    ['60.0', 60],
    ['2.1e5', 210000],
    ['2.1E-5', 2.1e-5],
    ['210*10^3', 210000],
    ['210·10³', 210000],
    ['1.2×10⁻⁵', 1.2e-5],
    ['10^3', 1000],
    ['.5', 0.5],
  ])('%s is one number', (text, value) => {
    expect(tree(text)).toBe(String(value))
    expect(readAuthoredNumber(text)).toEqual({ value })
  })

  test('a written-out power of ten does not swallow what is raised or multiplied otherwise', () => {
    expect(tree('x^2*10^3')).toBe('((x ^ 2) * 1000)')
    expect(tree('2*10^x')).toBe('(2 * (10 ^ x))')
    expect(tree('2*10^3^2')).toBe('(2 * (10 ^ (3 ^ 2)))')
  })

  test('after a / it is open whether the power of ten is divided', () => {
    expect(complaints('E/2*10^3')).toEqual([
      {
        code: 'ambiguous-division',
        message: '/2*10^3 can be read in two ways: /(2*10^3) or /2*(10^3).',
        at: '/2*10^3',
        repairs: ['E/(2*10^3)', 'E/2*(10^3)'],
      },
    ])
  })

  test('two numbers side by side are joined by a repair', () => {
    expect(complaints('1 500*d')).toEqual([
      {
        code: 'syntax',
        message:
          'Two numbers stand side by side: 1 500. Write one number without the space, or an operator between them.',
        at: '1 500',
        repairs: ['1500*d'],
      },
    ])
  })

  test('a decimal comma is a problem, also inside a call', () => {
    expect(complaints('1,5*d')).toEqual([
      {
        code: 'decimal-comma',
        message: '1,5 has a comma. The decimal mark is the point: 1.5.',
        at: '1,5',
        repairs: ['1.5*d'],
      },
    ])
    expect(complaints('max(1,2)')[0]).toMatchObject({
      code: 'decimal-comma',
      repairs: ['max(1.2)', 'max(1, 2)'],
    })
    expect(complaints('1,500')[0]?.repairs).toEqual(['1.500', '1500'])
    expect(tree('max(1, 2)')).toBe('max<1, 2>')
  })

  test('a field for a number takes nothing else', () => {
    expect(readAuthoredNumber('-3')).toEqual({ value: -3 })
    expect(readAuthoredNumber('1,5').problem?.code).toBe('decimal-comma')
    expect(readAuthoredNumber('1 500').problem?.repairs).toEqual([
      { label: 'Write 1500', fields: { value: '1500' } },
    ])
    expect(readAuthoredNumber('60 mm').problem?.message).toBe(
      '60 mm is no number. Write it like 60, 60.0, 2.1e5 or 210*10^3.',
    )
    expect(readAuthoredNumber('').problem?.message).toBe('A number is missing.')
    expect(readAuthoredNumber('1e999').problem?.code).toBe('not-finite')
  })
})

describe('bounds', () => {
  test('an expression of 10 000 characters is refused in words', () => {
    expect(complaints('1+'.repeat(5000))).toMatchObject([
      {
        code: 'limit-exceeded',
        message: 'The expression has 10000 characters; 4000 is the most. Split it into several formulas.',
      },
    ])
  })

  test('brackets stand fifty deep at most', () => {
    expect(complaints('('.repeat(60) + 'a' + ')'.repeat(60))[0]).toMatchObject({
      code: 'limit-exceeded',
      message: 'Brackets stand more than 50 deep. Split the expression into several formulas.',
    })
  })

  test('a thousand names are too many', () => {
    expect(complaints('a+'.repeat(1200) + 'a')[0]?.code).toBe('limit-exceeded')
  })

  test('long chains of signs and powers end without a crash', () => {
    expect(() => read('-'.repeat(3999) + '1')).not.toThrow()
    expect(() => read('2^'.repeat(900) + '2')).not.toThrow()
    expect(() => read('a?b:'.repeat(300) + 'c')).not.toThrow()
  })
})
