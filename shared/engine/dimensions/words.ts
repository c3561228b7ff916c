import type { Dimension } from './dimension'

/** A dimension in words, with its article: `a pressure`, `a torque or energy`. */
export declare const inWords: (dimension: Dimension) => string
