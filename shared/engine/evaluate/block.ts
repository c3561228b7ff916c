/**
 * Compiles an expression to a closure over columns: one pass per operation over at most `BLOCK`
 * numbers, in typed arrays that stay in the processor's cache (parametric studies, load cases, Monte
 * Carlo). Same bits as the scalar form; where that throws a fault, NaN stands here, and spreads.
 */
import type { BinaryOperator, Expression } from '../parse/expression'
import { factorOf, fromSI, toSI } from '../units/unit'
import { fixedArguments, type Call, type CompileContext } from './compileContext'
import { MethodProblem } from '../contracts'
import { isEqual, isLarger, isLargerOrEqual, isSmaller, isSmallerOrEqual, power } from './numbers'

/** Numbers per pass. */
export const BLOCK = 512

/**
 * @param columns one for each symbol, by the index that `columnOf` gave it
 * @param n how many of the numbers count, at most `BLOCK`
 * @returns a column of its own, overwritten by the next call
 */
export type Block = (columns: readonly Float64Array[], n: number) => Float64Array

export interface BlockContext extends CompileContext {
  columnOf(name: string): number
}

type Operand = { constant: number } | { block: Block }

export const compileBlock = (expression: Expression, context: BlockContext): Block =>
  asBlock(operand(expression, context))

const asBlock = (part: Operand): Block => {
  if ('block' in part) return part.block
  const out = new Float64Array(BLOCK).fill(part.constant)
  return () => out
}

const operand = (expression: Expression, context: BlockContext): Operand => {
  switch (expression.type) {
    case 'number':
      return { constant: expression.value }
    case 'quantity':
      return { constant: toSI(expression.value, expression.unit) }
    case 'symbol': {
      if (expression.name === 'pi') return { constant: Math.PI }
      const index = context.columnOf(expression.name)
      return { block: (columns) => columns[index] as Float64Array }
    }
    case 'group':
      return operand(expression.inner, context)
    case 'unary':
      return unary(expression.operator, operand(expression.operand, context))
    case 'binary':
      return binary(
        expression.operator,
        operand(expression.left, context),
        operand(expression.right, context),
      )
    case 'conditional':
      return { block: conditional(expression, context) }
    case 'call':
      return callOperand(expression, context)
    case 'word':
    case 'unit':
      throw new Error(`A ${expression.type} has no number`)
  }
}

const callOperand = (expression: Call, context: BlockContext): Operand => {
  if (expression.name === 'numerical_value') return numericalValue(expression, context)
  const [argument] = expression.arguments
  if (expression.name === 'sqrt' && argument)
    return withLoop(operand(argument, context), Math.sqrt, squareRoots)
  if (expression.name === 'abs' && argument) return withLoop(operand(argument, context), Math.abs, magnitudes)
  return { block: call(expression, context) }
}

type Loop = (from: Float64Array, to: Float64Array, n: number) => void

/** NaN by themselves where they have no value: these need no call by the library's contract. */
const squareRoots: Loop = (from, to, n) => {
  for (let i = 0; i < n; i += 1) to[i] = Math.sqrt(from[i] as number)
}
const magnitudes: Loop = (from, to, n) => {
  for (let i = 0; i < n; i += 1) to[i] = Math.abs(from[i] as number)
}

const withLoop = (part: Operand, ofOne: (x: number) => number, loop: Loop): Operand => {
  if ('constant' in part) return { constant: ofOne(part.constant) }
  const out = new Float64Array(BLOCK)
  return {
    block: (columns, n) => {
      loop(part.block(columns, n), out, n)
      return out
    },
  }
}

const map = (part: Operand, f: (a: number) => number): Operand => {
  if ('constant' in part) return { constant: f(part.constant) }
  const source = part.block
  const out = new Float64Array(BLOCK)
  return {
    block: (columns, n) => {
      const a = source(columns, n)
      for (let i = 0; i < n; i += 1) out[i] = f(a[i] as number)
      return out
    },
  }
}

