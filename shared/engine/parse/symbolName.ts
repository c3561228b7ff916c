export type SymbolReading = { name: string; message?: undefined } | { name?: undefined; message: string }

/**
 * Canonical name of a symbol as typed: `τ_max` → `tau_max`, `d₀` → `d_0`; or what is wrong with it.
 * With `functions`, names of functions are refused.
 */
export declare const readSymbolName: (text: string, functions?: { has(name: string): boolean }) => SymbolReading
