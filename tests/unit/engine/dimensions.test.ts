import { describe, expect, test } from 'vitest'
import { inWords } from '@shared/engine/dimensions/words'
import { checked } from '../../support/expressions'

const units = {
  d: 'mm', L: 'm', F: 'N', A: 'mm^2', T: 'N m', M: 'N m', J: 'mm^4', G: 'GPa', E: 'GPa', nu: '', x: '', m: '', tau: 'MPa', sigma: 'MPa',
  k: 'N/mm', mass: 'kg', K_t: '', S_e: 'MPa', S_u: 'MPa', N_f: '', S_f: 'MPa', b: '', T_1: 'degC', T_2: 'degC', dT: 'K', alpha: '1/K', w: 'lbf in',
} // prettier-ignore

const check = (text: string) => checked(text, units)
const words = (text: string): string => inWords(check(text).dimension ?? [])

describe('formulas of the trade have the dimension that they should', () => {
  test.each([
    ['16*T/(pi*d^3) to MPa', 'a pressure or stress'],
    ['T*L/(G*J)', 'a bare number'],
    ['T*L/(G*J) to deg', 'a bare number'],
    ['pi/32*(d^4 - (0.5*d)^4)', 'a second moment of area'],
    ['sqrt(sigma^2 + 3*tau^2)', 'a pressure or stress'],
    ['sqrt((32*M/(pi*d^3))^2 + 3*(16*T/(pi*d^3))^2) to MPa', 'a pressure or stress'],
    ['(16/pi*sqrt(M^2 + T^2)/sigma)^(1/3)', 'a length'],
    ['cbrt(16*T/(pi*tau))', 'a length'],
    ['E/(2*(1 + nu))', 'a pressure or stress'],
    ['sqrt(k/mass)', 'an angular speed or rate'],
    ['S_f*(N_f/10^6)^b', 'a pressure or stress'],
    ['1/(K_t*sigma/S_e + tau/S_u)', 'a bare number'],
    ['4.51*numerical_value(S_u, MPa)^-0.265', 'a bare number'],
    ['max(tau, sigma, 0)', 'a pressure or stress'],
    ['tau > 0 ? tau : 0', 'a pressure or stress'],
    ['abs(T) + 0', 'a torque or energy'],
    ['alpha*dT*L', 'a length'],
    ['alpha*(T_1 - T_2)*L', 'a length'],
    ['atan2(d, L)', 'a bare number'],
  ])('%s is %s', (text, expected) => {
    expect(check(text).problems).toEqual([])
    expect(words(text)).toBe(expected)
  })
})

describe('what does not fit is said in words', () => {
  test.each([
    [
      'F + T',
      'F + T',
      'The left side of + is a force, the right side a torque or energy. Divided by a length, the right side would be a force.',
    ],
    [
      'tau < F',
      'tau < F',
      'The left side of < is a pressure or stress, the right side a force. Divided by an area, the right side would be a pressure or stress.',
    ],
    [
      'd + 1',
      'd + 1',
      'The left side of + is a length, the right side a bare number. A bare number needs a unit there.',
    ],
    [
      'F to MPa',
      'F',
      'F is a force; MPa is a unit of pressure or stress. Divided by an area, it would be a pressure or stress.',
    ],
    [
      '16*T/(pi*d^2) to MPa',
      '16*T/(pi*d^2)',
      '16*T/(pi*d^2) is a stiffness or line load; MPa is a unit of pressure or stress. Divided by a length, it would be a pressure or stress.',
    ],
    [
      'tau > 0 ? tau : F',
      'tau > 0 ? tau : F',
      'The value before : is a pressure or stress, the value after it a force. Divided by an area, the right side would be a pressure or stress.',
    ],
    [
      'max(tau, F)',
      'F',
      'max takes quantities of one kind: the first is a pressure or stress, this one a force.',
    ],
    ['sin(F)', 'F', 'sin takes an angle, not a force.'],
    ['ln(F)', 'F', 'ln takes a bare number, not a force.'],
    [
      'F^nu',
      'F',
      'F is a force, and its exponent nu is no constant: the result would have no fixed dimension. Divide F by a reference first.',
    ],
    ['2^F', 'F', 'An exponent is a bare number; F is a force.'],
    [
      'tau < sigma',
      'tau < sigma',
      'This is a condition, and a value is needed. Write condition ? value : other value.',
    ],
    [
      'tau ? d : L',
      'tau',
      '? takes a condition, and tau is a value. Write the comparison in brackets: (a < b) ?.',
    ],
    [
      'not tau ? d : L',
      'tau',
      'not takes a condition, and tau is a value. Write the comparison in brackets: not (a < b).',
    ],
    ['(tau < sigma)*2', '(tau < sigma)', '(tau < sigma) is a condition, and a value is needed here.'],
  ])('%s', (text, at, message) => {
    expect(check(text).said[0]).toMatchObject({ code: 'dimension-mismatch', message, at })
  })

  test('a pound is a mass: where a torque is expected, lbf is meant', () => {
    expect(check('5 lb in to N m').said).toEqual([
      {
        code: 'dimension-mismatch',
        message:
          '5 lb in is a quantity in kg m; N m is a unit of torque or energy. lb is a mass; the force is lbf.',
        at: '5 lb in',
        repairs: ['5 lbf in to N m'],
      },
    ])
    expect(check('w to lb in').said[0]?.repairs).toEqual(['w to lbf in'])
  })

  test('an unknown symbol leaves the rest unchecked and unsaid', () => {
    const result = check('unknown*F + T')
    expect(result.dimension).toBeUndefined()
    expect(result.problems).toEqual([])
  })
})

describe('temperatures', () => {
  test('an absolute one cannot stand in a product', () => {
    expect(check('alpha*20 degC').said[0]).toMatchObject({
      code: 'unit-mismatch',
      message:
        '20 degC is an absolute temperature, so it cannot stand in a product. Write a difference in K or degR.',
    })
    expect(check('alpha*T_1').said[0]?.message).toBe(
      'T_1 is an absolute temperature in degC, so it cannot stand in a product. If it is a difference, give it in K; if the absolute temperature is meant, write (T_1 - 0 K).',
    )
    expect(check('alpha*(T_1 - 0 K)').problems).toEqual([])
  })

  test('two absolute ones have a difference and no sum', () => {
    expect(check('T_1 + T_2').said[0]?.message).toBe(
      'Two absolute temperatures have no sum. Write the difference in K or degR.',
    )
    expect(words('T_1 - T_2')).toBe('a temperature')
    expect(check('T_1 + dT to degC').problems).toEqual([])
    expect(check('T_1 - T_2 to degC').said[0]?.message).toBe(
      'This is a difference of temperature; degC counts from a zero of its own. Show it in K or degR.',
    )
  })

  test('-20 degC is below zero, not the negative of an absolute temperature', () => {
    expect(check('-20 degC').problems).toEqual([])
    expect(check('-20 degC to K').problems).toEqual([])
  })
})

test('numerical_value marks a formula as empirical, and takes its unit seriously', () => {
  expect(check('numerical_value(d, mm)^-0.107').empirical).toBe(true)
  expect(check('d^2').empirical).toBe(false)
  expect(check('numerical_value(d, MPa)').said[0]?.message).toBe(
    'd is a length; MPa is a unit of pressure or stress.',
  )
})
