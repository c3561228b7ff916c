import fc from 'fast-check'
import { create, all } from 'mathjs'
import { describe, expect, test } from 'vitest'
import { checkDimensions } from '@shared/engine/dimensions/check'
import { builtins } from '@shared/engine/evaluate/builtins'
import type { Expression } from '@shared/engine/parse/expression'
import { parseExpression } from '@shared/engine/parse/parse'
import { readCompact, writeCompact } from '@shared/engine/parse/shorthand'
import { dimensionOfUnit, factorOf, readUnit } from '@shared/engine/units/unit'
import { shape, unit } from '../support/expressions'

const math = create(all ?? {})

/** Units that mathjs has, too, with its spelling. */
const shared = new Map([
  ['mm', 'mm'], ['m', 'm'], ['in', 'inch'], ['ft', 'ft'], ['kg', 'kg'], ['lb', 'lbm'], ['s', 's'], ['h', 'hour'],
  ['N', 'N'], ['kN', 'kN'], ['lbf', 'lbf'], ['MPa', 'MPa'], ['psi', 'psi'], ['bar', 'bar'], ['J', 'J'], ['W', 'W'], ['K', 'K'],
]) // prettier-ignore

const factor = fc.tuple(
  fc.constantFrom(...shared.keys()),
  fc.integer({ min: -3, max: 3 }).filter((exponent) => exponent !== 0),
)

/**
 * How far mathjs' psi, 6894.75729276459 Pa, lies from lbf/in², which is exactly 0.45359237 kg × 9.80665 m/s² over
 * (25.4 mm)², 6894.757293168361 Pa (international pound, inch and standard gravity): 5.9e-11 of it, for each
 * power. Every other factor of the list agrees to the last digits.
 */
const PSI_OF_MATHJS = 6e-11

describe('units', () => {
  test('products of powers have the size and dimension that mathjs gives them', () => {
    fc.assert(
      fc.property(fc.array(factor, { minLength: 1, maxLength: 4 }), (factors) => {
        const own = unit(factors.map(([name, exponent]) => `${name}^${exponent}`).join(' '))
        // One mole more: mathjs converts nothing that is left without a dimension.
        const theirs = math.unit(
          1,
          [...factors.map(([name, exponent]) => `${shared.get(name)}^${exponent}`), 'mol'].join(' '),
        )
        // mathjs counts mass, length, time, current, temperature.
        const [mass = 0, length = 0, time = 0, , temperature = 0] = theirs.dimensions
        expect(dimensionOfUnit(own).slice(0, 5)).toEqual(
          [length, mass, time, 0, temperature].map((exponent) => exponent + 0),
        )
        const coherent = theirs.toNumber(`kg^${mass} m^${length} s^${time} K^${temperature} mol`)
        const psi = factors.reduce(
          (sum, [name, exponent]) => sum + (name === 'psi' ? Math.abs(exponent) : 0),
          0,
        )
        expect(Math.abs(factorOf(own) / coherent - 1)).toBeLessThan(1e-13 + PSI_OF_MATHJS * psi)
      }),
      { numRuns: 300 },
    )
  })
})

/** Source texts of expressions, by growth. */
const source = fc.letrec<{ node: string }>((tie) => ({
  node: fc.oneof(
    { maxDepth: 5 },
    fc.constantFrom('a', 'b_1', 'tau', 'pi', '2', '0.5', '3 mm', '7 kN', '5 MPa', '2e3', '10^3'),
    fc
      .tuple(tie('node'), fc.constantFrom('+', '-', '*', '/', ' ^ '), tie('node'))
      .map((parts) => parts.join('')),
    tie('node').map((inner) => `(${inner})`),
    tie('node').map((inner) => `sqrt(${inner})`),
    tie('node').map((inner) => `-(${inner})`),
    fc.tuple(tie('node'), tie('node')).map(([a, b]) => `max(${a}, ${b})`),
    fc.tuple(tie('node'), tie('node'), tie('node')).map(([a, b, c]) => `(${a} > ${b} ? ${c} : a)`),
  ),
})).node

const vocabulary = { isDefined: (name: string) => name === 'mm', functions: builtins }

/** Writes a tree anew, with the fewest brackets that keep it. */
const written = (node: Expression): string => {
  switch (node.type) {
    case 'number':
      return node.text
    case 'quantity':
      return `${node.text} ${node.unit.text}`
    case 'symbol':
      return node.name
    case 'word':
      return node.text
    case 'unit':
      return node.unit.text
    case 'group':
      return `( ${written(node.inner)} )`
    case 'unary':
      return `${node.operator} ${written(node.operand)}`
    case 'binary':
      return `${written(node.left)} ${node.operator} ${written(node.right)}`
    case 'call':
      return `${node.name}( ${node.arguments.map(written).join(' , ')} )`
    case 'conditional':
      return `${written(node.test)} ? ${written(node.then)} : ${written(node.otherwise)}`
  }
}

const read = (text: string) => parseExpression(text, { ...vocabulary, isDefined: () => false })

