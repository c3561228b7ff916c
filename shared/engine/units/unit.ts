import type { LooseProblem } from '../../errors/problem'
import type { Dimension } from '../dimensions/dimension'
import type { UnitPhrase } from '../parse/expression'

export type UnitReading = { phrase: UnitPhrase; problem?: undefined } | { phrase?: undefined; problem: LooseProblem }

/** A unit where only a unit can stand (a unit field, after `to`); empty text is the phrase without factors. */
export declare const readUnit: (text: string, field?: string) => UnitReading
export declare const dimensionOfUnit: (phrase: UnitPhrase) => Dimension
export declare const factorOf: (phrase: UnitPhrase) => number
/** SI value of `number` in `phrase`; degC and degF alone are absolute temperatures. */
export declare const toSI: (number: number, phrase: UnitPhrase) => number
export declare const fromSI: (si: number, phrase: UnitPhrase) => number
export declare const isOffset: (phrase: UnitPhrase) => boolean
/** `megapascal`, `newton metre per radian`. */
export declare const spokenUnit: (phrase: UnitPhrase) => string
