/**
 * Compiles an expression to a closure that answers one number in SI. Nothing is generated as program
 * text: each node of the checked tree becomes a function that calls those of its parts. Whatever is no
 * number (division by zero, a root of a negative, overflow) throws a `Fault` at the part concerned,
 * also where a later step would hide it, as 1/(1/0) does.
 */
import type { Register } from '../graph/symbolTable'
import type { BinaryOperator, Expression } from '../parse/expression'
import { factorOf, fromSI, toSI } from '../units/unit'
import { fixedArguments, type Call, type CompileContext } from './compileContext'
import { divisionByZero, faultOfCall, notFinite, rootOfNegative, zeroToNegativePower } from './fault'
import { isEqual, isLarger, isLargerOrEqual, isSmaller, isSmallerOrEqual, power } from './numbers'

export type Scalar = () => number

export interface ScalarContext extends CompileContext {
  register(name: string): Register
}

export const compileScalar = (expression: Expression, context: ScalarContext): Scalar => {
  const compile = (part: Expression): Scalar => compileScalar(part, context)
  switch (expression.type) {
    case 'number': {
      const { value } = expression
      return () => value
    }
    case 'quantity': {
      const value = toSI(expression.value, expression.unit)
      return () => value
    }
    case 'symbol': {
      if (expression.name === 'pi') return () => Math.PI
      const register = context.register(expression.name)
      return () => register.si
    }
    case 'group':
      return compile(expression.inner)
    case 'unary':
      return unary(expression.operator, compile(expression.operand))
    case 'binary':
      return binary(expression, compile(expression.left), compile(expression.right), context.text)
    case 'conditional':
      return conditional(compile(expression.test), compile(expression.then), compile(expression.otherwise))
    case 'call':
      return call(expression, context, compile)
    case 'word':
    case 'unit':
      throw new Error(`A ${expression.type} has no number`)
  }
}

const unary = (operator: '-' | '+' | 'not', operand: Scalar): Scalar => {
  if (operator === '+') return operand
  return operator === '-' ? () => -operand() : () => (operand() ? 0 : 1)
}

const conditional =
  (test: Scalar, then: Scalar, otherwise: Scalar): Scalar =>
  () =>
    test() ? then() : otherwise()

const finite = (result: number, part: Expression, text: string): number => {
  if (result - result !== 0) throw notFinite(text, part)
  return result
}

const comparisons: Partial<Record<BinaryOperator, (a: number, b: number) => boolean>> = {
  '<': isSmaller,
  '<=': isSmallerOrEqual,
  '>': isLarger,
  '>=': isLargerOrEqual,
  '==': isEqual,
  '!=': (a, b) => !isEqual(a, b),
}

const binary = (
  expression: Expression & { type: 'binary' },
  left: Scalar,
  right: Scalar,
  text: string,
): Scalar => {
  switch (expression.operator) {
    case '+':
      return () => finite(left() + right(), expression, text)
    case '-':
      return () => finite(left() - right(), expression, text)
    case '*':
      return () => finite(left() * right(), expression, text)
    case '/':
      return () => {
        const dividend = left()
        const divisor = right()
        if (divisor === 0) throw divisionByZero(text, expression.right)
        return finite(dividend / divisor, expression, text)
      }
    case '^':
      return () => {
        const base = left()
        const exponent = right()
        if (base < 0 && !Number.isInteger(exponent)) throw rootOfNegative(text, expression.left)
        if (base === 0 && exponent < 0) throw zeroToNegativePower(text, expression.left)
        return finite(power(base, exponent), expression, text)
      }
    case 'and':
      return () => (left() && right() ? 1 : 0)
    case 'or':
      return () => (left() || right() ? 1 : 0)
    default: {
      const holds = comparisons[expression.operator]
      if (!holds) throw new Error(`Unknown operator ${expression.operator}`)
      return () => (holds(left(), right()) ? 1 : 0)
    }
  }
}

const call = (expression: Call, context: ScalarContext, compile: (part: Expression) => Scalar): Scalar => {
  if (expression.name === 'at') return at(expression, context, compile)
  if (expression.name === 'numerical_value') return numericalValue(expression, compile)
  const library = context.functions.get(expression.name)
  if (!library) throw new Error(`Unknown function ${expression.name}`)
  const values = fixedArguments(expression, library, context, (unit) => factorOf(unit.unit))
  const live = expression.arguments.map((argument, i) =>
    values[i] === undefined ? compile(argument) : undefined,
  )
  const current = values.map((value) => value ?? 0)
  return () => {
    for (let i = 0; i < live.length; i += 1) {
      const argument = live[i]
      if (argument) current[i] = argument()
    }
    let result: number
    try {
      result = library.evaluate(current)
    } catch (error) {
      throw faultOfCall(error, expression, library.parameters)
    }
    if (!Number.isFinite(result)) throw notFinite(context.text, expression)
    return result
  }
}

const numericalValue = (expression: Call, compile: (part: Expression) => Scalar): Scalar => {
  const [quantity, unit] = expression.arguments
  if (!quantity || unit?.type !== 'unit') throw new Error('numerical_value() takes a quantity and a unit')
  const value = compile(quantity)
  return () => fromSI(value(), unit.unit)
}

const at = (expression: Call, context: ScalarContext, compile: (part: Expression) => Scalar): Scalar => {
  const [along, station] = expression.arguments
  if (along?.type !== 'symbol' || !station)
    throw new Error('at() takes a quantity along a member and a station')
  const stationNow = compile(station)
  return () => {
    try {
      return context.along(along.name)(stationNow())
    } catch (error) {
      throw faultOfCall(error, expression, [{ name: 'along' }, { name: 'x' }])
    }
  }
}