describe('expressions', () => {
  test('what was read and is written anew reads the same', () => {
    fc.assert(
      fc.property(source, (text) => {
        const { parsed } = read(text)
        if (parsed === undefined) return
        const again = read(written(parsed.root))
        expect(again.parsed && shape(again.parsed.root)).toBe(shape(parsed.root))
      }),
      { numRuns: 1000 },
    )
  })

  test('every range is the text of its node', () => {
    const within = (node: Expression, text: string): void => {
      const piece = text.slice(node.range.from, node.range.to)
      const again = read(piece)
      expect(again.parsed && shape(again.parsed.root)).toBe(shape(node))
      if (node.type === 'binary') {
        within(node.left, text)
        // In an exponent 10^3 is a power, alone it is one number.
        if (node.operator !== '^') within(node.right, text)
      }
      if (node.type === 'group') within(node.inner, text)
      if (node.type === 'unary') within(node.operand, text)
      if (node.type === 'call') node.arguments.forEach((argument) => within(argument, text))
    }
    fc.assert(
      fc.property(source, (text) => {
        const { parsed } = read(text)
        if (parsed) within(parsed.root, text)
      }),
      { numRuns: 300 },
    )
  })

  test('mathjs gives a sum or product of the same quantities the same dimension', () => {
    const quantity = fc.tuple(fc.integer({ min: 1, max: 9 }), fc.constantFrom(...shared.keys()))
    const step = fc.tuple(fc.constantFrom('*', '/', '+'), quantity)
    fc.assert(
      fc.property(quantity, fc.array(step, { maxLength: 4 }), (first, steps) => {
        const bracketed = ([value, name]: [number, string]): string => `(${value} ${name})`
        const text = steps.reduce(
          (left, [operator, right]) => `(${left} ${operator} ${bracketed(right)})`,
          bracketed(first),
        )
        const theirs = text.replace(
          /(\d) (\w+)/g,
          (_, value: string, name: string) => `${value} ${shared.get(name)}`,
        )
        const { parsed } = read(text)
        if (parsed === undefined) throw new Error(`${text} cannot be read`)
        const own = checkDimensions(parsed, {
          dimensionOfSymbol: () => undefined,
          unitOfSymbol: () => undefined,
          functions: builtins,
        })
        let evaluated: unknown
        try {
          evaluated = math.evaluate(theirs)
        } catch {
          expect(own.problems.map(({ code }) => code)).toContain('dimension-mismatch')
          return
        }
        const dimensions = math.isUnit(evaluated) ? evaluated.dimensions : []
        const [mass = 0, length = 0, time = 0, , temperature = 0] = dimensions
        expect(own.problems).toEqual([])
        expect(own.dimension?.slice(0, 5)).toEqual(
          [length, mass, time, 0, temperature].map((exponent) => exponent + 0),
        )
      }),
      { numRuns: 500 },
    )
  })
})

describe('ten thousand texts', () => {
  /** Nothing that a person may type throws, hangs, or goes through without a value or a problem. */
  const survives = (text: string): void => {
    const result = parseExpression(text, vocabulary)
    if (result.parsed === undefined) {
      const wellSaid = result.problems.every(
        ({ message, span }) => /[.…]$/u.test(message) && (span?.to ?? 0) <= text.length + 1,
      )
      if (result.problems.length === 0 || !wellSaid)
        throw new Error(`${text}: ${JSON.stringify(result.problems)}`)
      return
    }
    checkDimensions(result.parsed, {
      dimensionOfSymbol: (name) => (name === 'a' ? dimensionOfUnit(unit('rpm')) : undefined),
      unitOfSymbol: () => undefined,
      functions: builtins,
    })
  }

  const pieces = fc.constantFrom(
    'a', 'T', 'm', 'τ', "x'", '1', '2.5', '1,5', '10^3', '1e5', 'N', 'mm', 'MPa', 'rpm', '%', '°C', 'pi', 'to', 'and', 'or', 'not', 'min(',
    'sqrt(', 'numerical_value(', 'unit("', '"', '(', ')', '[', '+', '-', '*', '/', '^', '²', '⁻', '<', '<=', '=', '?', ':', ',', '.', ' ', '  ',
    'constructor', '__proto__', '🔩', '\\', ';', 'S1.', '..', '\n',
  ) // prettier-ignore

  test('made of the pieces of the language', () => {
    fc.assert(
      fc.property(
        fc.array(pieces, { maxLength: 20 }).map((parts) => parts.join('')),
        survives,
      ),
      { numRuns: 6000, seed: 811 },
    )
  })

  test('made of any characters', () => {
    fc.assert(fc.property(fc.string({ unit: 'binary', maxLength: 40 }), survives), {
      numRuns: 4000,
      seed: 80000,
    })
  })

  test('as units and as lines typed in a paragraph', () => {
    fc.assert(
      fc.property(
        fc.array(pieces, { maxLength: 12 }).map((parts) => parts.join('')),
        (text) => {
          readUnit(text)
          const reading = readCompact(`x = ${text}`, vocabulary)
          if (reading.reading === 'line') writeCompact(reading.line)
        },
      ),
      { numRuns: 2000, seed: 3 },
    )
  })
})
