import { describe, expect, test } from 'vitest'
import katex from 'katex'
import {
  presentEquality,
  presentExpression,
  presentFormula,
  presentStep,
  presentValue,
} from '@shared/engine/display'
import type { Quantity } from '@shared/engine/contracts'
import {
  binary,
  call,
  conditional,
  group,
  less,
  number,
  over,
  plus,
  power,
  quantity,
  symbol,
  times,
  unary,
  unit,
  value,
  word,
} from './build'

const torsion = over(
  times(number('16'), symbol('T')),
  group(times(symbol('pi'), power(symbol('d'), number('3')))),
)
const vonMises = call(
  'sqrt',
  plus(power(symbol('sigma_b'), number('2')), times(number('3'), power(symbol('tau'), number('2')))),
)
const values = (known: Record<string, Quantity>) => (name: string) => known[name]
const drawn = (tex: string): string => katex.renderToString(tex, { throwOnError: true, strict: 'error' })

describe('surface shear stress of a solid shaft', () => {
  const line = presentFormula({
    id: 'a',
    symbol: 'tau_max',
    expression: torsion,
    substitute: values({ T: value('800 N m', 'N m'), d: value('36.4 mm', 'mm') }),
    result: value('84.5 MPa', 'MPa'),
  })

  test('stands on the screen as symbol = symbolic = substituted = result', () => {
    expect(line.screen).toEqual({
      symbol: '\\tau_{\\mathrm{max}}',
      symbolic: '{=}\\;\\dfrac{16\\,T}{\\pi\\,d^{3}}',
      substituted:
        '{=}\\;\\dfrac{16\\cdot 800\\,\\mathrm{N}{\\cdot}\\mathrm{m}}{\\pi\\,(36.4\\,\\mathrm{mm})^{3}}',
      result: '{=}\\;84.5\\,\\mathrm{MPa}',
    })
  })

  test('is said as one would say it', () => {
    expect(line.speech).toBe('tau max equals 16 T over pi d cubed, 84.5 megapascal')
  })

  test('is a tree for print', () => {
    expect(line.print.symbol).toEqual({
      math: 'script',
      base: { math: 'letter', text: 'τ' },
      sub: { math: 'upright', text: 'max' },
    })
    expect(line.print.symbolic).toEqual({
      math: 'row',
      items: [
        { math: 'operator', text: '=' },
        {
          math: 'fraction',
          over: {
            math: 'row',
            items: [{ math: 'number', text: '16' }, { math: 'space' }, { math: 'letter', text: 'T' }],
          },
          under: {
            math: 'row',
            items: [
              { math: 'letter', text: 'π' },
              { math: 'space' },
              { math: 'script', base: { math: 'letter', text: 'd' }, sup: { math: 'number', text: '3' } },
            ],
          },
        },
      ],
    })
    expect(line.print.result).toEqual({
      math: 'row',
      items: [
        { math: 'operator', text: '=' },
        { math: 'number', text: '84.5' },
        { math: 'space' },
        { math: 'upright', text: 'MPa' },
      ],
    })
  })
})

test('a symbol that waits stays a symbol among the values', () => {
  const line = presentFormula({
    id: 'a',
    symbol: 'tau',
    expression: torsion,
    substitute: values({ T: value('800 N m', 'N m') }),
    waitsFor: ['d'],
  })
  expect(line.screen.substituted).toBe(
    '{=}\\;\\dfrac{16\\cdot 800\\,\\mathrm{N}{\\cdot}\\mathrm{m}}{\\pi\\,d^{3}}',
  )
  expect(line.screen.result).toBeUndefined()
  expect(line.speech).toBe('tau equals 16 T over pi d cubed, waits for d')
})

test('the twist of two segments is a sum of two fractions', () => {
  const segment = (i: string) =>
    over(times(symbol(`T_${i}`), symbol(`L_${i}`)), group(times(symbol('G'), symbol(`J_${i}`))))
  const twist = presentExpression(plus(segment('1'), segment('2')))
  expect(twist.tex).toBe(
    '\\dfrac{T_{\\mathrm{1}}\\,L_{\\mathrm{1}}}{G\\,J_{\\mathrm{1}}}+\\dfrac{T_{\\mathrm{2}}\\,L_{\\mathrm{2}}}{G\\,J_{\\mathrm{2}}}',
  )
  expect(twist.speech).toBe('T 1 L 1 over G J 1 plus T 2 L 2 over G J 2')
})

