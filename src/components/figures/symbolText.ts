const greek: Record<string, string> = {
  alpha: 'α',
  beta: 'β',
  gamma: 'γ',
  delta: 'δ',
  epsilon: 'ε',
  zeta: 'ζ',
  eta: 'η',
  theta: 'θ',
  iota: 'ι',
  kappa: 'κ',
  lambda: 'λ',
  mu: 'μ',
  nu: 'ν',
  xi: 'ξ',
  pi: 'π',
  rho: 'ρ',
  sigma: 'σ',
  tau: 'τ',
  upsilon: 'υ',
  phi: 'φ',
  chi: 'χ',
  psi: 'ψ',
  omega: 'ω',
  Gamma: 'Γ',
  Delta: 'Δ',
  Theta: 'Θ',
  Lambda: 'Λ',
  Xi: 'Ξ',
  Pi: 'Π',
  Sigma: 'Σ',
  Phi: 'Φ',
  Psi: 'Ψ',
  Omega: 'Ω',
}

/** A symbol of the expression language in two parts, for plain text and drawings: `tau_max` → τ, max. */
export const symbolParts = (symbol: string): { base: string; index: string } => {
  const [base = '', ...indices] = symbol.split('_')
  const letters = (name: string) => name.replace(/^[A-Za-z]+/, (word) => greek[word] ?? word)
  return { base: letters(base), index: indices.map(letters).join(',') }
}

/** The same in one run of text, for places that can hold no index: `τ_max`. */
export const symbolText = (symbol: string): string => {
  const { base, index } = symbolParts(symbol)
  return index ? `${base}_${index}` : base
}
