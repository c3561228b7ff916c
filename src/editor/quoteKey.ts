/** Quoted values that read alike share one result, wherever they stand. */
export const quoteKey = (symbol: string, unit?: string | null, digits?: number | null): string =>
  `${symbol}|${unit ?? ''}|${digits ?? ''}`
