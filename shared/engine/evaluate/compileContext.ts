import type { LibraryFunction } from '../contracts'
import type { Expression } from '../parse/expression'

export type Call = Expression & { type: 'call' }

/** What expressions are compiled against. */
export interface CompileContext {
  /** As typed; messages quote it. */
  text: string
  functions: ReadonlyMap<string, LibraryFunction>
  /** SI value of one display unit of an expression; counts for an optional unit that was left out. */
  displayFactor(expression: Expression): number
  /** `at(S1.T, x)`: the quantity along the member, by its full name. Throws `MethodProblem` outside. */
  along(name: string): (station: number) => number
}

/** Arguments that are the same in every evaluation: words, units, and units that were left out. */
export const fixedArguments = (
  call: Call,
  library: LibraryFunction,
  context: CompileContext,
  factorOf: (unit: Expression & { type: 'unit' }) => number,
): (string | number | undefined)[] => {
  const fixed = call.arguments.map((argument) => {
    if (argument.type === 'word') return argument.text
    return argument.type === 'unit' ? factorOf(argument) : undefined
  })
  library.parameters.forEach((parameter, i) => {
    const first = call.arguments[0]
    if (parameter.kind === 'unit' && parameter.optional && i >= call.arguments.length && first) {
      fixed[i] = context.displayFactor(first)
    }
  })
  return fixed
}
