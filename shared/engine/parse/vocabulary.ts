/** What the reader of an expression must know of its sheet and of the library. */
import type { LibraryFunction } from '../contracts'

export interface Vocabulary {
  /**
   * Whether the sheet defines this symbol (canonical name). Asked only where the answer changes the
   * reading: for the last name of a unit phrase. Whoever keeps parsed lines must read a line again
   * when one of the names that it asked for comes or goes.
   */
  isDefined(name: string): boolean
  functions: ReadonlyMap<string, LibraryFunction>
  /**
   * True for a criterion's side, an analysis input or a bound: there a text that is one number with
   * one unit phrase as a whole is that, whatever symbols the sheet has.
   */
  onlyUnit?: boolean
}
