/**
 * Conversion factors against a table made by others. Source: A. Thompson, B. N. Taylor, Guide for the Use of the
 * International System of Units (SI), NIST Special Publication 811, 2008 edition, appendix B.8 (factors for units
 * listed alphabetically). The values are *from memory* of that table: confirm against the printed edition.
 */
import { expect, test } from 'vitest'
import { factorOf, fromSI, toSI } from '@shared/engine/units/unit'
import { unit } from '../support/expressions'

/** To as many digits as the table prints; a tolerance of half a unit in the last one. */
const table: readonly [string, string, number, number][] = [
  // Entries in bold there are exact.
  ['inch (in)', 'in', 2.54e-2, 0],
  ['foot (ft)', 'ft', 3.048e-1, 0],
  ['yard (yd)', 'yd', 9.144e-1, 0],
  ['mil (0.001 in)', 'mil', 2.54e-5, 0],
  ['square inch', 'in^2', 6.4516e-4, 0],
  ['square foot', 'ft^2', 9.290304e-2, 0],
  ['cubic inch', 'in^3', 1.638706e-5, 5e-7],
  ['cubic foot', 'ft^3', 2.831685e-2, 5e-7],
  ['inch to the fourth power', 'in^4', 4.162314e-7, 5e-7],
  ['pound (avoirdupois)', 'lb', 4.535924e-1, 5e-7],
  ['slug', 'slug', 1.45939e1, 5e-7],
  ['tonne', 'tonne', 1e3, 0],
  ['pound per cubic inch', 'lb/in^3', 2.76799e4, 5e-7],
  ['pound per cubic foot', 'lb/ft^3', 1.601846e1, 5e-7],
  ['pound inch squared', 'lb in^2', 2.926397e-4, 5e-7],
  ['pound-force', 'lbf', 4.448222, 5e-7],
  ['kip (1000 lbf)', 'kip', 4.448222e3, 5e-7],
  ['kilogram-force', 'kgf', 9.80665, 0],
  ['pound-force inch', 'lbf in', 1.129848e-1, 5e-7],
  ['pound-force foot', 'lbf ft', 1.355818, 5e-7],
  ['pound-force per inch', 'lbf/in', 1.751268e2, 5e-7],
  ['pound-force per square inch (psi)', 'psi', 6.894757e3, 5e-7],
  ['kip per square inch (ksi)', 'ksi', 6.894757e6, 5e-7],
  ['pound-force per square foot', 'psf', 4.788026e1, 5e-7],
  ['bar', 'bar', 1e5, 0],
  ['horsepower (550 ft·lbf/s)', 'hp', 7.456999e2, 5e-7],
  ['horsepower (metric)', 'hp_metric', 7.354988e2, 5e-7],
  ['British thermal unit (IT)', 'BTU', 1.055056e3, 5e-7],
  ['calorie (thermochemical)', 'cal', 4.184, 0],
  ['foot pound-force', 'ft-lbf', 1.355818, 5e-7],
  ['kilowatt hour', 'kWh', 3.6e6, 0],
  ['degree (angle)', 'deg', 1.745329e-2, 5e-7],
  ['day', 'day', 8.64e4, 0],
  ['hour', 'h', 3.6e3, 0],
  ['litre', 'litre', 1e-3, 0],
  ['degree Rankine (interval)', 'degR', 5 / 9, 1e-15],
]

test.each(table)('NIST SP 811, B.8: %s', (_name, typed, factor, tolerance) => {
  expect(Math.abs(factorOf(unit(typed)) / factor - 1)).toBeLessThanOrEqual(Math.max(tolerance, 4e-16))
})

// NIST SP 811, appendix B.8: T/K = (t/°F + 459.67)/1.8 and T/K = t/°C + 273.15 (exact).
test('temperatures by the formulas of the table', () => {
  for (const degrees of [-459.67, -40, 0, 68, 212]) {
    expect(toSI(degrees, unit('degF'))).toBeCloseTo((degrees + 459.67) / 1.8, 9)
  }
  expect(toSI(25, unit('degC'))).toBeCloseTo(298.15, 12)
  expect(fromSI(233.15, unit('degF'))).toBeCloseTo(-40, 9)
})

// NIST SP 811, appendix B.8 gives revolution per minute (rpm) as 1.047198 E-01 rad/s; turns per second times 2π here.
test('a revolution per minute is 0.1047198 rad/s', () => {
  expect(Math.abs((2 * Math.PI * factorOf(unit('rpm'))) / 1.047198e-1 - 1)).toBeLessThanOrEqual(5e-7)
})
