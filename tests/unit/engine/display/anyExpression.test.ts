import { expect, test } from 'vitest'
import fc from 'fast-check'
import katex from 'katex'
import { evaluate } from 'mathjs'
import { presentCriterion, presentExpression, presentFormula, presentGiven } from '@shared/engine/display'
import type { MathNode, Quantity } from '@shared/engine/contracts'
import type { BinaryOperator, Expression } from '@shared/engine/parse/expression'
import {
  binary,
  call,
  conditional,
  group,
  number,
  power,
  quantity,
  symbol,
  unary,
  unit,
  value,
  word,
} from './build'

const accepted = (tex: string): string => katex.renderToString(tex, { throwOnError: true, strict: 'error' })

const hostile = [
  '\\href{javascript:x}{y}',
  '}',
  '{',
  '%',
  '$',
  '#',
  '&',
  '^',
  '_',
  '~',
  '\\',
  '🔧',
  '°°',
  'é',
  '`',
  "'",
]
const anyText = fc.oneof(fc.constantFrom(...hostile), fc.string({ maxLength: 6, unit: 'grapheme' }))
const anyName = fc.oneof(fc.constantFrom('tau_max', 'd_o_2', "T''_a", 'S1.phi_end', 'DeltaT', 'x'), anyText)
const anyUnit = fc.oneof(fc.constantFrom('N m', 'N/mm2', 'kg/m^3', '°C', 's^-1'), anyText)
const anyNumber = fc.oneof(fc.constantFrom('16', '0.5', '210*10^3', '1e-9', '123456'), anyText)

const { tree } = fc.letrec<{ tree: Expression }>((tie) => ({
  tree: fc.oneof(
    { maxDepth: 5, depthSize: 'small' },
    fc.oneof(
      anyNumber.map(number),
      fc.tuple(anyNumber, anyUnit).map(([text, of]) => quantity(text, of)),
      anyName.map(symbol),
      anyText.map(word),
      anyUnit.map(unit),
    ),
    fc
      .tuple(
        fc.constantFrom<BinaryOperator>(
          '+',
          '-',
          '*',
          '/',
          '^',
          '<',
          '<=',
          '>',
          '>=',
          '==',
          '!=',
          'and',
          'or',
        ),
        tie('tree'),
        tie('tree'),
      )
      .map(([operator, left, right]) => binary(operator, left, right)),
    fc
      .tuple(fc.constantFrom('-' as const, '+' as const, 'not' as const), tie('tree'))
      .map(([o, x]) => unary(o, x)),
    tie('tree').map(group),
    fc
      .tuple(
        fc.oneof(
          fc.constantFrom('sqrt', 'cbrt', 'abs', 'min', 'sin', 'numerical_value', 'angular_speed'),
          anyText,
        ),
        fc.array(tie('tree'), { maxLength: 3 }),
      )
      .map(([name, args]) => call(name, ...args)),
    fc.tuple(tie('tree'), tie('tree'), tie('tree')).map(([a, b, c]) => conditional(a, b, c)),
  ),
}))

const anyQuantity: fc.Arbitrary<Quantity> = fc
  .tuple(anyNumber, anyUnit)
  .map(([n, u]) => value(`${n} ${u}`, u))

test('KaTeX accepts whatever a person wrote, and no command of theirs comes through', () => {
  fc.assert(
    fc.property(tree, anyName, anyText, anyUnit, anyQuantity, (expression, name, text, of, known) => {
      const substitute = () => known
      const lines = [
        presentFormula({ id: 'a', symbol: name, expression, substitute, result: known }),
        presentGiven({ id: 'a', symbol: name, value: text, unit: of, tolerance: { plus: text, minus: of } }),
        presentGiven({ id: 'a', symbol: name, value: text, unit: of, tolerance: { fit: text } }),
        presentCriterion({
          id: 'a',
          symbol: name,
          demand: expression,
          relation: 'within',
          limit: expression,
          substitute,
          result: { demand: known, limit: known, upper: known, satisfied: false },
        }),
      ]
      for (const { screen } of lines)
        for (const tex of Object.values(screen)) {
          accepted(tex)
          expect(tex).not.toMatch(/\\href|\\left|[$#~`]|%(?<!\\%)/)
        }
    }),
    { numRuns: 400 },
  )
})

const values: Record<string, number> = { a: 1.7, b: -2.3, c: 0.6, d: 3.1 }

const { arithmetic } = fc.letrec<{ arithmetic: Expression }>((tie) => ({
  arithmetic: fc.oneof(
    { maxDepth: 5, depthSize: 'small' },
    fc.oneof(
      fc.constantFrom('2', '0.5', '7', '1.5*10^1').map(number),
      fc.constantFrom('a', 'b', 'c', 'd').map(symbol),
    ),
    fc
      .tuple(fc.constantFrom<BinaryOperator>('+', '-', '*', '/'), tie('arithmetic'), tie('arithmetic'))
      .map(([operator, left, right]) => binary(operator, left, right)),
    fc.tuple(tie('arithmetic'), fc.constantFrom('2', '3')).map(([base, n]) => power(base, number(n))),
    tie('arithmetic').map((x) => unary('-', x)),
    tie('arithmetic').map(group),
  ),
}))

/** The value of a tree, straight from its structure. */
const worth = (expression: Expression): number => {
  switch (expression.type) {
    case 'number':
      return evaluate(expression.text) as number
    case 'symbol':
      return values[expression.name] ?? Number.NaN
    case 'unary':
      return -worth(expression.operand)
    case 'group':
      return worth(expression.inner)
    case 'binary': {
      const [left, right] = [worth(expression.left), worth(expression.right)]
      const by: Partial<Record<BinaryOperator, number>> = {
        '+': left + right,
        '-': left - right,
        '*': left * right,
        '/': left / right,
        '^': left ** right,
      }
      return by[expression.operator] ?? Number.NaN
    }
    default:
      return Number.NaN
  }
}

/** What a reader of the printed tree would type into a calculator. */
const typed = (node: MathNode): string => {
  switch (node.math) {
    case 'row':
      return node.items.map(typed).join('')
    case 'fraction':
      return `((${typed(node.over)})/(${typed(node.under)}))`
    case 'script':
      return `${typed(node.base)}^(${node.sup ? typed(node.sup) : '1'})`
    case 'brackets':
      return `(${typed(node.inner)})`
    case 'operator':
      return ({ '−': '-', '·': '*', '×': '*' } as Record<string, string>)[node.text] ?? node.text
    case 'space':
      return '*'
    case 'root':
      return `sqrt(${typed(node.radicand)})`
    default:
      return node.text
  }
}

const close = (a: number, b: number): boolean =>
  (Number.isNaN(a) && Number.isNaN(b)) ||
  a === b ||
  Math.abs(a - b) <= 1e-9 * Math.max(Math.abs(a), Math.abs(b), 1e-6)

test('brackets stand wherever the value needs them, also around negative values', () => {
  fc.assert(
    fc.property(arithmetic, (expression) => {
      const expected = worth(expression)
      fc.pre(Number.isFinite(expected) && Math.abs(expected) < 1e6)
      const substitute = (name: string) => value(String(values[name]))
      expect(close(evaluate(typed(presentExpression(expression).print), values) as number, expected)).toBe(
        true,
      )
      expect(
        close(evaluate(typed(presentExpression(expression, substitute).print)) as number, expected),
      ).toBe(true)
    }),
    { numRuns: 400 },
  )
})