test('the equivalent stress after von Mises is a root', () => {
  const stress = presentExpression(vonMises)
  expect(stress.tex).toBe('\\sqrt{\\sigma_{\\mathrm{b}}^{2}+3\\,\\tau^{2}}')
  expect(stress.speech).toBe('square root of open bracket sigma b squared plus 3 tau squared close bracket')
  expect(stress.print).toMatchObject({ math: 'root', radicand: { math: 'row' } })
})

test('in the root, values and their squares keep their units inside brackets', () => {
  const known = values({ sigma_b: value('120 MPa', 'MPa'), tau: value('-42.1 MPa', 'MPa') })
  expect(presentExpression(vonMises, known).tex).toBe(
    '\\sqrt{(120\\,\\mathrm{MPa})^{2}+3\\,({-}42.1\\,\\mathrm{MPa})^{2}}',
  )
})

test('power from speed: 2π n T has thin spaces, its values dots', () => {
  const shaftPower = times(number('2'), symbol('pi'), symbol('n'), symbol('T'))
  expect(presentExpression(shaftPower).tex).toBe('2\\,\\pi\\,n\\,T')
  const known = values({ n: value('1450 rpm', 'rpm'), T: value('800 N m', 'N m') })
  expect(presentExpression(shaftPower, known).tex).toBe(
    '2\\,\\pi\\cdot 1450\\,\\mathrm{rpm}\\cdot 800\\,\\mathrm{N}{\\cdot}\\mathrm{m}',
  )
  expect(presentExpression(shaftPower, known).speech).toBe(
    '2 pi times 1450 revolution per minute times 800 newton metre',
  )
})

test('library functions keep their name, upright', () => {
  const shaftPower = times(call('angular_speed', symbol('n')), symbol('T'))
  expect(presentExpression(shaftPower).tex).toBe('\\operatorname{angular\\_speed}(n)\\,T')
  expect(presentExpression(shaftPower).speech).toBe('angular speed of n times T')
  expect(presentExpression(call('preferred', symbol('d_req'), word('R40'))).tex).toBe(
    '\\operatorname{preferred}(d_{\\mathrm{req}},\\ \\mathrm{R40})',
  )
})

test('a fraction before brackets: torsion constant of a tube', () => {
  const tube = times(
    over(symbol('pi'), number('32')),
    group(less(power(symbol('d_o'), number('4')), power(symbol('d_i'), number('4')))),
  )
  expect(presentExpression(tube).tex).toBe('\\dfrac{\\pi}{32}\\,(d_{\\mathrm{o}}^{4}-d_{\\mathrm{i}}^{4})')
  expect(presentExpression(tube).speech).toBe(
    'pi over 32 times open bracket d o to the power 4 minus d i to the power 4 close bracket',
  )
})

test('a division in an exponent stands on one line', () => {
  const diameter = power(group(torsion), group(over(number('1'), number('3'))))
  expect(presentExpression(diameter).tex).toBe('\\biggl(\\dfrac{16\\,T}{\\pi\\,d^{3}}\\biggr)^{1/3}')
})

test('the sign of a numerator stands before the bar', () => {
  expect(presentExpression(over(unary('-', symbol('T')), symbol('J'))).tex).toBe('{-}\\dfrac{T}{J}')
})

test('subtracting a sum or a negative value keeps its brackets', () => {
  expect(presentExpression(less(symbol('a'), plus(symbol('b'), symbol('c')))).tex).toBe('a-(b+c)')
  const known = values({ b: value('-5 mm', 'mm') })
  expect(presentExpression(less(symbol('a'), symbol('b')), known).tex).toBe('a-({-}5\\,\\mathrm{mm})')
  expect(presentExpression(times(symbol('a'), symbol('b')), known).tex).toBe('a\\,({-}5\\,\\mathrm{mm})')
})

test('a numerical value stands in braces with its unit as index', () => {
  const empirical = presentExpression(call('numerical_value', symbol('R_m'), unit('MPa')))
  expect(empirical.tex).toBe('\\{R_{\\mathrm{m}}\\}_{\\mathrm{MPa}}')
  expect(empirical.speech).toBe('numerical value of R m in megapascal')
})

