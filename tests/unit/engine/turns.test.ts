import { describe, expect, test } from 'vitest'
import { ambiguousRate } from '@shared/engine/dimensions/check'
import { inWords } from '@shared/engine/dimensions/words'
import { checked, unit } from '../../support/expressions'

/** Symbols of shaft design, gears and vibration, with the units of their givens. */
const units = {
  n: 'rpm', n_2: 'rev/s', f: 'Hz', omega: 'rad/s', T: 'N m', P: 'kW', D: 'mm', d: 'mm', r: 'mm', L: 'm', c: 'mm',
  I: 'kg m^2', k: 'N m', t: 's', t_p: 's', z: '', V: 'cm^3', v: 'm/s', mu: 'Pa s', G: 'GPa', J: 'mm^4', phi: 'deg', theta: 'rad',
} // prettier-ignore

const check = (text: string) => checked(text, units)

const anAngularSpeed = 'An angular speed is 2π times the rotational frequency.'

describe('2*pi on the side of the turn', () => {
  test.each([
    ['2*pi*n*T to kW', 'a power'],
    ['2*pi*f', 'an angular speed or rate'],
    ['2*pi*n*D/2', 'a speed'],
    ['4*pi^2*f^2*I', 'a torque or energy'],
    ['(2*pi*f)^2*I to N m', 'a torque or energy'],
    ['P/(2*pi*n) to N m', 'a torque or energy'],
    ['-2*pi*n*T to kW', 'a power'],
    ['2*(pi*n)*T to kW', 'a power'],
    ['sin(2*pi*f*t)', 'a bare number'],
    ['sqrt(k/I)/(2*pi) to Hz', 'a rotational frequency'],
    ['1/(2*pi)*sqrt(k/I) to Hz', 'a rotational frequency'],
    ['sqrt(k/I)/(2*pi) + 1 Hz to Hz', 'a rotational frequency'],
    ['sqrt(k/I) + 2*pi*f to rad/s', 'an angular speed or rate'],
  ])('%s is right as written', (text, words) => {
    const result = check(text)
    expect(result.problems).toEqual([])
    expect(result.scale).toBe(1)
    expect(inWords(result.dimension ?? [])).toBe(words)
  })

  test('without a unit asked for, a count of turns stays one', () => {
    expect(inWords(check('n*t').dimension ?? [])).toBe('a number of turns')
    expect(inWords(check('n/n_2').dimension ?? [])).toBe('a bare number')
  })
})

describe('what does not fit', () => {
  test('n*T to kW', () => {
    expect(check('n*T to kW').said).toEqual([
      {
        code: 'dimension-mismatch',
        message: `n counts turns, and kW has none. ${anAngularSpeed}`,
        at: 'n*T',
        repairs: ['angular_speed(n)*T to kW'],
      },
    ])
  })

  test('beside pi the repair keeps the value', () => {
    const message = `n counts turns, and pi stands beside it without the 2 of 2*pi. ${anAngularSpeed}`
    expect(check('pi*D*n').said).toEqual([
      { code: 'dimension-mismatch', message, at: 'pi*D*n', repairs: ['angular_speed(n)*D/2'] },
    ])
    expect(check('pi*D*n to m/s').said[0]?.repairs).toEqual(['angular_speed(n)*D/2 to m/s'])
    expect(check('P/(pi*n) to N m').said[0]?.repairs).toEqual(['2*P/angular_speed(n) to N m'])
    expect(check('angular_speed(n)*D/2 to m/s').problems).toEqual([])
  })

  test('sqrt(k/I) to Hz asks whether it is an angular speed or a count', () => {
    expect(check('sqrt(k/I) to Hz').said).toEqual([
      {
        code: 'dimension-mismatch',
        message:
          'Hz counts turns, and sqrt(k/I) has none. Say whether it is an angular speed or a count of turns.',
        at: 'sqrt(k/I)',
        repairs: ['frequency(sqrt(k/I)) to Hz', 'sqrt(k/I)*1 rev to Hz'],
      },
    ])
    expect(check('1/t_p to Hz').said[0]?.repairs).toEqual(['frequency(1/t_p) to Hz', '1/t_p*1 rev to Hz'])
    for (const text of ['frequency(sqrt(k/I)) to Hz', '1/t_p*1 rev to Hz'])
      expect(check(text).problems).toEqual([])
  })

  test('turns that are events are divided by one', () => {
    expect(check('n*V to l/min').said[0]?.repairs).toEqual([
      'angular_speed(n)*V to l/min',
      'n*V/(1 rev) to l/min',
    ])
    expect(check('n*V/(1 rev) to l/min').problems).toEqual([])
  })

  test('a sum of turns and angles', () => {
    expect(check('n + omega').said).toEqual([
      {
        code: 'dimension-mismatch',
        message:
          'The left side of + is a rotational frequency, the right side an angular speed or rate. n counts turns; an angular speed is 2π times the rotational frequency.',
        at: 'n + omega',
        repairs: ['angular_speed(n) + omega'],
      },
    ])
  })

  test('an angle in turns is no argument of a sine', () => {
    expect(check('sin(f*t)').said[0]).toMatchObject({
      message: 'sin takes an angle in rad or deg; this counts turns. 2*pi times the turns is the angle.',
      at: 'f*t',
    })
  })
})

