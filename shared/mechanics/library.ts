/** Functions of mechanics for expressions, each with its source and range. */
import type { LibraryFunction } from '../engine/contracts'

export const libraryFunctions: readonly LibraryFunction[] = []
