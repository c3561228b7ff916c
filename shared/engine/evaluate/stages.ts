/**
 * The three stages of a line, each the result of the one before, so that a change repeats no more than it must:
 * *reading* what its texts say (again when a text or its vocabulary changes), *checking* units and dimensions (again
 * when a symbol that it reads changes those), and *evaluating* numbers (again when one of these changes).
 */
import type {
  Analysis,
  AnalysisResult,
  CriterionResult,
  Dimension,
  LibraryFunction,
  LooseProblem,
  Quantity,
  Settings,
  Sign,
  SolvedReference,
} from '../contracts'
import type { Span } from '../../errors/problem'
import type { Register } from '../graph/symbolTable'
import type { Expression, UnitPhrase } from '../parse/expression'
import type { Vocabulary } from '../parse/vocabulary'

/** What a symbol or a member stands for, before its number is known. */
export interface QuantityType {
  dimension: Dimension
  unit: UnitPhrase
  /** Outputs of analyses only. */
  sign?: Sign
}

/** What a line gives to those who read its symbol. */
export type Publication =
  | { type: 'quantity'; quantity: QuantityType }
  | {
      type: 'analysis'
      kind: string
      members: ReadonlyMap<string, QuantityType>
      along: ReadonlyMap<string, QuantityType>
    }
  /** A line that has a symbol but no value to read; `what` completes *C1 is …*. */
  | { type: 'nothing'; what: string }

/** What checking may ask of the rest of the sheet. */
export interface CheckScope {
  settings: Settings
  functions: ReadonlyMap<string, LibraryFunction>
  publication(symbol: string): Publication | undefined
  /** The type of a symbol or member; undefined while it waits. */
  typeOf(name: string): QuantityType | undefined
  dimensionOfSymbol: (name: string) => Dimension | undefined
  unitOfSymbol: (name: string) => UnitPhrase | undefined
  register: (name: string) => Register
  /** A symbol's or member's value as its own line shows it. */
  shownValue(name: string): Quantity | undefined
  /** Current interpolant of a quantity along a member. */
  along: (name: string) => (station: number) => number
  solved(symbol: string): SolvedReference | undefined
}

/** What reading may ask. */
export interface ReadScope {
  vocabulary: Vocabulary
  analyses: ReadonlyMap<string, Analysis>
}

/** Result of reading. */
export interface Reading {
  /** Canonical names, members included, each once. */
  reads: readonly string[]
  /** Quantities along a member that `at()` asks for; `reads` has them, too. */
  along: ReadonlySet<string>
  /** Names of other lines as a whole, not of their values: the references of analyses. */
  whole: ReadonlySet<string>
  /** Where a name stands first. */
  where(name: string): Span | undefined
  problems: LooseProblem[]
  check(scope: CheckScope): Checked
  /** The parsed texts by field, for presentation. */
  expressions: Readonly<Record<string, Expression | undefined>>
}

/** Result of checking. */
export interface Checked {
  problems: LooseProblem[]
  /** Absent where a problem or a missing type stands in the way. */
  publication?: Publication
  empirical?: boolean
  /** Absent where there is nothing to evaluate. Never throws for what a person wrote. */
  evaluate?(): Outcome
}

/** Result of evaluating. */
export interface Outcome {
  problems: LooseProblem[]
  value?: Quantity
  criterion?: CriterionResult
  analysis?: AnalysisResult
  /** SI by member name, the line's own number under the empty name; absent where no number came out. */
  numbers?: Readonly<Record<string, number>>
  solved?: SolvedReference
  alongFunctions?: Readonly<Record<string, (station: number) => number>>
}

/** What a line without any expression says of symbols: nothing. */
export const withoutReferences: Pick<Reading, 'reads' | 'along' | 'whole' | 'where' | 'expressions'> = {
  reads: [],
  along: new Set(),
  whole: new Set(),
  where: () => undefined,
  expressions: {},
}