test('functions of mathematics have their own signs', () => {
  const rate = call('log10', plus(number('1'), symbol('x')))
  expect(presentExpression(rate).tex).toBe('\\log_{10}(1+x)')
  expect(presentExpression(rate).speech).toBe('decimal logarithm of open bracket 1 plus x close bracket')
  expect(presentExpression(call('asin', symbol('x'))).tex).toBe('\\arcsin(x)')
  expect(presentExpression(call('min', symbol('a'), symbol('b'))).speech).toBe('minimum of a and b')
  expect(presentExpression(call('abs', over(symbol('a'), symbol('b')))).tex).toBe(
    '\\biggl\\lvert \\dfrac{a}{b}\\biggr\\rvert ',
  )
  expect(presentExpression(power(call('cbrt', symbol('x')), number('2'))).tex).toBe('\\sqrt[3]{x}^{2}')
})

test('a torque at a station is set as a function of it', () => {
  const torque = presentExpression(
    call('at', symbol('S1.T'), symbol('x')),
    values({ x: value('250 mm', 'mm') }),
  )
  expect(torque.tex).toBe('\\mathrm{S1}\\mathrm{.}T(250\\,\\mathrm{mm})')
  expect(torque.speech).toBe('T of S1 at 250 millimetre')
})

test('a conditional has its cases under one brace, and one line in print', () => {
  const shorter = binary('<', symbol('L'), symbol('b'))
  const two = conditional(shorter, symbol('k'), conditional(shorter, number('2'), number('1')))
  expect(presentExpression(two).tex).toBe(
    '\\begin{cases}k&\\text{if }L<b\\\\2&\\text{if }L<b\\\\1&\\text{otherwise}\\end{cases}',
  )
  expect(presentExpression(two).speech).toBe('k if L is less than b, 2 if L is less than b, otherwise 1')
  expect(presentExpression(two).print).toMatchObject({ math: 'row' })
})

test('a formula that is a lone symbol or number does not repeat itself', () => {
  const alone = {
    id: 'a',
    symbol: 'a',
    substitute: values({ b: value('5 mm', 'mm') }),
    result: value('5 mm', 'mm'),
  }
  expect(presentFormula({ ...alone, expression: symbol('b') }).screen).toEqual({
    symbol: 'a',
    symbolic: '{=}\\;b',
    result: '{=}\\;5\\,\\mathrm{mm}',
  })
  expect(presentFormula({ ...alone, expression: quantity('5', 'mm') }).screen).toEqual({
    symbol: 'a',
    result: '{=}\\;5\\,\\mathrm{mm}',
  })
  expect(presentFormula({ ...alone, expression: quantity('0.5', 'cm') }).screen.symbolic).toBe(
    '{=}\\;0.5\\,\\mathrm{cm}',
  )
})

test('a formula that cannot be read yet shows its symbol', () => {
  expect(presentFormula({ id: 'a', symbol: 'tau', substitute: values({}) }).screen).toEqual({
    symbol: '\\tau',
  })
})

test('a step of the working substitutes its own values', () => {
  const step = presentStep({
    id: 'S1',
    symbol: 'tau',
    expression: over(times(symbol('T'), symbol('r')), symbol('J')),
    values: { T: value('800 N m', 'N m'), r: value('20 mm', 'mm'), J: value('251×10³ mm^4', 'mm^4') },
    result: value('63.7 MPa', 'MPa'),
  })
  expect(step.screen.substituted).toBe(
    '{=}\\;\\dfrac{800\\,\\mathrm{N}{\\cdot}\\mathrm{m}\\cdot 20\\,\\mathrm{mm}}{{251\\times 10^{3}}\\,\\mathrm{mm}^{4}}',
  )
  expect(step.speech).toBe('tau equals T r over J, 63.7 megapascal')
})

test('an output of an analysis names the line that it belongs to', () => {
  const output = presentValue('S1', 'S1.phi_end', value('1.43 deg', 'deg'))
  expect(output.screen.symbol).toBe('\\mathrm{S1}\\mathrm{.}\\varphi_{\\mathrm{end}}')
  expect(output.speech).toBe('phi end of S1 equals 1.43 degree')
})

test('an equation of a method statement', () => {
  expect(presentEquality(symbol('tau'), over(times(symbol('T'), symbol('r')), symbol('J'))).tex).toBe(
    '\\tau=\\dfrac{T\\,r}{J}',
  )
})

test('a long line can break: brackets are sized and close no group', () => {
  const fraction = over(symbol('M'), symbol('W'))
  const bracket = times(number('2'), group(plus(fraction, fraction)))
  const long = plus(bracket, bracket, bracket, bracket)
  const { tex } = presentExpression(long)
  expect(tex).not.toContain('\\left')
  // Each of KaTeX's bases is a piece that cannot break: a line may end after each of seven plus signs.
  expect(drawn(tex).split('class="katex-base"').length - 1).toBe(8)
})
