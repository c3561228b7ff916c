/**
 * Walks the tree of an expression and lets each construct draw itself. With `substitute` it is the
 * substituted form: the same layout, values with their units in place of the symbols that have one.
 */
import type { Expression } from '../parse/expression'
import { bracketed } from './brackets'
import { drawAbsolute, drawCall } from './call'
import { drawChain } from './comparison'
import { drawConditional, type Cases } from './conditional'
import { onTheLine, type Drawn, type Setting } from './drawn'
import { drawFraction, insideFraction } from './fraction'
import { drawLogic, drawNot } from './logic'
import { drawNumber } from './numeral'
import { drawNumericalValue } from './numericalValue'
import { drawPower, inExponent } from './power'
import { drawProduct } from './product'
import { drawQuantity, drawQuantityText } from './quantity'
import { drawCubeRoot, drawSquareRoot } from './root'
import { drawStation } from './station'
import { drawSign, drawSum } from './sum'
import { drawSymbol } from './symbol'
import type { Substitution } from './views'
import { drawBareUnit, drawWord } from './word'

type Of<Type extends Expression['type']> = Extract<Expression, { type: Type }>

/** Typed brackets that the drawing itself replaces: by a bar, a root, a raised place, the brackets of a call. */
const unwrapped = (expression: Expression): Expression =>
  expression.type === 'group' ? unwrapped(expression.inner) : expression

const isNamed = (expression: Expression, ...names: string[]): boolean =>
  expression.type === 'call' && names.includes(expression.name) && expression.arguments.length === 1

/** @param substitute what symbols stand for; without it they stay themselves. */
export const drawExpression = (
  root: Expression,
  substitute: Substitution = () => undefined,
  setting: Setting = onTheLine,
): Drawn => {
  const draw = (expression: Expression, where: Setting): Drawn => {
    switch (expression.type) {
      case 'number':
        return drawNumber(expression.text)
      case 'quantity':
        return drawQuantityText(expression.text, expression.unit.text)
      case 'symbol': {
        const value = substitute(expression.name)
        return value ? drawQuantity(value) : drawSymbol(expression.name)
      }
      case 'unary':
        if (expression.operator === 'not') return drawNot(draw(expression.operand, where))
        return drawSign(expression.operator, draw(expression.operand, where))
      case 'binary':
        return binary(expression, where)
      case 'group':
        return bracketed(draw(unwrapped(expression), where))
      case 'call':
        return call(expression, where)
      case 'conditional':
        return drawConditional(cases(expression, where))
      case 'word':
        return drawWord(expression.text)
      case 'unit':
        return drawBareUnit(expression.unit.text)
    }
  }

  const binary = ({ operator, left, right }: Of<'binary'>, where: Setting): Drawn => {
    switch (operator) {
      case '/': {
        if (where.inline) return drawFraction(draw(left, where), draw(right, where), where)
        const inside = insideFraction(where)
        // The sign of a numerator stands before the bar: −T/J, not (−T)/J.
        if (left.type === 'unary' && left.operator === '-')
          return drawSign(
            '-',
            drawFraction(draw(unwrapped(left.operand), inside), draw(unwrapped(right), inside), where),
          )
        return drawFraction(draw(unwrapped(left), inside), draw(unwrapped(right), inside), where)
      }
      case '^':
        return drawPower(draw(left, where), draw(unwrapped(right), inExponent(where)))
      case '*':
        return drawProduct(draw(left, where), draw(right, where))
      case '+':
      case '-':
        return drawSum(draw(left, where), operator, draw(right, where))
      case 'and':
      case 'or':
        return drawLogic(draw(left, where), operator, draw(right, where))
      default:
        return drawChain(draw(left, where), [{ relation: operator, side: draw(right, where) }])
    }
  }

  const call = (expression: Of<'call'>, where: Setting): Drawn => {
    const args = expression.arguments.map((argument) => draw(unwrapped(argument), where))
    const [first, second] = args
    const unit = expression.arguments[1]
    if (first && isNamed(expression, 'sqrt')) return drawSquareRoot(first)
    if (first && isNamed(expression, 'cbrt')) return drawCubeRoot(first)
    if (first && isNamed(expression, 'abs')) return drawAbsolute(first)
    if (first && isNamed(expression, 'unit')) return first
    if (first && second && expression.name === 'numerical_value' && unit?.type === 'unit')
      return drawNumericalValue(first, unit.unit.text)
    // The curve keeps its name among values: it has none by itself.
    if (second && expression.name === 'at' && expression.arguments[0]?.type === 'symbol')
      return drawStation(drawSymbol(expression.arguments[0].name), second)
    return drawCall(expression.name, args)
  }

  const cases = ({ test, then, otherwise }: Of<'conditional'>, where: Setting): Cases => {
    const inner = insideFraction(where)
    const first = { value: draw(then, inner), test: draw(unwrapped(test), inner) }
    const left = unwrapped(otherwise)
    if (left.type !== 'conditional') return { rows: [first], otherwise: draw(otherwise, inner) }
    const rest = cases(left, inner)
    return { rows: [first, ...rest.rows], otherwise: rest.otherwise }
  }

  return draw(root, setting)
}