describe('conversions', () => {
  test.each([
    ['n to rad/s', 2 * Math.PI],
    ['n_2 to deg/s', 2 * Math.PI],
    ['omega to rpm', 1 / (2 * Math.PI)],
    ['0.25 rev to deg', 2 * Math.PI],
    ['90 deg to rev', 1 / (2 * Math.PI)],
    ['theta to rev', 1 / (2 * Math.PI)],
    ['n to Hz', 1],
    ['angular_speed(n) to rad/s', 1],
    ['frequency(omega) to rpm', 1],
  ])('%s multiplies by %d', (text, scale) => {
    const result = check(text)
    expect(result.problems).toEqual([])
    expect(result.scale).toBeCloseTo(scale, 15)
  })

  test('only a single symbol or phrase is converted', () => {
    expect(check('2*omega to rpm').problems).toHaveLength(1)
    expect(check('n to 1/s').problems).toHaveLength(1)
    expect(check('t to rev').problems).toHaveLength(1)
  })

  test('f in Hz and n in rpm compare and add directly', () => {
    expect(check('f > n ? f : n').problems).toEqual([])
    expect(check('f + n to Hz').problems).toEqual([])
  })

  test('numerical_value counts turns in rev', () => {
    const count = check('numerical_value(f*t, rev)')
    expect(count.problems).toEqual([])
    expect(count.empirical).toBe(true)
    expect(check('numerical_value(omega, rpm)').said[0]?.repairs).toEqual([
      'numerical_value(frequency(omega), rpm)',
      'numerical_value(omega*1 rev, rpm)',
    ])
  })
})