const unary = (operator: '-' | '+' | 'not', part: Operand): Operand => {
  if (operator === '+') return part
  return operator === '-' ? map(part, (a) => -a) : map(part, (a) => (a ? 0 : 1))
}

/** NaN for what the scalar form refuses, so that no later step hides it. */
const quotient = (a: number, b: number): number => (b === 0 ? NaN : a / b)
const finiteOrNothing = (result: number): number => (result - result === 0 ? result : NaN)
const powerOrNothing = (a: number, b: number): number => finiteOrNothing(power(a, b))

const truth = (holds: (a: number, b: number) => unknown) => (a: number, b: number) => {
  if (Number.isNaN(a) || Number.isNaN(b)) return NaN
  return holds(a, b) ? 1 : 0
}

const operations: Record<BinaryOperator, (a: number, b: number) => number> = {
  '+': (a, b) => a + b,
  '-': (a, b) => a - b,
  '*': (a, b) => a * b,
  '/': quotient,
  '^': powerOrNothing,
  '<': truth(isSmaller),
  '<=': truth(isSmallerOrEqual),
  '>': truth(isLarger),
  '>=': truth(isLargerOrEqual),
  '==': truth(isEqual),
  '!=': truth((a, b) => !isEqual(a, b)),
  and: truth((a, b) => a && b),
  or: truth((a, b) => a || b),
}

const binary = (operator: BinaryOperator, left: Operand, right: Operand): Operand => {
  const operation = operations[operator]
  if ('constant' in left && 'constant' in right) return { constant: operation(left.constant, right.constant) }
  return { block: arithmetic(operator, left, right) ?? pairwise(operation, asBlock(left), asBlock(right)) }
}

const pairwise = (f: (a: number, b: number) => number, left: Block, right: Block): Block => {
  const out = new Float64Array(BLOCK)
  return (columns, n) => {
    const a = left(columns, n)
    const b = right(columns, n)
    for (let i = 0; i < n; i += 1) out[i] = f(a[i] as number, b[i] as number)
    return out
  }
}

/** The frequent operations, each with a loop of its own that the compiler can turn into machine code. */
const arithmetic = (operator: BinaryOperator, left: Operand, right: Operand): Block | undefined => {
  if ('constant' in right) return withConstant(operator, asBlock(left), right.constant)
  if ('constant' in left) return constantWith(operator, left.constant, right.block)
  return bothVary(operator, left.block, right.block)
}

const bothVary = (operator: BinaryOperator, left: Block, right: Block): Block | undefined => {
  const out = new Float64Array(BLOCK)
  switch (operator) {
    case '+':
      return (columns, n) => {
        const a = left(columns, n)
        const b = right(columns, n)
        for (let i = 0; i < n; i += 1) out[i] = (a[i] as number) + (b[i] as number)
        return out
      }
    case '-':
      return (columns, n) => {
        const a = left(columns, n)
        const b = right(columns, n)
        for (let i = 0; i < n; i += 1) out[i] = (a[i] as number) - (b[i] as number)
        return out
      }
    case '*':
      return (columns, n) => {
        const a = left(columns, n)
        const b = right(columns, n)
        for (let i = 0; i < n; i += 1) out[i] = (a[i] as number) * (b[i] as number)
        return out
      }
    case '/':
      return (columns, n) => {
        const a = left(columns, n)
        const b = right(columns, n)
        for (let i = 0; i < n; i += 1) out[i] = quotient(a[i] as number, b[i] as number)
        return out
      }
    default:
      return undefined
  }
}

const withConstant = (operator: BinaryOperator, left: Block, b: number): Block | undefined => {
  const out = new Float64Array(BLOCK)
  switch (operator) {
    case '+':
    case '-': {
      const addend = operator === '+' ? b : -b
      return (columns, n) => {
        const a = left(columns, n)
        for (let i = 0; i < n; i += 1) out[i] = (a[i] as number) + addend
        return out
      }
    }
    case '*':
      return (columns, n) => {
        const a = left(columns, n)
        for (let i = 0; i < n; i += 1) out[i] = (a[i] as number) * b
        return out
      }
    case '/':
      return (columns, n) => {
        const a = left(columns, n)
        for (let i = 0; i < n; i += 1) out[i] = quotient(a[i] as number, b)
        return out
      }
    case '^':
      return (columns, n) => {
        const a = left(columns, n)
        // The square is exact either way, and much quicker so; with a finite exponent, mathjs' power is the machine's.
        if (b === 2) for (let i = 0; i < n; i += 1) out[i] = (a[i] as number) * (a[i] as number)
        else for (let i = 0; i < n; i += 1) out[i] = finiteOrNothing(Math.pow(a[i] as number, b))
        return out
      }
    default:
      return undefined
  }
}

