import type { LooseProblem } from '../../errors/problem'

export type NumberReading = { value: number; problem?: undefined } | { value?: undefined; problem: LooseProblem }

/** A signed number as typed in a field of its own: `60.0`, `-3`, `2.1e5`, `210*10^3`, `1.2×10⁻⁵`. */
export declare const readAuthoredNumber: (text: string, field?: string) => NumberReading
