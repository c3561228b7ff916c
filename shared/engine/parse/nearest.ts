/** The names nearest to one that is unknown, best first, at most three; none that is far. */
export declare const nearestNames: (name: string, known: Iterable<string>) => string[]
