import { describe, expect, test } from 'vitest'
import { dimension } from '@shared/engine/dimensions/dimension'
import { inWords } from '@shared/engine/dimensions/words'
import { defaultUnit } from '@shared/engine/units/defaults'
import { dimensionOfUnit, fromSI, readUnit, spokenUnit, toSI } from '@shared/engine/units/unit'
import { unit } from '../../support/expressions'

describe('spellings', () => {
  test.each([
    ['Nm', 'N m'],
    ['kNm', 'kN m'],
    ['N·m', 'N m'],
    ['mm2', 'mm^2'],
    ['mm²', 'mm^2'],
    ['mm4', 'mm^4'],
    ['N/mm2', 'MPa'],
    ['µm', 'um'],
    ['°', 'deg'],
    ['lbf-in', 'lbf in'],
    ['ft-lbf', 'lbf ft'],
    ['liter', 'litre'],
    ['percent', '%'],
    ['1/min', 'min^-1'],
  ])('%s is %s', (typed, plain) => {
    expect(unit(typed).text).toBe(typed)
    expect(toSI(7, unit(typed))).toBeCloseTo(toSI(7, unit(plain)), 12)
    expect(dimensionOfUnit(unit(typed))).toEqual(dimensionOfUnit(unit(plain)))
  })

  test.each([
    ['mpa', 'mpa is no unit of the list. Near it is MPa.'],
    ['t', 't is no unit of the list. Near it is tonne.'],
    ['kN foo', 'foo is no unit of the list. Near it is foot.'],
    ['qqqq', 'qqqq is no unit of the list.'],
    ['5', 'A unit is expected here, not 5. Write it like N m, MPa or kg/m^3.'],
    [
      'degC m',
      'degC m counts from a zero of its own, so it cannot stand in a product. Write a difference of temperature in K or degR.',
    ],
    ['W/m K', 'W/m K can be read in two ways: after the / it is open whether K is divided, too.'],
  ])('%s is refused', (typed, message) => {
    expect(readUnit(typed).problem?.message).toBe(message)
  })

  test('an empty unit is a bare number', () => {
    expect(dimensionOfUnit(unit(''))).toEqual(dimension({}))
    expect(toSI(3, unit(''))).toBe(3)
  })
})

describe('sizes', () => {
  test('60 mm is 0.06 m to the last bit, and back', () => {
    expect(toSI(60, unit('mm'))).toBe(0.06)
    expect(fromSI(0.06, unit('mm'))).toBe(60)
  })

  test('degC and degF are absolute temperatures', () => {
    expect(toSI(20, unit('degC'))).toBe(293.15)
    expect(toSI(212, unit('degF'))).toBeCloseTo(373.15, 10)
    expect(fromSI(273.15, unit('degF'))).toBeCloseTo(32, 10)
  })

  test('rpm, rev/s and Hz count turns; rad and deg do not', () => {
    expect(toSI(1500, unit('rpm'))).toBe(25)
    for (const name of ['rpm', 'rev/s', 'Hz'])
      expect(dimensionOfUnit(unit(name))).toEqual(dimension({ turn: 1, time: -1 }))
    for (const name of ['rad/s', 'deg/s'])
      expect(dimensionOfUnit(unit(name))).toEqual(dimension({ time: -1 }))
  })

  test('lb in is mass times length, lbf in a torque', () => {
    expect(dimensionOfUnit(unit('lb in'))).toEqual(dimension({ mass: 1, length: 1 }))
    expect(dimensionOfUnit(unit('lbf in'))).toEqual(dimensionOfUnit(unit('N m')))
  })
})

describe('units in which results are shown', () => {
  test.each([
    ['N m', 'N m', 'lbf in'],
    ['J', 'N m', 'lbf in'],
    ['Pa', 'MPa', 'ksi'],
    ['m', 'mm', 'in'],
    ['rev/s', 'rpm', 'rpm'],
    ['W', 'kW', 'hp'],
    ['J/g', 'm^2/s^2', 'in^2/s^2'],
    ['kg m^2/K', 'kg m^2/K', 'lb in^2/degR'],
    ['rad', '', ''],
  ])('of the dimension of %s: %s or %s', (name, si, us) => {
    expect(defaultUnit(dimensionOfUnit(unit(name)), 'SI').text).toBe(si)
    expect(defaultUnit(dimensionOfUnit(unit(name)), 'US').text).toBe(us)
  })
})

test('dimensions are said in words', () => {
  expect(inWords(dimensionOfUnit(unit('MPa')))).toBe('a pressure or stress')
  expect(inWords(dimensionOfUnit(unit('N m')))).toBe('a torque or energy')
  expect(inWords(dimensionOfUnit(unit('mm^4')))).toBe('a second moment of area')
  expect(inWords(dimensionOfUnit(unit('')))).toBe('a bare number')
  expect(inWords(dimensionOfUnit(unit('kg m^2/K')))).toBe('a quantity in kg m^2/K')
})

test('units are spoken in full', () => {
  expect(spokenUnit(unit('MPa'))).toBe('megapascal')
  expect(spokenUnit(unit('N m/deg'))).toBe('newton metre per degree')
  expect(spokenUnit(unit('mm^2'))).toBe('square millimetre')
  expect(spokenUnit(unit('1/s'))).toBe('per second')
})