describe('constants of handbooks', () => {
  test('2*pi*n*T/60', () => {
    expect(check('2*pi*n*T/60').said).toEqual([
      {
        code: 'handbook-constant',
        message:
          '60 stands beside a quantity in turns. In handbooks such a number changes units; here quantities carry their units. If 60 is a number of teeth or the like, give it a symbol.',
        at: '60',
        repairs: ['2*pi*n*T', '2*pi*numerical_value(n, rpm)*T/60*1 rad/s'],
      },
    ])
  })

  test.each([
    ['pi*n/30', ['angular_speed(n)', 'pi*numerical_value(n, rpm)/30*1 rad/s']],
    ['z*n/60 to Hz', ['z*n to Hz', 'z*numerical_value(n, rpm)/60*1 Hz to Hz']],
    ['9550*P/n', ['P/angular_speed(n)', '9550*numerical_value(P, kW)/numerical_value(n, rpm)*1 N m']],
    [
      '9549*P/n to N m',
      ['P/angular_speed(n) to N m', '9549*numerical_value(P, kW)/numerical_value(n, rpm)*1 N m to N m'],
    ],
    ['9.55*P/n', ['P/angular_speed(n)', '9.55*numerical_value(P, W)/numerical_value(n, rpm)*1 N m']],
    ['63025*P/n', ['P/angular_speed(n)', '63025*numerical_value(P, hp)/numerical_value(n, rpm)*1 lbf in']],
    ['5252*P/n', ['P/angular_speed(n)', '5252*numerical_value(P, hp)/numerical_value(n, rpm)*1 lbf ft']],
    [
      'T*n/9550 to kW',
      ['T*angular_speed(n) to kW', 'numerical_value(T, N m)*numerical_value(n, rpm)/9550*1 kW to kW'],
    ],
    ['60*v/(pi*D) to rpm', ['v/(pi*D)*1 rev to rpm']],
    ['3600*n*V', ['n*V']],
  ])('%s', (text, repairs) => {
    expect(check(text).said).toMatchObject([{ code: 'handbook-constant', repairs }])
    for (const repaired of repairs) expect(check(repaired).problems).toEqual([])
  })

  test('a number of teeth under a symbol, or 60 s with its unit, is no constant of a handbook', () => {
    expect(check('z*n to Hz').problems).toEqual([])
    expect(check('n*60 s to rev').problems).toEqual([])
    expect(check('30*T').problems).toEqual([])
  })
})

describe('turns counted twice', () => {
  test('2*pi beside an angular speed', () => {
    expect(check('2*pi*omega*T to kW').said).toEqual([
      {
        code: 'double-turn',
        message:
          'omega is an angular speed, so 2*pi counts the turn twice. Where 2*pi belongs to a circumference, put it in brackets with the radius: (2*pi*r).',
        at: '2*pi*omega*T',
        repairs: ['omega*T to kW'],
      },
    ])
    expect(check('2*pi*angular_speed(n)*T to kW').said[0]?.code).toBe('double-turn')
  })

  test('a period and a circumference are not', () => {
    expect(check('2*pi/omega to s').problems).toEqual([])
    // Petroff's bearing: the sheared area is 2π r L.
    expect(check('mu*omega*(2*pi*r*L)*r^2/c to N m').problems).toEqual([])
  })

  test('180/pi beside deg', () => {
    expect(check('T*L/(G*J)*180/pi to deg').said).toEqual([
      {
        code: 'double-turn',
        message: 'deg converts the angle already, so 180/pi converts it twice.',
        at: 'T*L/(G*J)*180/pi',
        repairs: ['T*L/(G*J) to deg'],
      },
    ])
    expect(check('T*L/(G*J) to deg').problems).toEqual([])
  })

  test('pi/180 beside an angle in deg', () => {
    expect(check('sin(phi*pi/180)').said).toMatchObject([{ code: 'double-turn', repairs: ['sin(phi)'] }])
  })
})

describe('rates that say nothing of what is counted', () => {
  test.each([
    ['1/s', ['rev/s', 'rad/s', 'true']],
    ['s^-1', ['rev/s', 'rad/s', 'true']],
    ['1/min', ['rpm', 'rad/min', 'true']],
  ])('a given in %s asks', (typed, answers) => {
    const problem = ambiguousRate(unit(typed))
    expect(problem).toMatchObject({
      code: 'ambiguous-rate',
      message: `${typed} leaves open what is counted: turns, radians, or something else.`,
    })
    expect(problem?.repairs?.map(({ fields }) => Object.values(fields)[0])).toEqual(answers)
  })

  test.each(['rpm', 'Hz', 'rad/s', 'rev/s', 'm/s', 'mm/min'])('%s does not ask', (typed) => {
    expect(ambiguousRate(unit(typed))).toBeUndefined()
  })
})