const constantWith = (operator: BinaryOperator, a: number, right: Block): Block | undefined => {
  const out = new Float64Array(BLOCK)
  switch (operator) {
    case '+':
    case '*':
      return withConstant(operator, right, a)
    case '-':
      return (columns, n) => {
        const b = right(columns, n)
        for (let i = 0; i < n; i += 1) out[i] = a - (b[i] as number)
        return out
      }
    case '/':
      return (columns, n) => {
        const b = right(columns, n)
        for (let i = 0; i < n; i += 1) out[i] = quotient(a, b[i] as number)
        return out
      }
    default:
      return undefined
  }
}

const conditional = (expression: Expression & { type: 'conditional' }, context: BlockContext): Block => {
  const [test, then, otherwise] = [expression.test, expression.then, expression.otherwise].map((part) =>
    asBlock(operand(part, context)),
  ) as [Block, Block, Block]
  const out = new Float64Array(BLOCK)
  return (columns, n) => {
    const chosen = test(columns, n)
    const a = then(columns, n)
    const b = otherwise(columns, n)
    for (let i = 0; i < n; i += 1) {
      const which = chosen[i] as number
      out[i] = Number.isNaN(which) ? NaN : ((which ? a[i] : b[i]) as number)
    }
    return out
  }
}

/** A number, or NaN where the method says that it has none. */
const valueOrNothing = (evaluate: () => number): number => {
  try {
    const result = evaluate()
    return Number.isFinite(result) ? result : NaN
  } catch (error) {
    if (error instanceof MethodProblem) return NaN
    throw error
  }
}

const call = (expression: Call, context: BlockContext): Block => {
  if (expression.name === 'at') return at(expression, context)
  const library = context.functions.get(expression.name)
  if (!library) throw new Error(`Unknown function ${expression.name}`)
  const values = fixedArguments(expression, library, context, (unit) => factorOf(unit.unit))
  const sources = expression.arguments.map((argument, i) =>
    values[i] === undefined ? asBlock(operand(argument, context)) : undefined,
  )
  const current = values.map((value) => value ?? 0)
  const evaluate = () => library.evaluate(current)
  const out = new Float64Array(BLOCK)
  return (columns, n) => {
    const arrays = sources.map((source) => source?.(columns, n))
    for (let i = 0; i < n; i += 1) {
      let isNumber = true
      for (let k = 0; k < arrays.length; k += 1) {
        const array = arrays[k]
        if (!array) continue
        const argument = array[i] as number
        current[k] = argument
        if (Number.isNaN(argument)) isNumber = false
      }
      out[i] = isNumber ? valueOrNothing(evaluate) : NaN
    }
    return out
  }
}

const numericalValue = (expression: Call, context: BlockContext): Operand => {
  const [quantity, unit] = expression.arguments
  if (!quantity || unit?.type !== 'unit') throw new Error('numerical_value() takes a quantity and a unit')
  return map(operand(quantity, context), (si) => fromSI(si, unit.unit))
}

const at = (expression: Call, context: BlockContext): Block => {
  const [along, station] = expression.arguments
  if (along?.type !== 'symbol' || !station)
    throw new Error('at() takes a quantity along a member and a station')
  const stations = asBlock(operand(station, context))
  const out = new Float64Array(BLOCK)
  return (columns, n) => {
    const x = stations(columns, n)
    const value = context.along(along.name)
    for (let i = 0; i < n; i += 1) out[i] = valueOrNothing(() => value(x[i] as number))
    return out
  }
}
